/**
 * The linter's rules: types used soundly, hooks and accessibility, limits on length, and the import arrows of the tree
 * (shared ← server ← seed, shared ← src; inside src: components ← pages ← app). `tests/unit/lint-rules.test.ts` proves that the arrows hold.
 */
import { dirname, relative, resolve } from 'node:path';
import js from '@eslint/js';
import jsxA11y from 'eslint-plugin-jsx-a11y';
import reactHooks from 'eslint-plugin-react-hooks';
import tseslint from 'typescript-eslint';

const root = import.meta.dirname;

/** What each folder may import, the innermost first. A folder that is not named here may import everything. */
const ARROWS = [
  { from: 'shared', may: ['shared'] },
  { from: 'server', may: ['server', 'shared'] },
  { from: 'seed', may: ['seed', 'server', 'shared'] },
  { from: 'src/components', may: ['src', 'shared'], not: ['src/pages', 'src/app'] },
  { from: 'src/pages', may: ['src', 'shared'], not: ['src/app'], except: ['src/app/paths.ts'] },
  { from: 'src/app', may: ['src', 'shared'] },
  { from: 'src/main.tsx', may: ['src', 'shared'] },
  { from: 'src', may: ['src', 'shared'], not: ['src/pages', 'src/app', 'src/components'] },
];

const within = (path, folder) => path === folder || path.startsWith(`${folder}/`);

/** Why a file may not import another, or null. Paths are relative to the root. */
function wrongArrow(file, target) {
  const arrow = ARROWS.find(({ from }) => within(file, from));
  if (arrow === undefined) return null;
  if (arrow.except?.includes(target)) return null;
  if (!arrow.may.some((folder) => within(target, folder))) return `${arrow.from} may not import ${target}.`;
  if (arrow.not?.some((folder) => within(target, folder))) return `${arrow.from} may not import ${target}.`;
  const area = (path) => (within(path, 'src/pages') ? path.split('/')[2] : null);
  if (area(file) !== null && area(target) !== null && area(file) !== area(target))
    return `A page imports another page's parts: ${target}. What both need belongs in src/components.`;
  return null;
}

const arrows = {
  meta: { type: 'problem', schema: [], messages: { wrong: '{{why}}' } },
  create(context) {
    const file = relative(root, context.filename);
    const check = (node) => {
      const path = node.source?.value;
      if (typeof path !== 'string' || !path.startsWith('.')) return;
      const why = wrongArrow(file, relative(root, resolve(dirname(context.filename), path)));
      if (why !== null) context.report({ node, messageId: 'wrong', data: { why } });
    };
    return {
      ImportDeclaration: check,
      ImportExpression: check,
      ExportNamedDeclaration: check,
      ExportAllDeclaration: check,
    };
  },
};

/** A second syntax rule in a later block replaces the first, so each block repeats what holds everywhere. */
const everywhere = [
  {
    selector: 'TSAsExpression:not([typeAnnotation.typeName.name="const"])',
    message: 'Parse or narrow instead of asserting a type.',
  },
];

const pureOnly = [
  ...everywhere,
  {
    selector: 'NewExpression[callee.name="Date"][arguments.length=0]',
    message: 'shared reads no clock: the time is passed in.',
  },
  {
    selector: 'MemberExpression[object.name="Date"][property.name="now"]',
    message: 'shared reads no clock: the time is passed in.',
  },
  {
    selector: 'MemberExpression[object.name="Math"][property.name="random"]',
    message: 'shared makes no randomness: it is passed in.',
  },
];

const POINTED = ['onClick', 'onDoubleClick', 'onMouseDown', 'onMouseUp'];

const focused = ['describe', 'it', 'test'].flatMap((name) =>
  ['only', 'skip', 'todo'].map((property) => ({
    object: name,
    property,
    message: 'Every test runs, in every run.',
  })),
);

export default tseslint.config(
  { ignores: ['dist/', 'coverage/', 'node_modules/', '.grainward/'] },
  {
    files: ['**/*.{js,mjs}'],
    extends: [js.configs.recommended],
    languageOptions: {
      globals: Object.fromEntries(
        ['process', 'console', 'fetch', 'setTimeout', 'clearTimeout', 'URL'].map((n) => [n, 'readonly']),
      ),
    },
    rules: { 'max-lines': ['error', 400] },
  },
  {
    files: ['**/*.{ts,tsx}'],
    extends: [js.configs.recommended, ...tseslint.configs.strictTypeChecked],
    languageOptions: { parserOptions: { projectService: true, tsconfigRootDir: root } },
    plugins: { grainward: { rules: { arrows } } },
    linterOptions: { reportUnusedDisableDirectives: 'error' },
    rules: {
      'grainward/arrows': 'error',
      'max-lines': ['error', 400],
      'no-restricted-properties': ['error', ...focused],
      'no-restricted-syntax': ['error', ...everywhere],
      '@typescript-eslint/switch-exhaustiveness-check': [
        'error',
        { considerDefaultExhaustiveForUnions: true, requireDefaultForNonUnion: true },
      ],
      '@typescript-eslint/consistent-type-imports': 'error',
      '@typescript-eslint/restrict-template-expressions': ['error', { allowNumber: true }],
      '@typescript-eslint/no-confusing-void-expression': ['error', { ignoreArrowShorthand: true }],
      // Input is searched for control characters on purpose.
      'no-control-regex': 'off',
      // The formatter breaks lines as it likes; there is no code here without semicolons.
      'no-unexpected-multiline': 'off',
    },
  },
  {
    files: ['shared/**/*.ts'],
    rules: {
      'no-restricted-syntax': ['error', ...pureOnly],
      'no-restricted-globals': ['error', 'process', 'fetch', 'window', 'document', 'crypto'],
      'no-restricted-imports': [
        'error',
        { patterns: [{ regex: '^node:', message: 'shared does no I/O: what it needs is passed in.' }] },
      ],
    },
  },
  {
    files: ['{shared,server,seed}/**/*.ts', 'src/**/*.ts'],
    rules: { 'max-lines-per-function': ['error', { max: 70, skipComments: true, skipBlankLines: true }] },
  },
  {
    files: ['src/**/*.tsx'],
    extends: [reactHooks.configs.flat.recommended, jsxA11y.flatConfigs.strict],
    rules: {
      'max-lines-per-function': ['error', { max: 100, skipComments: true, skipBlankLines: true }],
      // A wide table or drawing scrolls by keyboard only if its region can be reached.
      'jsx-a11y/no-noninteractive-tabindex': ['error', { tags: [], roles: ['region', 'tabpanel'] }],
      // Such a region listens for arrow keys, and a message that is pointed at stays: neither is a hidden button.
      'jsx-a11y/no-noninteractive-element-interactions': ['error', { handlers: POINTED }],
      'jsx-a11y/no-static-element-interactions': ['error', { handlers: POINTED }],
    },
  },
  {
    // The answers of the HTTP test client are of no type: a field that is not there fails the expectation on it.
    files: ['tests/**/*.{ts,tsx}'],
    rules: Object.fromEntries(
      ['assignment', 'member-access', 'call', 'argument', 'return'].map((what) => [
        `@typescript-eslint/no-unsafe-${what}`,
        'off',
      ]),
    ),
  },
  { files: ['src/**/use-*.ts'], extends: [reactHooks.configs.flat.recommended] },
);
