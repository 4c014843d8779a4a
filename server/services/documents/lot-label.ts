/**
 * The label of a lot, 62 × 29 mm: code in Besley, form and alloy, gross and fineness with its basis, Code 128 of the
 * code with its check character. It never shows a value in money.
 */
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import bwipjs from 'bwip-js/node';
import PDFDocument from 'pdfkit';
import type { LotWhole } from '../../../shared/schemas/lots.ts';
import { printGrams } from '../../../shared/mass/micrograms.ts';
import { gramsText } from '../../../shared/mass/grams-text.ts';

const MM = 72 / 25.4;
const font = (name: string) =>
  readFileSync(fileURLToPath(new URL(`../../../fonts/${name}`, import.meta.url)));

/** The label as a PDF of one page. */
export async function lotLabel(lot: LotWhole, workshop: string, date: string): Promise<Uint8Array> {
  const bars = await bwipjs.toBuffer({
    bcid: 'code128',
    text: lot.code,
    scale: 4,
    height: 8,
    includetext: false,
  });
  const pdf = new PDFDocument({
    size: [62 * MM, 29 * MM],
    margin: 0,
    lang: 'en',
    info: { Title: `Label of ${lot.code}` },
  });
  const chunks: Buffer[] = [];
  pdf.on('data', (chunk: Buffer) => chunks.push(chunk));
  const ended = new Promise<void>((resolve) => pdf.on('end', () => resolve()));
  pdf
    .registerFont('figure', font('besley-600.ttf'))
    .registerFont('text', font('archivo-400.ttf'))
    .registerFont('strong', font('archivo-600.ttf'));
  const at = lot.code.lastIndexOf('-');
  pdf
    .font('figure')
    .fontSize(15)
    .text(lot.code.slice(0, at), 2.5 * MM, 1.6 * MM, { continued: true, lineBreak: false });
  pdf.fillColor('#666').text(lot.code.slice(at), { lineBreak: false }).fillColor('#000');
  const line = (text: string, y: number, name: 'text' | 'strong' = 'text', size = 7) =>
    pdf
      .font(name)
      .fontSize(size)
      .text(text, 2.5 * MM, y * MM, { width: 57 * MM, lineBreak: false, ellipsis: true });
  line(lot.description, 8, 'strong', 8);
  line(`${printGrams(gramsText(lot.gross_g), 3)} g gross, ${finenessWords(lot)}, ${lot.basis}`, 11.6);
  pdf.image(bars, 4.5 * MM, 15.4 * MM, { width: 53 * MM, height: 8 * MM });
  line(`${date}  ${workshop}  Grainward`, 25, 'text', 6);
  pdf.end();
  await ended;
  return Buffer.concat(chunks);
}

function finenessWords(lot: LotWhole): string {
  const metals = (['gold', 'silver', 'platinum', 'palladium'] as const).filter(
    (metal) => lot[`${metal}_permille`] !== '0',
  );
  const symbols = { gold: 'Au', silver: 'Ag', platinum: 'Pt', palladium: 'Pd' } as const;
  return metals.map((metal) => `${symbols[metal]} ${lot[`${metal}_permille`]}`).join(' ') || 'base metal';
}
