/** Archives that are no dossier are refused before they are unpacked (FAULTS F-20). */
import { zipSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { unzipDossier } from '../../../shared/dossier/unzip.ts';

const small = new TextEncoder().encode('text');
const zip = (files: Record<string, Uint8Array>) => zipSync(files, { level: 9 });

describe('an archive', () => {
  it('of a dossier is unpacked', () => {
    const files = unzipDossier(zip({ 'book.jsonl': small, 'data/lots.csv': small }));
    expect(files).toEqual(
      new Map([
        ['book.jsonl', small],
        ['data/lots.csv', small],
      ]),
    );
  });

  it.each(['../book.jsonl', 'data/../../x', '/etc/passwd', 'a\\b', 'C:x', '.hidden', 'a/b/c.csv'])(
    'with the path %s is refused',
    (path) => {
      expect(unzipDossier(zip({ 'book.jsonl': small, [path]: small }))).toContain('is no file of a dossier');
    },
  );

  it.each(['inner.zip', 'data/inner.ZIP', 'x.tar', 'x.gz', 'x.7z'])(
    'with an archive inside, %s, is refused',
    (path) => {
      expect(unzipDossier(zip({ [path]: small }))).toContain('is no file of a dossier');
    },
  );

  it('of one file that swells is refused', () => {
    expect(unzipDossier(zip({ 'book.jsonl': new Uint8Array(40_000_000) }))).toContain('swells');
  });

  it('of many files that swell together is refused', () => {
    const each = new Uint8Array(2_000_000);
    const files = Object.fromEntries(Array.from({ length: 20 }, (_, index) => [`data/${index}.csv`, each]));
    expect(unzipDossier(zip(files))).toContain('swells');
  });

  it('of too many files is refused', () => {
    const files = Object.fromEntries(Array.from({ length: 201 }, (_, index) => [`data/${index}.csv`, small]));
    expect(unzipDossier(zip(files))).toContain('holds more than a dossier can');
  });

  it('with a file that stands in it twice is refused', () => {
    const bytes = zip({ 'book.jsonl': small, 'book.jsonX': small });
    const twice = Uint8Array.from(
      Buffer.from(Buffer.from(bytes).toString('latin1').replaceAll('jsonX', 'jsonl'), 'latin1'),
    );
    expect(unzipDossier(twice)).toContain('stands in the archive twice');
  });

  it('that lies about its sizes gives no more than it promised', () => {
    const bytes = Buffer.from(zip({ 'book.jsonl': new Uint8Array(5_000_000) }));
    const directory = bytes.lastIndexOf(Buffer.from('PK\u0001\u0002'));
    bytes.writeUInt32LE(10, directory + 24);
    const files = unzipDossier(bytes);
    expect(typeof files === 'string' || (files.get('book.jsonl')?.length ?? 0) <= 10).toBe(true);
  });

  it.each([
    ['nothing', new Uint8Array()],
    ['text', small],
    ['half an archive', zip({ 'book.jsonl': small }).slice(0, 30)],
  ])('that is %s is refused', (_what, bytes) => {
    expect(unzipDossier(bytes)).toContain('can’t be read');
  });
});
