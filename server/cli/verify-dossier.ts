/**
 * `npm run verify -- FILE.zip [--key FINGERPRINT] [--head SEQUENCE:HASH]`: checks a dossier without server or database.
 * Ends with 0 where all holds, 1 where something fails, 2 where it can't be read.
 */
import { readFileSync } from 'node:fs';
import { parseArgs } from 'node:util';
import { unzipDossier } from '../../shared/dossier/unzip.ts';
import { verifyDossier } from '../../shared/dossier/verify.ts';
import { nodeCrypto } from './node-crypto.ts';

const VERDICTS = { holds: 'holds', fails: 'FAILS', cannot_be_shown: 'can’t be shown' } as const;

const { values, positionals } = parseArgs({
  allowPositionals: true,
  options: { key: { type: 'string', multiple: true }, head: { type: 'string', multiple: true } },
});
const [path] = positionals;
if (path === undefined) {
  console.error('Name the dossier: npm run verify -- FILE.zip [--key FINGERPRINT] [--head SEQUENCE:HASH]');
  process.exit(2);
}
const files = unzipDossier(read(path));
if (typeof files === 'string') {
  console.error(files);
  process.exit(2);
}
const outside = { key_ids: (values.key ?? []).map(readKey), heads: (values.head ?? []).map(readHead) };
const result = await verifyDossier(files, outside, nodeCrypto);
for (const { name, verdict, findings } of result.checks) {
  console.log(`${VERDICTS[verdict].padEnd(14)} ${name}`);
  for (const { sentence } of findings) console.log(`               ${sentence}`);
}
if (result.head !== null)
  console.log(
    `\n${result.workshop ?? ''}, head ${result.head.sequence}:${result.head.hash}\nkey ${result.key_id ?? 'none'}`,
  );
process.exit(result.exit_code);

function read(file: string): Uint8Array {
  try {
    return readFileSync(file);
  } catch {
    console.error(`${file} can't be opened.`);
    return process.exit(2);
  }
}

function readHead(text: string): { sequence: string; hash: string } {
  const [, sequence, hash] = /^([1-9]\d*):([0-9a-f]{64})$/i.exec(text) ?? [];
  if (sequence !== undefined && hash !== undefined) return { sequence, hash };
  console.error(`--head ${text} is no head. Write it as the statement prints it: SEQUENCE:HASH.`);
  return process.exit(2);
}

function readKey(text: string): string {
  if (/^[0-9a-f]{64}$/i.test(text)) return text;
  console.error(`--key ${text} is no fingerprint. It is 64 hexadecimal digits, as the statement prints it.`);
  return process.exit(2);
}
