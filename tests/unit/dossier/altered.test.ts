/**
 * A book altered in each way of FAULTS E-06 and E-08, its tables made anew and signed again with the right key: the
 * check fails and names the record.
 */
import { describe, expect, it } from 'vitest';
import type { ChainRecord } from '../../../shared/chain/record-line.ts';
import { SIGNING_KEY, aRecord, dossierOf, entry, goodRecords } from '../../support/dossier-book.ts';
import { chained, failures, linesOf, resign, withBook } from '../../support/dossier-files.ts';

const files = dossierOf();
const textOf = (path: string) => Buffer.from(files.get(path) ?? []).toString('utf8');
const place = (id: string) => goodRecords.findIndex((record) => record.id === id);
const numberOf = (id: string) => place(id) + 1;

/** The failures of a book with one record changed and all chained, tabled and signed anew. */
const withChange = (id: string, change: Partial<ChainRecord>) =>
  failures(dossierOf(goodRecords.map((record) => (record.id === id ? { ...record, ...change } : record))));

/** The failures of a book with a record more before another, or at its end. */
const withMore = (more: ChainRecord, before?: string) => {
  const at = before === undefined ? goodRecords.length : place(before);
  return failures(dossierOf([...goodRecords.slice(0, at), more, ...goodRecords.slice(at)]));
};
const withLines = (lines: readonly string[]) => failures(resign(withBook(files, lines), SIGNING_KEY));
const later = { business_date: '2026-04-02', recorded_at: '2026-04-02T10:00:00.000Z' };

describe('the chain', () => {
  const lines = linesOf(files);
  const [first = '', second = ''] = lines.slice(4, 6);

  it('with a gap names the record where it is', async () => {
    const { chain } = await withLines([...lines.slice(0, 4), ...lines.slice(5)]);
    expect(chain?.slice(0, 2)).toEqual([
      'Record 6 stands where 5 belongs: a record is missing, twice, or moved.',
      'Record 5 does not carry the hash of the record before it.',
    ]);
  });

  it('with two records swapped names the first', async () => {
    const { chain } = await withLines([...lines.slice(0, 4), second, first, ...lines.slice(6)]);
    expect(chain?.[0]).toBe('Record 6 stands where 5 belongs: a record is missing, twice, or moved.');
  });

  it('with a record twice names it', async () => {
    const { chain } = await withLines([...lines.slice(0, 5), first, ...lines.slice(5)]);
    expect(chain).toContain('Record 6 has the id of an earlier one.');
  });

  it('with a record twice under a new number and all chained anew names it', async () => {
    const { chain } = await withMore(aRecord({ ...goodRecords[4], id: 'open-safe', kind: 'account_opened' }));
    expect(chain).toEqual([`Record ${goodRecords.length + 1} has the id of an earlier one.`]);
  });

  it('with a record of another workshop put in names it', async () => {
    const foreign = chained([aRecord({ id: 'foreign', kind: 'job_opened' })])[0]?.line ?? '';
    const { chain } = await withLines([...lines.slice(0, 4), foreign, ...lines.slice(4)]);
    expect(chain?.[0]).toBe('Record 1 stands where 5 belongs: a record is missing, twice, or moved.');
  });

  it('with a record of another workshop chained in finds that nobody here had a role for it', async () => {
    const foreign = aRecord({ id: 'foreign', kind: 'job_opened', recorded_by: 'stranger' });
    expect((await withMore(foreign, 'came'))['signatories']).toEqual([
      `Record ${numberOf('came')} was recorded by somebody who had no role here then.`,
    ]);
  });

  it('with a line that is not canonical names it', async () => {
    const { chain } = await withLines(lines.map((line, at) => (at === 3 ? line.replace(',', ', ') : line)));
    expect(chain?.[0]).toBe('Line 4 is not a record in canonical form.');
  });

  it('with a byte order mark or without its last line feed is found out', async () => {
    const marked = new Map(files).set('book.jsonl', Buffer.from(`\ufeff${textOf('book.jsonl')}`));
    expect((await failures(resign(marked, SIGNING_KEY)))['chain']?.[0]).toContain('Line 1 is not a record');
    const cut = new Map(files).set('book.jsonl', Buffer.from(textOf('book.jsonl').slice(0, -1)));
    expect((await failures(resign(cut, SIGNING_KEY)))['chain']?.[0]).toContain('The last line is not ended');
  });

  it('shortened, or rewritten, is found out by a head that the reader brings', async () => {
    const last = chained(goodRecords).at(-1);
    const head = { sequence: last?.record.sequence ?? '', hash: last?.hash ?? '' };
    const outside = { key_ids: [], heads: [head] };
    const shorter = dossierOf(goodRecords.slice(0, -1));
    expect(await failures(shorter)).toEqual({});
    expect((await failures(shorter, outside))['heads']?.[0]).toContain('it was shortened');
    const rewritten = dossierOf(
      goodRecords.map((each) => (each.id === 'april' ? { ...each, note: 'x' } : each)),
    );
    expect((await failures(rewritten, outside))['heads']?.[0]).toContain('the book was rewritten');
  });

  it('rewritten before a dossier that it names itself is found out without any head', async () => {
    const head = chained(goodRecords).at(-1);
    const detail = { sequence: head?.record.sequence ?? '', hash: head?.hash ?? '', to: null };
    const made = aRecord({ id: 'made', kind: 'dossier_made', recorded_by: 'dora', ...later, detail });
    expect(await withMore(made)).toEqual({});
    const rewritten = goodRecords.map((each) => (each.id === 'price' ? { ...each, note: 'x' } : each));
    expect((await failures(dossierOf([...rewritten, made])))['named_heads']?.[0]).toContain(
      `Record ${goodRecords.length + 1} says that a dossier ended at record ${goodRecords.length}`,
    );
  });
});

describe('a voucher', () => {
  it.each(['gross_g', 'gold_g', 'silver_g', 'platinum_g', 'palladium_g'] as const)(
    'whose %s does not sum to nothing is named',
    async (mass) => {
      const [from, to] = goodRecords[place('came')]?.entries ?? [];
      if (from === undefined || to === undefined) throw new Error('the good book has a weigh-in');
      const entries = [from, { ...to, [mass]: '76.000000' }];
      expect((await withChange('came', { entries }))['sums']).toEqual([
        `Voucher ${numberOf('came')} does not sum to nothing.`,
      ]);
    },
  );

  it('with one entry, or an act with some, is named', async () => {
    const nothing = entry('1', 'safe', '0.000000', '0.000000');
    expect((await withChange('april', { entries: [nothing] }))['sums']).toEqual([
      `Voucher ${numberOf('april')} has fewer than two entries.`,
    ]);
    expect((await withChange('price', { entries: [nothing, nothing] }))['sums']).toEqual([
      `Record ${numberOf('price')} is an act and has entries.`,
    ]);
  });

  it('that takes more than a place holds is named', async () => {
    const entries = [
      entry('1', 'safe', '-80.000001', '-60.000000'),
      entry('2', 'bench', '80.000001', '60.000000'),
    ];
    expect((await withChange('april', { entries }))['places']?.[0]).toBe(
      `After voucher ${numberOf('april')} Safe holds less than nothing of a lot, or more fine metal than gross.`,
    );
  });

  it('dated back so that a day ends below nothing is named, though no moment of recording was', async () => {
    const back = (business_date: string) => withChange('issued', { business_date });
    expect((await back('2026-02-28'))['places']).toEqual([
      '2026-02-28 ends with less than nothing of a lot at Safe.',
    ]);
  });

  it('of an account that was opened after it, or a lot never described, is named', async () => {
    const bin = aRecord({
      id: 'open-bin',
      kind: 'account_opened',
      detail: { account_id: 'bin', kind: 'bin', name: 'Bin', custodian_id: null },
      ...later,
    });
    const entries = [entry('1', 'safe', '-5.000000', '-3.750000'), entry('2', 'bin', '5.000000', '3.750000')];
    const records = goodRecords.map((record) => (record.id === 'april' ? { ...record, entries } : record));
    expect((await failures(dossierOf([...records, bin])))['registers']).toEqual([
      `Voucher ${numberOf('april')} names an account that was not opened before it.`,
    ]);
    const other = entries.map((line) => ({ ...line, lot_id: 'other', account_id: 'supplier' }));
    expect((await withChange('april', { entries: other }))['registers']).toEqual([
      `Voucher ${numberOf('april')} names a lot that was not described before it.`,
    ]);
  });
});

describe('a register', () => {
  it('in which a place is opened again as something that may fall below nothing is found out', async () => {
    const again = aRecord({
      id: 'again',
      kind: 'account_opened',
      detail: { account_id: 'safe', kind: 'customer', name: 'Safe', custodian_id: null },
      ...later,
    });
    expect((await withMore(again))['registers']).toEqual([
      `Record ${goodRecords.length + 1} opens an account that is open already.`,
    ]);
  });

  it('in which a lot is described again is found out', async () => {
    const described = goodRecords[place('lot-described')];
    const again = aRecord({ id: 'again', kind: 'lot_described', ...later, detail: described?.detail ?? {} });
    expect((await withMore(again))['registers']?.[0]).toContain('describes a lot that is described already');
  });
});

describe('a reversal', () => {
  it('that is no exact mirror is named', async () => {
    const entries = [
      entry('1', 'safe', '9.000000', '7.500000'),
      entry('2', 'bench', '-9.000000', '-7.500000'),
    ];
    expect((await withChange('undone', { entries }))['reversals']).toEqual([
      `Voucher ${numberOf('undone')} is not the exact mirror of voucher ${numberOf('wrong')}.`,
    ]);
  });

  it('of what was reversed before is named', async () => {
    const again = aRecord({ ...goodRecords[place('undone')], id: 'again', kind: 'reversal', ...later });
    expect((await withMore(again))['reversals']).toEqual([
      `Voucher ${goodRecords.length + 1} reverses voucher ${numberOf('wrong')}, which was reversed already.`,
    ]);
  });

  it.each(['undone', 'price', 'april', 'nothing'])(
    'of %s, which stands not before it as a voucher, is named',
    async (reverses) => {
      expect((await withChange('undone', { reverses }))['reversals']).toEqual([
        `Voucher ${numberOf('undone')} reverses nothing that stands before it.`,
      ]);
    },
  );
});

describe('a closed period', () => {
  it('that something entered is named with the record', async () => {
    expect((await withChange('april', { business_date: '2026-03-31' }))['periods']).toEqual([
      `Record ${numberOf('april')} enters 2026-03-31, which was closed.`,
    ]);
  });

  it('takes vouchers again once two people have opened it', async () => {
    const opened = aRecord({
      id: 'opened',
      kind: 'period_reopened',
      approved_by: 'bram',
      business_date: '2026-04-01',
      recorded_at: '2026-04-01T10:00:00.000Z',
      detail: { period_id: 'march', reason: 'A paper came late.' },
    });
    const late = { business_date: '2026-03-31' };
    const records = goodRecords.map((record) => (record.id === 'april' ? { ...record, ...late } : record));
    const at = place('april');
    expect(await failures(dossierOf([...records.slice(0, at), opened, ...records.slice(at)]))).toEqual({});
  });
});

describe('who signed', () => {
  it.each([
    ['approved by who recorded it', { approved_by: 'bram' }, 'was approved by who recorded it'],
    ['with one signature', { approved_by: null }, 'carries one signature where two are asked for'],
    [
      'approved by a goldsmith',
      { approved_by: 'cleo' },
      'was approved by somebody who had no right to sign then',
    ],
    [
      'approved by a stranger',
      { approved_by: 'nobody' },
      'was approved by somebody who had no right to sign then',
    ],
    [
      'recorded by a goldsmith',
      { recorded_by: 'cleo' },
      'was recorded by a goldsmith, who has no right to it',
    ],
    ['recorded by an auditor', { recorded_by: 'dora' }, 'was recorded by an auditor, who has no right to it'],
    [
      'recorded by a stranger',
      { recorded_by: 'nobody' },
      'was recorded by somebody who had no role here then',
    ],
  ])('a reversal %s is named', async (_what, change, sentence) => {
    const { signatories } = await withChange('undone', change);
    expect(signatories).toHaveLength(1);
    expect(signatories?.[0]).toContain(`Record ${numberOf('undone')} `);
    expect(signatories?.[0]).toContain(sentence);
  });

  it('alone holds where the record is marked single-handed', async () => {
    expect(await withChange('undone', { approved_by: 'bram', detail: { single_handed: 'yes' } })).toEqual({});
  });

  it('gave himself the keys as a keeper is named', async () => {
    expect((await withChange('role-cleo', { recorded_by: 'bram' }))['signatories']?.[0]).toContain(
      `Record ${numberOf('role-cleo')} (role_given) was recorded by a keeper, who has no right to it.`,
    );
  });

  it('after the role had ended, or its last day had passed, is named', async () => {
    const ended = aRecord({ id: 'ended', kind: 'role_ended', detail: { person_id: 'bram' } });
    expect((await withMore(ended, 'wrong'))['signatories']?.[0]).toBe(
      `Record ${numberOf('wrong') + 1} was recorded by somebody who had no role here then.`,
    );
    const until = (day: string) =>
      withChange('role-bram', { detail: { person_id: 'bram', name: 'Bram', role: 'keeper', until: day } });
    expect(await until('2026-04-01')).toEqual({});
    expect((await until('2026-03-30'))['signatories']).toEqual([
      `Record ${numberOf('closed')} was recorded by somebody who had no role here then.`,
    ]);
  });

  it('a kind that no book has is named', async () => {
    expect((await withChange('price', { kind: 'gift' }))['signatories']?.[0]).toContain(
      'of a kind that this book',
    );
  });
});

describe('time', () => {
  it('that runs back is named', async () => {
    expect((await withChange('april', { recorded_at: '2026-03-31T23:59:59.999Z' }))['time']).toEqual([
      `Record ${numberOf('april')} was recorded before the one it follows.`,
    ]);
  });
});
