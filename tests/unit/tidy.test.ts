/**
 * The tree keeps its own rules. What the linter can't see is looked up here: lengths, heads of files, numbers near
 * metal, the lock file, migrations, links, environment. A ratchet: what is good may not get worse.
 */
import { existsSync, readFileSync, readdirSync } from 'node:fs';
import { dirname, join, relative } from 'node:path';
import { describe, expect, it } from 'vitest';

const root = join(import.meta.dirname, '../..');
const TOP_LEVEL = new Set(
  `README.md DEVELOPERS.md package.json package-lock.json tsconfig.json vite.config.ts postcss.config.js index.html
  eslint.config.js src server shared fonts seed tests`.split(/\s+/),
);
const NOT_OURS = new Set(['node_modules', 'dist', 'coverage']);

function filesBelow(folder: string): readonly string[] {
  return readdirSync(folder, { withFileTypes: true })
    .filter((entry) => !entry.name.startsWith('.') && !NOT_OURS.has(entry.name))
    .flatMap((entry) => {
      const path = join(folder, entry.name);
      return entry.isDirectory() ? filesBelow(path) : [relative(root, path)];
    });
}

const files = filesBelow(root);
const text = (file: string) => readFileSync(join(root, file), 'utf8');
const code = files.filter((file) => /\.(ts|tsx|js|mjs|css)$/.test(file));
/** This file and the linter's settings spell out what they forbid. */
const others = code.filter((file) => !/tidy\.test|lint-rules\.test|eslint\.config/.test(file));
const inside = (...folders: readonly string[]) =>
  others.filter((file) => folders.some((folder) => file.startsWith(`${folder}/`)));

/** "file:line: the line" of each line of these files that matches. */
function lines(among: readonly string[], pattern: RegExp): readonly string[] {
  return among.flatMap((file) =>
    text(file)
      .split('\n')
      .flatMap((line, index) =>
        pattern.test(line) ? [`${file}:${index + 1}: ${line.trim().slice(0, 90)}`] : [],
      ),
  );
}

describe('files', () => {
  it('lie under the fixed top level', () => {
    const top = readdirSync(root).filter((name) => !name.startsWith('.') && !NOT_OURS.has(name));
    expect(top.filter((name) => !TOP_LEVEL.has(name))).toEqual([]);
  });

  it('have at most 400 lines', () => {
    const long = code.map((file) => `${file}: ${text(file).split('\n').length - 1}`);
    expect(long.filter((line) => Number(line.split(': ')[1]) > 400)).toEqual([]);
  });

  it('are named in kebab-case', () => {
    const odd = code.filter((file) => !/^[a-z0-9]+([-.][a-z0-9]+)*$/.test(file.split('/').at(-1) ?? ''));
    expect(odd).toEqual([]);
  });

  it('say at their head what they are for', () => {
    const silent = inside('shared', 'server', 'seed', 'src', 'tests/support').filter(
      (file) => !/^(#!.*\n)?\/(\*|\/)/.test(text(file)) && !file.endsWith('.d.ts'),
    );
    expect(silent).toEqual([]);
  });
});

describe('code', () => {
  it('keeps JavaScript numbers away from metal', () => {
    const pattern = /\bNumber\(|\bparseFloat\b|\bNumber\.parse|\.toNumber\(\)|[=(,?:[]\s*\+[a-zA-Z_(]/;
    // Where a count or a port is read as a number: "file" and why.
    const allowed = new Set([
      'server/start/packages.mjs', // versions of PostgreSQL
      'server/start/new-cluster.mjs', // ids of users
      'server/start/start.mjs', // a port
      'server/middleware/metrics.ts', // seconds
    ]);
    expect(
      lines(
        inside('shared', 'server', 'seed').filter((file) => !allowed.has(file)),
        pattern,
      ),
    ).toEqual([]);
  });

  it('leaves nothing for later and turns no check off', () => {
    const pattern = /\b(TODO|FIXME|XXX)\b|@ts-(ignore|nocheck)|eslint-disable|prettier-ignore/;
    expect(lines(others, pattern)).toEqual([]);
  });

  it('runs every test', () => {
    expect(
      lines(inside('tests'), /\b(describe|it|test)(\.\w+)*\.(only|skip|todo|fails|skipIf|runIf)\b/),
    ).toEqual([]);
    expect(lines(inside('tests'), /\b(xit|xdescribe|fit|fdescribe)\(/)).toEqual([]);
  });

  it('logs through the logger', () => {
    const allowed = new Set(['server/index.ts']);
    const speaking = inside('server', 'shared', 'src').filter(
      (file) => !/^server\/(start|cli)\//.test(file) && !allowed.has(file),
    );
    expect(lines(speaking, /\bconsole\./)).toEqual([]);
  });
});

describe('the project', () => {
  it('names no registry and no path of one machine', () => {
    const everywhere = [...others, ...files.filter((file) => /\.(json|md|html)$/.test(file))];
    expect(
      lines(everywhere, /registry\.\w|\bnpmjs\b|unpkg|jsdelivr|["'`(\s](\/work|\/root|\/home)\//),
    ).toEqual([]);
  });

  it('locks packages without naming where they came from', () => {
    expect(text('package-lock.json').includes('"resolved"')).toBe(false);
    expect(text('.npmrc')).toContain('omit-lockfile-registry-resolved=true');
  });

  it('names every package by its exact version', () => {
    const lists = [...text('package.json').matchAll(/"(?:devD|d)ependencies": \{([^}]*)\}/g)].map(
      ([list]) => list,
    );
    const versions = lists.flatMap((list) => [...list.matchAll(/^ {4}"(.+)": "(.+)"/gm)]);
    expect(versions.length).toBeGreaterThan(50);
    expect(versions.filter(([, , version]) => !/^\d+\.\d+\.\d+$/.test(version ?? ''))).toEqual([]);
  });

  it('runs every migration', () => {
    const list = text('server/migrations/index.ts');
    const dated = files.filter((file) => /^server\/migrations\/\d{4}-/.test(file));
    expect(dated.length).toBeGreaterThan(0);
    expect(dated.filter((file) => !list.includes(`./${file.split('/').at(-1)}'`))).toEqual([]);
  });

  it('explains every variable of the environment', () => {
    const read = new Set(
      [...inside('server', 'seed', 'tests'), 'vite.config.ts'].flatMap((file) =>
        [
          ...text(file).matchAll(/\b(?:env\.|env\['|clusterUrl\(')([A-Z][A-Z0-9_]+)/g),
          ...(file === 'server/config.ts' ? text(file).matchAll(/^ {2}([A-Z][A-Z0-9_]+): /gm) : []),
        ].flatMap((match) => match[1] ?? []),
      ),
    );
    const explained = new Set(
      [...text('.env.example').matchAll(/^([A-Z0-9_]+)=/gm)].flatMap((m) => m[1] ?? []),
    );
    expect([...read].filter((name) => name !== 'PATH' && !explained.has(name))).toEqual([]);
    expect([...explained].filter((name) => !read.has(name))).toEqual([]);
  });

  it.each(['README.md', 'DEVELOPERS.md'])('%s links to what exists', (page) => {
    const targets = [...text(page).matchAll(/\]\(([^)#\s]+)(?:#[^)]*)?\)|<img[^>]+src="([^"]+)"/g)].flatMap(
      (match) => match[1] ?? match[2] ?? [],
    );
    const local = targets.filter((target) => !/^[a-z]+:/.test(target));
    expect(local.filter((target) => !existsSync(join(root, dirname(page), target)))).toEqual([]);
  });
});
