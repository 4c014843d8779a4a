/**
 * Makes a dossier: the whole book in one snapshot, its tables, the printed statement, a signed manifest, in one ZIP that
 * an insurer can check without Grainward. Doing it twice makes two good dossiers, so the queue may try again.
 */
import { createHash, createPrivateKey, createPublicKey, randomUUID, sign } from 'node:crypto';
import { zipSync } from 'fflate';
import { readLine } from '../../../shared/chain/record-line.ts';
import { csvTable } from '../../../shared/dossier/csv.ts';
import { VERIFY_GUIDE } from '../../../shared/dossier/guide.ts';
import type { Manifest } from '../../../shared/dossier/manifest.ts';
import { DOSSIER_FORMAT, DOSSIER_VERSION } from '../../../shared/dossier/manifest.ts';
import type { HashedRecord } from '../../../shared/dossier/replay.ts';
import { leafOf } from '../../../shared/dossier/replay.ts';
import { tablesOf } from '../../../shared/dossier/tables.ts';
import type { AppContext } from '../../context.ts';
import { keyIdOf } from '../../cli/node-crypto.ts';
import type { WorkOrder } from '../../jobs/worker.ts';
import { postRecords } from '../book/post.ts';
import { workshopToday } from '../identity/roles.ts';
import { storeDocument } from '../documents/documents.ts';
import { readSnapshot } from './snapshot.ts';
import type { Snapshot } from './snapshot.ts';
import { statementPdf } from './statement.ts';

const STEPS = 5;
/** One moment for every file in the ZIP, so that the same book packs to the same bytes. */
const PACKED_AT = new Date('2000-01-01T00:00:00Z');

/** What the asker wants to know of a dossier that is ready. */
export interface DossierMade {
  readonly document_id: string;
  readonly bytes: string;
  readonly sha256: string;
  readonly sequence: string;
  readonly hash: string;
  readonly key_id: string;
  readonly files: Manifest['files'];
}

export async function makeDossier(context: AppContext, order: WorkOrder): Promise<DossierMade> {
  await order.progress('reading the book', 1, STEPS);
  const snapshot = await readSnapshot(context.db, order.workshop_id);
  const chain = snapshot.lines.map(({ line, hash }) => hashed(line, hash));
  const private_key = createPrivateKey(context.config.signing_key_pem);
  const public_pem = createPublicKey(private_key).export({ type: 'spki', format: 'pem' }).toString();
  const key_id = keyIdOf(public_pem) ?? '';
  const generated_at = new Date().toISOString();
  const earlier_heads = earlierHeads(chain);
  await order.progress('writing the tables', 2, STEPS);
  const contents = tableFiles(snapshot, chain);
  await order.progress('printing the statement', 3, STEPS);
  const { workshop } = snapshot;
  const facts = {
    workshop: workshop.name,
    currency: workshop.currency,
    as_of: generated_at,
    generated_at,
    key_id,
    earlier_heads,
  };
  contents.set('statement.pdf', { bytes: await statementPdf(chain, facts), rows: null });
  await order.progress('signing', 4, STEPS);
  const manifest = manifestOf({
    snapshot,
    chain,
    contents,
    key_id,
    generated_at,
    generated_by: order.made_by,
    earlier_heads,
  });
  const manifestBytes = Buffer.from(JSON.stringify(manifest, null, 2));
  const files = new Map([...contents].map(([path, { bytes }]) => [path, bytes]));
  files
    .set('manifest.json', manifestBytes)
    .set('manifest.sig', sign(null, manifestBytes, private_key))
    .set('public-key.pem', Buffer.from(public_pem));
  const zip = zipSync(
    Object.fromEntries([...files].map(([path, bytes]) => [path, [bytes, { mtime: PACKED_AT, level: 6 }]])),
  );
  await order.progress('keeping it', 5, STEPS);
  const by = { workshop_id: order.workshop_id, person_id: order.made_by, role: 'proprietor' as const };
  const kept = await storeDocument(
    context,
    { name: `dossier-${manifest.chain.sequence}.zip`, bytes: zip, media_type: 'application/zip' },
    by,
  );
  await recordMade(context, order, manifest, kept.id);
  return {
    document_id: kept.id,
    bytes: kept.bytes,
    sha256: kept.sha256,
    ...manifest.chain,
    key_id,
    files: manifest.files,
  };
}

function hashed(line: string, hash: string): HashedRecord {
  const record = readLine(line);
  if (record === null) throw new Error('a stored line is not a record');
  return { record, hash };
}

type Contents = Map<string, { readonly bytes: Uint8Array; readonly rows: number | null }>;

function tableFiles(snapshot: Snapshot, chain: readonly HashedRecord[]): Contents {
  const text = (content: string, rows: number | null) => ({ bytes: Buffer.from(content), rows });
  const contents: Contents = new Map();
  contents.set(
    'book.jsonl',
    text(snapshot.lines.map(({ line }) => `${line}\n`).join(''), snapshot.lines.length),
  );
  for (const table of tablesOf(chain))
    contents.set(table.path, text(csvTable(table.columns, table.rows), table.rows.length));
  const documents = snapshot.documents.map(({ id, name, sha256 }) => [id, name, sha256]);
  contents.set('data/documents.csv', text(csvTable(['id', 'name', 'sha256'], documents), documents.length));
  contents.set('VERIFY.md', text(VERIFY_GUIDE, null));
  return contents;
}

/** The heads of dossiers that the chain itself says were made before. */
function earlierHeads(chain: readonly HashedRecord[]): Manifest['earlier_heads'] {
  return chain
    .filter(({ record }) => record.kind === 'dossier_made')
    .map(({ record }) => ({
      sequence: leafOf(record, 'sequence') ?? '',
      hash: leafOf(record, 'hash') ?? '',
      at: record.recorded_at,
      to: leafOf(record, 'to') ?? '',
    }));
}

function manifestOf(of: {
  readonly snapshot: Snapshot;
  readonly chain: readonly HashedRecord[];
  readonly contents: Contents;
  readonly key_id: string;
  readonly generated_at: string;
  readonly generated_by: string;
  readonly earlier_heads: Manifest['earlier_heads'];
}): Manifest {
  const last = of.chain.at(-1);
  if (last === undefined) throw new Error('a book without records has no dossier');
  const { id, name } = of.snapshot.workshop;
  return {
    format: DOSSIER_FORMAT,
    version: DOSSIER_VERSION,
    workshop: { id, name },
    as_of: of.generated_at,
    generated_at: of.generated_at,
    generated_by: of.generated_by,
    software: 'Grainward 1',
    chain: { sequence: last.record.sequence, hash: last.hash },
    earlier_heads: of.earlier_heads,
    key_id: of.key_id,
    files: [...of.contents].map(([path, { bytes, rows }]) => ({
      path,
      bytes: String(bytes.length),
      rows: rows === null ? null : String(rows),
      sha256: createHash('sha256').update(bytes).digest('hex'),
    })),
  };
}

/** That a dossier was made, and up to where, is itself a record: the next one names its head. */
function recordMade(context: AppContext, order: WorkOrder, manifest: Manifest, document_id: string) {
  return context.db.inScope({ workshop_id: order.workshop_id, user_id: null }, async (tx) => {
    const detail = {
      document_id,
      sequence: manifest.chain.sequence,
      hash: manifest.chain.hash,
      key_id: manifest.key_id,
      to: null,
    };
    const business_date = await workshopToday(tx);
    await postRecords(
      tx,
      [
        {
          type: 'act',
          id: randomUUID(),
          kind: 'dossier_made',
          business_date,
          note: null,
          documents: [],
          detail,
        },
      ],
      { person_id: order.made_by, approved_by: null },
    );
  });
}
