/** The linter really reports what the tree forbids: an import against the arrows, a clock in shared, a focused test. */
import { join } from 'node:path';
import { ESLint } from 'eslint';
import { describe, expect, it } from 'vitest';

const root = join(import.meta.dirname, '../..');
const eslint = new ESLint({ cwd: root });

/** Ids of the rules that are broken when a file of the tree is made of this text. */
async function broken(file: string, text: string): Promise<readonly string[]> {
  const [result] = await eslint.lintText(text, { filePath: join(root, file) });
  return (result?.messages ?? []).map((message) => message.ruleId ?? message.message);
}

describe('the import arrows', { timeout: 120_000 }, () => {
  it.each([
    ['shared/mass/vector.ts', '../../server/problem.ts'],
    ['shared/mass/vector.ts', '../../src/lib/formats.ts'],
    ['server/problem.ts', '../src/lib/formats.ts'],
    ['server/problem.ts', '../tests/support/book.ts'],
    ['src/lib/formats.ts', '../../server/problem.ts'],
    ['src/lib/formats.ts', '../components/ui/button.tsx'],
    ['src/components/ui/button.tsx', '../../pages/today/today.tsx'],
    ['src/components/ui/button.tsx', '../../app/paths.ts'],
    ['src/pages/today/today.tsx', '../lots/family.tsx'],
    ['src/pages/today/today.tsx', '../../app/frame.tsx'],
  ])('%s may not import %s', async (file, target) => {
    expect(await broken(file, `export * from '${target}';\n`)).toEqual(['grainward/arrows']);
    expect(await broken(file, `import '${target}';\n`)).toEqual(['grainward/arrows']);
    expect(await broken(file, `export const later = () => import('${target}');\n`)).toContain(
      'grainward/arrows',
    );
  });

  it.each([
    ['server/problem.ts', '../shared/mass/vector.ts'],
    ['src/pages/today/today.tsx', '../../components/ui/button.tsx'],
    ['src/pages/today/today.tsx', '../../app/paths.ts'],
    ['src/pages/today/today.tsx', './holders.tsx'],
    ['src/app/router.tsx', '../pages/today/today.tsx'],
    ['tests/support/book.ts', '../../server/problem.ts'],
  ])('%s may import %s', async (file, target) => {
    expect(await broken(file, `import '${target}';\n`)).toEqual([]);
  });
});

describe('other rules', { timeout: 120_000 }, () => {
  it.each([
    ['a clock in shared', 'shared/mass/vector.ts', 'export const at = new Date();\n', 'no-restricted-syntax'],
    [
      'chance in shared',
      'shared/mass/vector.ts',
      'export const any = Math.random();\n',
      'no-restricted-syntax',
    ],
    ['files in shared', 'shared/mass/vector.ts', "import 'node:fs';\n", 'no-restricted-imports'],
    [
      'an asserted type',
      'server/problem.ts',
      'export const a = JSON.parse("1") as string;\n',
      'no-restricted-syntax',
    ],
    [
      'a type that is anything',
      'server/problem.ts',
      'export type A = any;\n',
      '@typescript-eslint/no-explicit-any',
    ],
    [
      'a focused test',
      'tests/support/book.ts',
      "import { it } from 'vitest';\nit.only('one', () => undefined);\n",
      'no-restricted-properties',
    ],
    [
      'a switch that forgets a case',
      'server/problem.ts',
      "export function f(a: 'x' | 'y'): number {\n  switch (a) {\n    case 'x':\n      return 1;\n  }\n  return 2;\n}\n",
      '@typescript-eslint/switch-exhaustiveness-check',
    ],
    [
      'a button that the keyboard can’t press',
      'src/components/ui/button.tsx',
      'export const B = () => <div onClick={() => undefined}>Post</div>;\n',
      'jsx-a11y/click-events-have-key-events',
    ],
    [
      'a hook behind a condition',
      'src/components/ui/button.tsx',
      "import { useState } from 'react';\nexport function B(p: { on: boolean }) {\n  if (p.on) useState(1);\n  return null;\n}\n",
      'react-hooks/rules-of-hooks',
    ],
  ])('report %s', async (_what, file, text, rule) => {
    expect(await broken(file, text)).toContain(rule);
  });
});
