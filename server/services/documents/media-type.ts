/** What a file is, by its first bytes. A renamed program or a page with script is none of these and is refused. */
import type { MediaType } from '../../../shared/schemas/documents.ts';

const starts = (bytes: Uint8Array, ...expected: readonly number[]) =>
  expected.every((byte, at) => bytes[at] === byte);
const text = (bytes: Uint8Array, from: number, to: number) =>
  Buffer.from(bytes.subarray(from, to)).toString('latin1');

/** The type of a file, or null where it is none that may be kept. */
export function mediaTypeOf(bytes: Uint8Array, name: string): MediaType | null {
  if (text(bytes, 0, 5) === '%PDF-') return 'application/pdf';
  if (starts(bytes, 0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a)) return 'image/png';
  if (starts(bytes, 0xff, 0xd8, 0xff)) return 'image/jpeg';
  if (text(bytes, 0, 4) === 'RIFF' && text(bytes, 8, 12) === 'WEBP') return 'image/webp';
  return name.toLowerCase().endsWith('.csv') && isPlainText(bytes) ? 'text/csv' : null;
}

/** UTF-8 without control characters and without the beginning of a page. */
function isPlainText(bytes: Uint8Array): boolean {
  try {
    const read = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
    return !/[\u0000-\u0008\u000B\u000C\u000E-\u001F]/.test(read) && !/^\s*</.test(read);
  } catch {
    return false;
  }
}
