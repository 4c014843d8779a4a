/**
 * A small good dossier made in memory, for tests of the checks without server or database: two people, a safe, a bench,
 * a supplier, one lot, a weigh-in with its paper, two issues, a reversal that two signed, a closed month, a price.
 */
import { generateKeyPairSync } from 'node:crypto';
import type { ChainEntry, ChainRecord } from '../../shared/chain/record-line.ts';
import { csvTable } from '../../shared/dossier/csv.ts';
import { VERIFY_GUIDE } from '../../shared/dossier/guide.ts';
import { tablesOf } from '../../shared/dossier/tables.ts';
import { keyIdOf } from '../../server/cli/node-crypto.ts';
import type { Files } from './dossier-files.ts';
import { chained, resign } from './dossier-files.ts';

const { privateKey, publicKey } = generateKeyPairSync('ed25519');
/** The key that every dossier here is signed with. */
export const SIGNING_KEY = privateKey.export({ type: 'pkcs8', format: 'pem' }).toString();

export const KEY_ID = keyIdOf(publicKey.export({ type: 'spki', format: 'pem' }).toString()) ?? '';

export const PAPER = { id: 'paper', sha256: 'ab'.repeat(32) };

type Draft = Pick<ChainRecord, 'id' | 'kind'> & Partial<ChainRecord>;

export function entry(line: string, account_id: string, gross_g: string, gold_g: string): ChainEntry {
  const none = '0.000000';
  return {
    account_id,
    gold_g,
    gross_g,
    line,
    lot_id: 'lot',
    palladium_g: none,
    pieces: null,
    platinum_g: none,
    silver_g: none,
  };
}

/** A record of the first of March, recorded by the proprietor, where the draft says nothing else. */
export function aRecord(draft: Draft): ChainRecord {
  return {
    approved_by: null,
    business_date: '2026-03-01',
    detail: {},
    documents: [],
    entries: [],
    note: null,
    previous_hash: '0'.repeat(64),
    recorded_at: '2026-03-01T09:00:00.000Z',
    recorded_by: 'ann',
    reverses: null,
    sequence: '1',
    ...draft,
  };
}

const account = (account_id: string, kind: string, name: string) =>
  aRecord({
    id: `open-${account_id}`,
    kind: 'account_opened',
    detail: { account_id, kind, name, custodian_id: null },
  });
const role = (person_id: string, name: string, given: string) =>
  aRecord({
    id: `role-${person_id}`,
    kind: 'role_given',
    detail: { person_id, name, role: given, until: null },
  });

/** The records of a good book; their numbers and hashes are put in by `dossierOf`. */
export const goodRecords: readonly ChainRecord[] = [
  role('ann', 'Ann Sorrel', 'proprietor'),
  role('bram', '=Bram Willet', 'keeper'),
  role('cleo', 'Cleo Harrow', 'goldsmith'),
  role('dora', 'Dora Finch', 'auditor'),
  account('safe', 'safe', 'Safe'),
  account('bench', 'bench', 'Bench 1'),
  account('supplier', 'supplier', 'Brackwater, "sheet"'),
  aRecord({
    id: 'price',
    kind: 'price_set',
    detail: {
      price_id: 'price',
      metal: 'gold',
      currency: 'EUR',
      price_per_ozt: '2500',
      priced_on: '2026-03-01',
      source: 'typed',
    },
  }),
  aRecord({
    id: 'lot-described',
    kind: 'lot_described',
    detail: {
      lot_id: 'lot',
      code: 'G26-0001-X',
      form: 'sheet',
      alloy: '-750 yellow',
      owner_id: null,
      origin: 'recycled',
      gold_permille: '750',
      silver_permille: '0',
      platinum_permille: '0',
      palladium_permille: '0',
      basis: 'certificate',
    },
  }),
  aRecord({
    id: 'came',
    kind: 'weigh_in',
    documents: [PAPER],
    entries: [
      entry('1', 'supplier', '-100.000000', '-75.000000'),
      entry('2', 'safe', '100.000000', '75.000000'),
    ],
  }),
  aRecord({
    id: 'issued',
    kind: 'issue',
    recorded_by: 'bram',
    entries: [entry('1', 'safe', '-20.000000', '-15.000000'), entry('2', 'bench', '20.000000', '15.000000')],
  }),
  aRecord({
    id: 'taken',
    kind: 'handover_acknowledged',
    recorded_by: 'cleo',
    detail: { voucher_id: 'issued' },
  }),
  aRecord({
    id: 'wrong',
    kind: 'issue',
    recorded_by: 'bram',
    entries: [entry('1', 'safe', '-10.000000', '-7.500000'), entry('2', 'bench', '10.000000', '7.500000')],
  }),
  aRecord({
    id: 'undone',
    kind: 'reversal',
    reverses: 'wrong',
    recorded_by: 'bram',
    approved_by: 'ann',
    entries: [entry('1', 'safe', '10.000000', '7.500000'), entry('2', 'bench', '-10.000000', '-7.500000')],
  }),
  aRecord({
    id: 'closed',
    kind: 'period_closed',
    recorded_by: 'bram',
    approved_by: 'ann',
    business_date: '2026-04-01',
    recorded_at: '2026-04-01T09:00:00.000Z',
    detail: { period_id: 'march', from: '2026-03-01', to: '2026-03-31' },
  }),
  aRecord({
    id: 'april',
    kind: 'issue',
    business_date: '2026-04-02',
    recorded_at: '2026-04-02T09:00:00.000Z',
    entries: [entry('1', 'safe', '-5.000000', '-3.750000'), entry('2', 'bench', '5.000000', '3.750000')],
  }),
];

/** A dossier of these records, whole and signed. */
export function dossierOf(records: readonly ChainRecord[] = goodRecords): Files {
  const chain = chained(records);
  const files: Files = new Map();
  files.set('book.jsonl', Buffer.from(chain.map(({ line }) => `${line}\n`).join('')));
  for (const table of tablesOf(chain))
    files.set(table.path, Buffer.from(csvTable(table.columns, table.rows)));
  const papers = csvTable(['id', 'name', 'sha256'], [[PAPER.id, 'certificate.pdf', PAPER.sha256]]);
  files.set('data/documents.csv', Buffer.from(papers)).set('VERIFY.md', Buffer.from(VERIFY_GUIDE));
  const manifest = {
    format: 'grainward-dossier',
    version: '1',
    workshop: { id: 'workshop', name: 'Sorrel & Willet' },
    as_of: '2026-04-03T00:00:00.000Z',
    generated_at: '2026-04-03T00:00:00.000Z',
    generated_by: 'ann',
    software: 'Grainward 1',
    chain: { sequence: '0', hash: '0'.repeat(64) },
    earlier_heads: [],
    key_id: KEY_ID,
    files: [...files].map(([path]) => ({
      path,
      bytes: '0',
      rows: /csv$|jsonl$/.test(path) ? '0' : null,
      sha256: '0'.repeat(64),
    })),
  };
  files.set('manifest.json', Buffer.from(JSON.stringify(manifest)));
  return resign(files, SIGNING_KEY);
}
