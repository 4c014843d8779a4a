/** The faces for PDFs: each embeds, and has every character of Latin-1 and the figures' own signs. */
import { readFileSync } from 'node:fs';
import PDFDocument from 'pdfkit';
import { describe, expect, it } from 'vitest';

const FACES = ['archivo-400', 'archivo-600', 'archivo-700', 'besley-500', 'besley-600'];
const LATIN_1 = [range(0x20, 0x7e), range(0xa0, 0xff)].flat();
/** Thin space, minus, dashes, quotation marks, ellipsis, euro; and letters of neighbours’ names. */
const SIGNS = Array.from('\u2009\u2212–‘’“”…€ŁłŽžŐőŞş', (character) => character.codePointAt(0) ?? 0);

function range(from: number, to: number): readonly number[] {
  return Array.from({ length: to - from + 1 }, (_, index) => from + index);
}

/** The characters of a TrueType file, from its cmap of format 4 (OpenType, cmap). */
function characters(file: Buffer): ReadonlySet<number> {
  const tables = file.readUInt16BE(4);
  const records = Array.from({ length: tables }, (_, index) => 12 + index * 16);
  const cmap = records.find((at) => file.toString('latin1', at, at + 4) === 'cmap') ?? 0;
  const start = file.readUInt32BE(cmap + 8);
  const found = new Set<number>();
  for (let index = 0; index < file.readUInt16BE(start + 2); index += 1) {
    const table = start + file.readUInt32BE(start + 8 + index * 8);
    if (file.readUInt16BE(table) !== 4) continue;
    const segments = file.readUInt16BE(table + 6) / 2;
    for (let segment = 0; segment < segments; segment += 1) {
      const end = file.readUInt16BE(table + 14 + segment * 2);
      const first = file.readUInt16BE(table + 16 + segments * 2 + segment * 2);
      if (end !== 0xffff) range(first, end).forEach((character) => found.add(character));
    }
  }
  return found;
}

describe.each(FACES)('%s', (face) => {
  const path = `fonts/${face}.ttf`;

  it('has all of Latin-1 and the signs that figures need', () => {
    const has = characters(readFileSync(path));
    const missing = [...LATIN_1, ...SIGNS].filter((character) => !has.has(character));
    expect(missing.map((character) => String.fromCodePoint(character))).toEqual([]);
  });

  it('embeds in a PDF with all of Latin-1', async () => {
    const document = new PDFDocument();
    const chunks: Buffer[] = [];
    document.on('data', (chunk: Buffer) => chunks.push(chunk));
    const ended = new Promise((resolve) => document.on('end', resolve));
    document.font(path).text(String.fromCodePoint(...LATIN_1, ...SIGNS), { features: ['tnum'] });
    document.end();
    await ended;
    expect(Buffer.concat(chunks).toString('latin1')).toContain('/FontFile2');
  });
});
