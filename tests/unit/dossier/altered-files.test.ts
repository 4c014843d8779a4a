/**
 * Files of a dossier that are changed, missing, too many, or signed by somebody else are named; bytes that are no dossier
 * never break the check (FAULTS E-02, E-03, E-07, E-08).
 */
import { generateKeyPairSync } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { verifyDossier } from '../../../shared/dossier/verify.ts';
import { nodeCrypto } from '../../../server/cli/node-crypto.ts';
import { KEY_ID, SIGNING_KEY, dossierOf, goodRecords } from '../../support/dossier-book.ts';
import type { Files } from '../../support/dossier-files.ts';
import { failures, resign } from '../../support/dossier-files.ts';

const files = dossierOf();
const textOf = (path: string) => Buffer.from(files.get(path) ?? []).toString('utf8');

describe('the files', () => {
  const tables = [...files.keys()].filter((path) => path.endsWith('.csv') && path !== 'data/documents.csv');

  it.each(tables)('%s with a row more, without its head, or broken, is named', async (path) => {
    const altered = (text: string) =>
      failures(resign(new Map(files).set(path, Buffer.from(text)), SIGNING_KEY));
    const more = `${textOf(path)}${','.repeat(textOf(path).split('\r\n')[0]?.split(',').length ?? 1)}\r\n`;
    expect((await altered(more))['tables']?.[0]).toContain(`${path} has`);
    expect((await altered(textOf(path).replace(/^.*?,/, 'x,')))['tables']?.[0]).toContain('other columns');
    const broken = new Map(files).set(path, Buffer.from('"'));
    expect((await failures(broken))['tables']?.[0]).toContain(path);
  });

  it('with one figure of a table changed names the row', async () => {
    const text = textOf('data/holdings.csv').replace('75.000000', '75.000001');
    const altered = resign(new Map(files).set('data/holdings.csv', Buffer.from(text)), SIGNING_KEY);
    expect((await failures(altered))['tables']?.[0]).toMatch(
      /^Row \d of data\/holdings.csv is not what the chain gives/,
    );
  });

  it('with another paper than the one that was recorded names the record', async () => {
    const altered = (text: string) =>
      failures(resign(new Map(files).set('data/documents.csv', Buffer.from(text)), SIGNING_KEY));
    const at = goodRecords.findIndex(({ id }) => id === 'came') + 1;
    expect((await altered(textOf('data/documents.csv').replace('abab', 'baba')))['tables']).toEqual([
      `A document that record ${at} names has another digest in data/documents.csv.`,
    ]);
    expect((await altered('id,name,sha256\r\n'))['tables']).toEqual([
      `A document that record ${at} names is not in data/documents.csv.`,
    ]);
  });

  it('with one unlisted, one missing, one longer or one changed, name it', async () => {
    const found = async (altered: Files) => (await failures(altered))['files'];
    expect(await found(new Map(files).set('extra.txt', Buffer.from('x')))).toEqual([
      'extra.txt is not listed. It is no part of the dossier.',
    ]);
    const without = new Map(files);
    without.delete('VERIFY.md');
    expect(await found(without)).toEqual(['VERIFY.md is listed and is not there.']);
    const guide = textOf('VERIFY.md');
    expect((await found(new Map(files).set('VERIFY.md', Buffer.from(`${guide} `))))?.[0]).toContain(
      'are listed',
    );
    const changed = Buffer.from(guide.replace('openssl', 'openssI'));
    expect(await found(new Map(files).set('VERIFY.md', changed))).toEqual([
      'VERIFY.md is not the file that was signed.',
    ]);
  });
});

describe('the signature', () => {
  it('of another key fails against the manifest and against the fingerprint from outside', async () => {
    const { privateKey } = generateKeyPairSync('ed25519');
    const other = resign(files, privateKey.export({ type: 'pkcs8', format: 'pem' }).toString());
    const found = await failures(other, { key_ids: [KEY_ID], heads: [] });
    expect(Object.keys(found)).toEqual(['signature', 'key']);
  });

  it('of another manifest fails', async () => {
    const altered = new Map(files).set('manifest.json', Buffer.from(`${textOf('manifest.json')} `));
    expect((await failures(altered))['signature']).toEqual([
      'The signature does not belong to this manifest and this key.',
    ]);
  });
});

describe('bytes that are no dossier', () => {
  it.each(['manifest.json', 'book.jsonl'])('%s missing can’t be read', async (path) => {
    const without = new Map(files);
    without.delete(path);
    expect((await verifyDossier(without, { key_ids: [], heads: [] }, nodeCrypto)).exit_code).toBe(2);
  });

  it('changed anywhere in any file never pass, and never break the check', async () => {
    const paths = [...files.keys()];
    await fc.assert(
      fc.asyncProperty(
        fc.constantFrom(...paths),
        fc.nat(),
        fc.integer({ min: 1, max: 255 }),
        async (path, at, by) => {
          const bytes = Uint8Array.from(files.get(path) ?? []);
          const index = at % bytes.length;
          bytes[index] = (bytes[index] ?? 0) ^ by;
          const altered = new Map(files).set(path, bytes);
          const { exit_code } = await verifyDossier(altered, { key_ids: [KEY_ID], heads: [] }, nodeCrypto);
          // In the key's PEM a blank or a line's end may differ and the key be the same.
          const sameKey =
            path === 'public-key.pem' && (await nodeCrypto.keyId(Buffer.from(bytes).toString())) === KEY_ID;
          expect(exit_code > 0 || sameKey).toBe(true);
        },
      ),
      { numRuns: 150 },
    );
  });
});
