/**
 * A dossier out of a real book: it verifies with openssl, it is recomputed by a program that shares no code with ours,
 * and altered in each way (signed again with the right key) it fails, naming the record (FAULTS E-01 to E-08).
 */
import { execFileSync } from 'node:child_process';
import { createHash, generateKeyPairSync } from 'node:crypto';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { chainRecord } from '../../shared/chain/record-line.ts';
import { readCsv } from '../../shared/dossier/csv.ts';
import { manifestSchema } from '../../shared/dossier/manifest.ts';
import { verifyDossier } from '../../shared/dossier/verify.ts';
import { nodeCrypto } from '../../server/cli/node-crypto.ts';
import { takeDossier } from '../support/dossier.ts';
import type { Files } from '../support/dossier-files.ts';
import { failures, forge, linesOf, rechain, resign, withBook } from '../support/dossier-files.ts';
import { recompute } from '../support/recompute.ts';
import type { Person, TestServer } from '../support/server.ts';
import { addMember, signUp, startTestServer } from '../support/server.ts';
import { httpWorkshop } from '../support/workshop-http.ts';

let server: TestServer;
let owner: Person;
let keeper: Person;
let files: Files;
let zip: Buffer;

beforeAll(async () => {
  server = await startTestServer();
  owner = await signUp(server);
  keeper = await addMember(server, owner, 'keeper', '=Bram Willet');
  const shop = httpWorkshop(owner);
  const safe = await shop.account('safe');
  const supplier = await shop.party('supplier', '=cmd|Brackwater, "semi-finished"');
  const bench = await shop.openPlace('bench', 'Bench 1', await shop.person('=Bram Willet'));
  const line = {
    form: 'sheet',
    description: '-750 yellow sheet',
    basis: 'certificate',
    gold_permille: '750',
    weighing: { gross_g: '100.000' },
  };
  const came = await owner.record('weigh-in', { party_id: supplier, safe_id: safe, lines: [line] });
  const lot_id = came.lots[0]?.id ?? '';
  const issue = (gross_g: string) =>
    owner.record('issue', {
      from_id: safe,
      to_id: bench,
      lot_id,
      operation: 'sheet_work',
      amount: { how: 'weighed', weighing: { gross_g } },
    });
  await issue('20.000');
  const wrong = await issue('10.000');
  const asked = await owner.event('reversal', {
    voucher_id: wrong.records.at(-1)?.id,
    reason: 'Wrong bench.',
  });
  const signed = await keeper.post(`/signature-requests/${asked.body.signature_request_id}/approve`);
  if (signed.status !== 201) throw new Error(JSON.stringify(signed.body));
  await takeDossier(server, owner);
  ({ zip, files } = await takeDossier(server, owner));
});
afterAll(() => server.close());

const again = (altered: Files) => failures(resign(altered, server.config.signing_key_pem));
const indexOf = (kind: string) => linesOf(files).findIndex((line) => line.includes(`"kind":"${kind}"`));
const sequenceOf = (kind: string) => String(indexOf(kind) + 1);

describe('a good dossier', () => {
  it('holds in every check, and says that its own key and heads prove nothing', async () => {
    const { checks, exit_code } = await verifyDossier(files, { key_ids: [], heads: [] }, nodeCrypto);
    expect(checks.filter(({ verdict }) => verdict === 'fails')).toEqual([]);
    expect(checks.filter(({ verdict }) => verdict === 'cannot_be_shown').map(({ id }) => id)).toEqual([
      'key',
      'heads',
    ]);
    expect(exit_code).toBe(0);
  });

  it('verifies with openssl alone', () => {
    const dir = mkdtempSync(join(tmpdir(), 'dossier-'));
    for (const name of ['manifest.json', 'manifest.sig', 'public-key.pem'])
      writeFileSync(join(dir, name), files.get(name) ?? '');
    const args = [
      'pkeyutl',
      '-verify',
      '-pubin',
      '-inkey',
      'public-key.pem',
      '-rawin',
      '-in',
      'manifest.json',
      '-sigfile',
      'manifest.sig',
    ];
    expect(execFileSync('openssl', args, { cwd: dir, encoding: 'utf8' })).toContain(
      'Signature Verified Successfully',
    );
  });

  it('is recomputed from its lines by plain arithmetic: hashes, links and holdings', () => {
    const found = recompute(files.get('book.jsonl') ?? new Uint8Array());
    expect([found.broken_at, found.unbalanced]).toEqual([null, []]);
    expect(found.holdings.length).toBeGreaterThan(2);
    const rows = readCsv(Buffer.from(files.get('data/holdings.csv') ?? []).toString('utf8')).slice(1);
    const printed = rows.map((row) =>
      [...row.slice(0, 2), ...row.slice(2, 7).map((mass) => BigInt(mass.replace('.', '')))].join(','),
    );
    expect(printed.sort()).toEqual(found.holdings);
  });

  it('neutralises what a spreadsheet would run, and leaves figures plain', () => {
    const accounts = Buffer.from(files.get('data/accounts.csv') ?? []).toString('utf8');
    expect(accounts).toContain(`"'=cmd|Brackwater, ""semi-finished"""`);
    expect(Buffer.from(files.get('data/entries.csv') ?? []).toString('utf8')).toMatch(
      /,-100\.000000,-75\.000000,/,
    );
  });

  it('names the head of the dossier that was made before it', async () => {
    const manifest = manifestSchema.parse(
      JSON.parse(Buffer.from(files.get('manifest.json') ?? []).toString('utf8')),
    );
    const [head] = manifest.earlier_heads;
    expect(manifest.earlier_heads).toHaveLength(1);
    expect(await failures(files, { key_ids: [], heads: head === undefined ? [] : [head] })).toEqual({});
  });

  it('is checked by the command, which ends with 0, 1 or 2', () => {
    const path = join(mkdtempSync(join(tmpdir(), 'dossier-')), 'dossier.zip');
    writeFileSync(path, zip);
    const verify = (...args: string[]) =>
      execFileSync('node_modules/.bin/tsx', ['server/cli/verify-dossier.ts', ...args], {
        encoding: 'utf8',
        stdio: 'pipe',
      });
    expect(verify(path)).toContain('holds');
    expect(() => verify(path, '--head', `1:${'0'.repeat(64)}`)).toThrow(
      expect.objectContaining({ status: 1 }),
    );
    expect(() => verify('package.json')).toThrow(expect.objectContaining({ status: 2 }));
  });
});

describe('an altered dossier, signed again with the right key', () => {
  const records = () => linesOf(files).map((line) => chainRecord.parse(JSON.parse(line)));

  it('cut short, is found out by an earlier head from outside', async () => {
    const head = {
      sequence: String(records().length),
      hash: createHash('sha256')
        .update(linesOf(files).at(-1) ?? '')
        .digest('hex'),
    };
    const cut = resign(rechain(files, records().slice(0, -2)), server.config.signing_key_pem);
    expect((await failures(cut, { key_ids: [], heads: [head] }))['heads']).toEqual([
      `The book ends before record ${head.sequence}, which you have seen: it was shortened.`,
    ]);
  });

  it('with a record left out, twice, or moved, breaks the chain there', async () => {
    const lines = linesOf(files);
    const gap = [...lines.slice(0, 9), ...lines.slice(10)];
    const twice = [...lines.slice(0, 9), lines[8] ?? '', ...lines.slice(9)];
    const swapped = [...lines.slice(0, 9), lines[10] ?? '', lines[9] ?? '', ...lines.slice(11)];
    for (const altered of [gap, twice, swapped])
      expect((await again(withBook(files, altered)))['chain']?.[0]).toContain('10');
  });

  it('with a mass changed and everything chained anew, does not sum to nothing', async () => {
    const at = indexOf('weigh_in');
    const altered = forge(files, at, (record) => ({
      ...record,
      entries: record.entries.map((entry, index) =>
        index === 1 ? { ...entry, gold_g: '74.000000' } : entry,
      ),
    }));
    expect((await again(altered))['sums']).toEqual([`Voucher ${at + 1} does not sum to nothing.`]);
  });

  it('with more issued than there was, finds the place below nothing', async () => {
    const at = indexOf('issue');
    const more = (text: string) => text.replace('20.000000', '200.000000').replace('15.000000', '150.000000');
    const altered = forge(files, at, (record) => ({
      ...record,
      entries: record.entries.map((entry) => ({
        ...entry,
        gross_g: more(entry.gross_g),
        gold_g: more(entry.gold_g),
      })),
    }));
    expect((await again(altered))['places']?.[0]).toContain(
      `After voucher ${at + 1} Safe holds less than nothing`,
    );
  });

  it('with a reversal that is no mirror, or used twice, says so', async () => {
    const at = indexOf('reversal');
    const bent = forge(files, at, (record) => ({
      ...record,
      entries: record.entries.map((entry) => ({
        ...entry,
        gross_g: entry.gross_g.replace('10.000000', '9.000000'),
      })),
    }));
    expect((await again(bent))['reversals']?.[0]).toContain(`Voucher ${at + 1} is not the exact mirror`);
    const all = records();
    const [reversal] = all.slice(at, at + 1);
    const twice = rechain(
      files,
      reversal === undefined
        ? all
        : [
            ...all,
            {
              ...reversal,
              id: '00000000-0000-4000-8000-000000000001',
              recorded_at: all.at(-1)?.recorded_at ?? '',
            },
          ],
    );
    expect((await again(twice))['reversals']?.[0]).toContain('which was reversed already');
  });

  it('with a voucher in a closed period, says so', async () => {
    const all = records();
    const at = indexOf('issue');
    const closing = {
      ...(all[at] ?? all[0]),
      kind: 'period_closed',
      entries: [],
      id: '00000000-0000-4000-8000-000000000002',
      business_date: '2099-01-01',
      detail: { period_id: 'p', from: '2000-01-01', to: '2098-12-31' },
      approved_by: null,
    };
    const altered = rechain(files, [...all.slice(0, at), chainRecord.parse(closing), ...all.slice(at)]);
    expect((await again(altered))['periods']?.[0]).toContain('which was closed');
  });

  it('approved by who recorded it, or recorded by somebody without a role, says so', async () => {
    const own = forge(files, indexOf('reversal'), (record) => ({
      ...record,
      approved_by: record.recorded_by,
    }));
    expect((await again(own))['signatories']).toEqual([
      `Record ${sequenceOf('reversal')} was approved by who recorded it.`,
    ]);
    const stranger = forge(files, indexOf('issue'), (record) => ({
      ...record,
      recorded_by: '00000000-0000-4000-8000-00000000000f',
    }));
    expect((await again(stranger))['signatories']?.[0]).toContain('by somebody who had no role here then');
    const one = forge(files, indexOf('reversal'), (record) => ({ ...record, approved_by: null }));
    expect((await again(one))['signatories']?.[0]).toContain('carries one signature where two are asked for');
  });

  it('with a table that the chain does not give, names the row', async () => {
    const text = Buffer.from(files.get('data/holdings.csv') ?? []).toString('utf8');
    const altered = new Map(files).set(
      'data/holdings.csv',
      Buffer.from(text.replace('80.000000', '80.000001')),
    );
    expect((await again(altered))['tables']?.[0]).toContain('data/holdings.csv is not what the chain gives');
  });

  it('with a file that is not listed, or of another size, names the file', async () => {
    expect((await failures(new Map(files).set('data/extra.csv', Buffer.from('x'))))['files']).toEqual([
      'data/extra.csv is not listed. It is no part of the dossier.',
    ]);
    expect((await failures(new Map(files).set('VERIFY.md', Buffer.from('x'))))['files']?.[0]).toContain(
      'VERIFY.md has 1 bytes',
    );
  });

  it('signed with another key, fails against the fingerprint from outside', async () => {
    const { privateKey } = generateKeyPairSync('ed25519');
    const known = await nodeCrypto.keyId(Buffer.from(files.get('public-key.pem') ?? []).toString('utf8'));
    const other = resign(files, privateKey.export({ type: 'pkcs8', format: 'pem' }).toString());
    const found = await failures(other, { key_ids: [known ?? ''], heads: [] });
    expect(found['signature']).toEqual([
      'The key that lies beside the manifest is not the one that it names.',
    ]);
    expect(found['key']).toEqual(['The fingerprint is none of those that you brought.']);
  });

  it('without its book can’t be read', async () => {
    const without = new Map(files);
    without.delete('book.jsonl');
    expect((await verifyDossier(without, { key_ids: [], heads: [] }, nodeCrypto)).exit_code).toBe(2);
  });
});
