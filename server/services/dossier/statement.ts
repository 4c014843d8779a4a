/**
 * The printed statement of a dossier: holdings by place and metal in three parts with their values, losses, signatures,
 * what is open, the chain's head. Black on white, fonts embedded, real text.
 */
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import PDFDocument from 'pdfkit';
import type { HashedRecord } from '../../../shared/dossier/replay.ts';
import type { StatementPart } from './statement-parts.ts';
import { statementParts } from './statement-parts.ts';

const MM = 72 / 25.4;
const LEFT = 16 * MM;
const WIDTH = 595.28 - 2 * LEFT;
const BOTTOM = 841.89 - 20 * MM;
const font = (name: string) =>
  readFileSync(fileURLToPath(new URL(`../../../fonts/${name}`, import.meta.url)));

export interface StatementFacts {
  readonly workshop: string;
  readonly currency: string;
  readonly as_of: string;
  readonly generated_at: string;
  readonly key_id: string;
  readonly earlier_heads: readonly {
    readonly sequence: string;
    readonly hash: string;
    readonly at: string;
  }[];
}

/** The statement as a PDF. */
export async function statementPdf(
  chain: readonly HashedRecord[],
  facts: StatementFacts,
): Promise<Uint8Array> {
  const pdf = new PDFDocument({
    size: 'A4',
    margin: LEFT,
    bufferPages: true,
    lang: 'en',
    tagged: true,
    pdfVersion: '1.7',
    info: { Title: `Statement of metal, ${facts.workshop}` },
  });
  const chunks: Buffer[] = [];
  pdf.on('data', (chunk: Buffer) => chunks.push(chunk));
  const ended = new Promise<void>((resolve) => pdf.on('end', () => resolve()));
  pdf
    .registerFont('figure', font('besley-500.ttf'))
    .registerFont('text', font('archivo-400.ttf'))
    .registerFont('strong', font('archivo-600.ttf'));
  pdf
    .font('figure')
    .fontSize(19)
    .text('Statement of metal', LEFT, 16 * MM);
  pdf.font('text').fontSize(9).text(`${facts.workshop}. As of ${facts.as_of}. Values in ${facts.currency}.`);
  pdf
    .moveTo(LEFT, pdf.y + 4)
    .lineTo(LEFT + WIDTH, pdf.y + 4)
    .lineWidth(1.2)
    .stroke()
    .moveDown(1);
  for (const part of statementParts(chain, facts)) printPart(pdf, part);
  footers(pdf, chain.at(-1), facts);
  pdf.end();
  await ended;
  return Buffer.concat(chunks);
}

function printPart(pdf: PDFKit.PDFDocument, part: StatementPart): void {
  if (pdf.y > BOTTOM - 80) pdf.addPage();
  pdf.moveDown(0.8).font('figure').fontSize(11).text(part.heading, LEFT);
  pdf.font('text').fontSize(8).text(part.note, LEFT, pdf.y, { width: WIDTH }).moveDown(0.3);
  if (part.rows.length === 0) {
    pdf.font('text').fontSize(9).text('none', LEFT);
    return;
  }
  row(pdf, part, part.columns, 'strong');
  pdf
    .moveTo(LEFT, pdf.y)
    .lineTo(LEFT + WIDTH, pdf.y)
    .lineWidth(1)
    .stroke();
  for (const cells of part.rows) {
    if (pdf.y > BOTTOM - 14) {
      pdf.addPage();
      row(pdf, part, part.columns, 'strong');
    }
    row(pdf, part, cells, 'text');
  }
}

/** The first column is wide and left, the others right. */
function row(
  pdf: PDFKit.PDFDocument,
  part: StatementPart,
  cells: readonly string[],
  name: 'text' | 'strong',
): void {
  const y = pdf.y + 2;
  const first = WIDTH * part.first_share;
  const each = (WIDTH - first) / Math.max(1, part.columns.length - 1);
  pdf.font(name).fontSize(8.5);
  const heights = cells.map((cell, index) =>
    pdf.heightOfString(cell, { width: (index === 0 ? first : each) - 6 }),
  );
  cells.forEach((cell, index) => {
    const x = index === 0 ? LEFT : LEFT + first + (index - 1) * each;
    pdf.text(cell, x, y, {
      width: (index === 0 ? first : each) - 6,
      align: index === 0 || part.words ? 'left' : 'right',
    });
  });
  pdf.y = y + Math.max(...heights) + 2;
  pdf.x = LEFT;
}

function footers(pdf: PDFKit.PDFDocument, last: HashedRecord | undefined, facts: StatementFacts): void {
  const { start, count } = pdf.bufferedPageRange();
  for (let page = start; page < start + count; page += 1) {
    pdf.switchToPage(page);
    pdf.page.margins.bottom = 0;
    const head = last === undefined ? '' : `head ${last.record.sequence} ${last.hash.slice(0, 16)}`;
    pdf
      .font('text')
      .fontSize(8)
      .fillColor('#000')
      .text(
        `Statement of metal, ${facts.workshop}   ${head}   ${page - start + 1} of ${count}`,
        LEFT,
        841.89 - 12 * MM,
        { width: WIDTH, lineBreak: false },
      );
  }
}
