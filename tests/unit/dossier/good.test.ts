/** A good dossier holds, and is recomputed by a program that shares no code with ours, and by openssl (FAULTS E-01 to E-05). */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { parse } from 'csv-parse/sync';
import { zipSync } from 'fflate';
import { afterAll, describe, expect, it } from 'vitest';
import { manifestSchema } from '../../../shared/dossier/manifest.ts';
import { verifyDossier } from '../../../shared/dossier/verify.ts';
import { nodeCrypto } from '../../../server/cli/node-crypto.ts';
import { KEY_ID, dossierOf, goodRecords } from '../../support/dossier-book.ts';
import { recompute } from '../../support/recompute.ts';

const files = dossierOf();
const textOf = (path: string) => Buffer.from(files.get(path) ?? []).toString('utf8');
const manifest = manifestSchema.parse(JSON.parse(textOf('manifest.json')));
const dir = mkdtempSync(join(tmpdir(), 'dossier-'));
afterAll(() => rmSync(dir, { recursive: true, force: true }));

const verdicts = async (outside: Parameters<typeof verifyDossier>[1]) =>
  Object.fromEntries(
    (await verifyDossier(files, outside, nodeCrypto)).checks.map(({ id, verdict }) => [id, verdict]),
  );

describe('a good dossier', () => {
  it('holds in every check, and says that its own key and heads prove nothing', async () => {
    const { key, heads, ...others } = await verdicts({ key_ids: [], heads: [] });
    expect([key, heads]).toEqual(['cannot_be_shown', 'cannot_be_shown']);
    expect(new Set(Object.values(others))).toEqual(new Set(['holds']));
  });

  it('holds wholly for a reader who brings the fingerprint and an earlier head', async () => {
    const { hash, sequence } = manifest.chain;
    const outside = { key_ids: [KEY_ID.toUpperCase()], heads: [{ sequence, hash }] };
    expect(new Set(Object.values(await verdicts(outside)))).toEqual(new Set(['holds']));
  });

  it('is signed so that openssl alone can tell, and its key has the fingerprint that the manifest names', () => {
    for (const name of ['manifest.json', 'manifest.sig', 'public-key.pem'])
      writeFileSync(join(dir, name), files.get(name) ?? '');
    const openssl = (line: string) =>
      execFileSync('openssl', line.split(' '), { cwd: dir, stdio: 'pipe' }).toString('utf8');
    const check =
      'pkeyutl -verify -pubin -inkey public-key.pem -rawin -in manifest.json -sigfile manifest.sig';
    expect(openssl(check)).toContain('Signature Verified Successfully');
    openssl('pkey -pubin -in public-key.pem -outform DER -out key.der');
    expect(openssl('dgst -sha256 key.der')).toContain(manifest.key_id);
    writeFileSync(join(dir, 'manifest.json'), `${textOf('manifest.json')} `);
    expect(() => openssl(check)).toThrow();
  });

  it('is recomputed from the format’s description alone: head, links, sums and holdings', () => {
    const found = recompute(files.get('book.jsonl') ?? new Uint8Array());
    expect(found.broken_at).toBeNull();
    expect(found.unbalanced).toEqual([]);
    expect(found.records).toBe(goodRecords.length);
    expect(manifest.chain).toEqual({ sequence: String(found.records), hash: found.head });
    const rows: string[][] = parse(textOf('data/holdings.csv'), { from_line: 2 });
    const printed = rows.map((row) =>
      [...row.slice(0, 2), ...row.slice(2, 7).map((mass) => BigInt(mass.replace('.', '')))].join(','),
    );
    expect(printed.sort()).toEqual(found.holdings);
    expect(found.holdings).toContain('safe,lot,75000000,56250000,0,0,0');
  });

  it('values what is held at the newest price: 56.25 g of gold at 2500 a troy ounce of 31.1034768 g', () => {
    // 56.25 / 31.1034768 × 2500 = 4521.19… (by hand)
    const rows: string[][] = parse(textOf('data/holdings.csv'), { from_line: 2 });
    expect(rows.find(([account]) => account === 'safe')?.at(-1)).toBe('4521.20');
  });

  it('is checked by the command, with neither server nor database: 0, 1 or 2', () => {
    const path = join(dir, 'dossier.zip');
    writeFileSync(path, zipSync(Object.fromEntries(files)));
    const verify = (...args: string[]) => {
      const tsx = join('node_modules', '.bin', 'tsx');
      try {
        const env = { PATH: process.env['PATH'] };
        return {
          status: 0,
          said: execFileSync(tsx, ['server/cli/verify-dossier.ts', ...args], {
            env,
            stdio: 'pipe',
          }).toString(),
        };
      } catch (error) {
        return { said: '', status: error instanceof Error && 'status' in error ? error.status : null };
      }
    };
    const good = verify(path, '--key', KEY_ID, '--head', `${manifest.chain.sequence}:${manifest.chain.hash}`);
    expect(good.status).toBe(0);
    expect(good.said).not.toMatch(/FAILS|can’t be shown/);
    expect(verify(path, '--head', `3:${'0'.repeat(64)}`).status).toBe(1);
    expect(verify(path, '--head', 'yesterday').status).toBe(2);
    expect(verify(join(dir, 'manifest.json')).status).toBe(2);
    expect(verify().status).toBe(2);
  }, 60_000);
});
