/**
 * What the in-memory book holds, and the posting that guards it: zero sums, nothing below nothing, nothing dated
 * into a closed period, nothing posted twice. It throws where the program would have broken a rule.
 */
import type { Account } from '../../shared/book/account.ts';
import { isPlace, isWorkPlace } from '../../shared/book/account.ts';
import type { ActDraft, Detail, DocumentRef, RecordDraft, VoucherDraft } from '../../shared/book/draft.ts';
import { isBalanced } from '../../shared/book/draft.ts';
import type {
  Allowance,
  BinFeed,
  Handover,
  IdSource,
  Job,
  MetalPrice,
  Party,
  Person,
  WorkshopSettings,
} from '../../shared/book/facts.ts';
import type { Holding, JobHolding } from '../../shared/book/holding.ts';
import { BASES, LOT_FORMS, ORIGINS } from '../../shared/book/lot.ts';
import type { Lot } from '../../shared/book/lot.ts';
import { makeLotCode } from '../../shared/book/lot-code.ts';
import { Decimal } from '../../shared/decimal.ts';
import type { MassVector } from '../../shared/mass/vector.ts';
import { ZERO_MASS, addMass, fineTotal, hasNegative, isZeroMass } from '../../shared/mass/vector.ts';

export interface Posted {
  readonly sequence: bigint;
  readonly draft: RecordDraft;
  readonly recorded_by: string | null;
}

/** What mends or mirrors brings nothing anew: metal came by what came before. */
const UNDOES = ['reversal', 'correction'];

const SETTINGS: WorkshopSettings = {
  currency: 'EUR',
  time_zone: 'Europe/Berlin',
  filings_metal_permille: new Decimal(985),
  invoice_tolerance_ug: 5_000n,
  weighing_u_ug: 1_000n,
  claim_limits: [],
  acceptance: [],
};

export class BookState {
  today = '2026-05-14';
  closed_through: string | null = null;
  settings = SETTINGS;
  readonly accounts = new Map<string, Account>();
  readonly lots = new Map<string, Lot>();
  readonly people = new Map<string, Person>();
  readonly parties = new Map<string, Party>();
  readonly jobs = new Map<string, Job>();
  readonly documents = new Map<string, DocumentRef>();
  readonly handovers: Handover[] = [];
  readonly allowances: Allowance[] = [];
  readonly bin_feeds: BinFeed[] = [];
  readonly prices: MetalPrice[] = [];
  readonly records: Posted[] = [];
  readonly #holdings = new Map<string, Holding>();
  readonly #jobHoldings = new Map<string, JobHolding>();
  #serial = 0;
  #lotSerial = 0;

  readonly ids: IdSource = {
    id: () => this.newId(),
    lotCode: (letter) => makeLotCode(letter, '26', BigInt((this.#lotSerial += 1))),
  };

  newId(): string {
    this.#serial += 1;
    return `00000000-0000-4000-8000-${String(this.#serial).padStart(12, '0')}`;
  }

  account(id: string): Account {
    const account = this.accounts.get(id);
    if (account === undefined) throw new Error(`No account ${id}.`);
    return account;
  }

  lot(id: string): Lot {
    const lot = this.lots.get(id);
    if (lot === undefined) throw new Error(`No lot ${id}.`);
    return lot;
  }

  isPlace(account_id: string): boolean {
    return isPlace(this.account(account_id).kind);
  }

  held(account_id: string, lot_id: string): Holding {
    return (
      this.#holdings.get(`${account_id} ${lot_id}`) ?? { account_id, lot_id, mass: ZERO_MASS, pieces: null }
    );
  }

  /** Every holding that is not nothing, by order of accounts and lots. */
  allHoldings(): readonly Holding[] {
    const order = [...this.accounts.keys()];
    return [...this.#holdings.values()]
      .filter((h) => !isZeroMass(h.mass) || (h.pieces ?? 0n) !== 0n)
      .sort(
        (a, b) =>
          order.indexOf(a.account_id) - order.indexOf(b.account_id) || a.lot_id.localeCompare(b.lot_id),
      );
  }

  allJobHoldings(): readonly JobHolding[] {
    return [...this.#jobHoldings.values()]
      .filter((h) => !isZeroMass(h.mass))
      .map((h) => ({ ...h, came_by: this.#cameBy(h) }));
  }

  /** The last voucher that put metal there for the job and was not undone. */
  #cameBy(held: JobHolding): JobHolding['came_by'] {
    const vouchers = this.records.flatMap(({ draft }) => (draft.type === 'voucher' ? [draft] : []));
    const last = vouchers.findLast(
      (voucher) =>
        !UNDOES.includes(voucher.kind) &&
        !vouchers.some((other) => other.reverses === voucher.id) &&
        leaf(voucher.detail, 'job_id') === held.job_id &&
        voucher.entries.some(
          (entry) =>
            entry.account_id === held.account_id && entry.lot_id === held.lot_id && entry.mass.gross > 0n,
        ),
    );
    return last === undefined ? null : { kind: last.kind, operation: leaf(last.detail, 'operation') };
  }

  /** Posts records in order, all or none. Throws, naming the rule, where one of them is broken. */
  post(records: readonly RecordDraft[], recorded_by: string | null): void {
    for (const record of records) {
      this.#checkRecord(record);
      if (record.type === 'act') this.#act(record);
      else this.#voucher(record);
      this.records.push({ sequence: BigInt(this.records.length + 1), draft: record, recorded_by });
    }
  }

  #checkRecord(record: RecordDraft): void {
    if (this.records.some((known) => known.draft.id === record.id))
      throw new Error('A record was posted twice.');
    if (record.business_date > this.today) throw new Error('A record is dated ahead.');
    if (this.closed_through !== null && record.business_date <= this.closed_through) {
      throw new Error('A record enters a closed period.');
    }
    checkDetail(record.detail);
  }

  #voucher(voucher: VoucherDraft): void {
    if (!isBalanced(voucher.entries)) throw new Error(`A ${voucher.kind} does not sum to nothing.`);
    const before = voucher.reverses;
    if (
      before !== null &&
      this.records.some((r) => r.draft.type === 'voucher' && r.draft.reverses === before)
    ) {
      throw new Error('A voucher was reversed twice.');
    }
    this.#checkOwners(voucher);
    const voucherJob = typeof voucher.detail.job_id === 'string' ? voucher.detail.job_id : null;
    const kept = keptLots(voucher.detail);
    for (const entry of voucher.entries) {
      if (isZeroMass(entry.mass) && (entry.pieces ?? 0n) === 0n) throw new Error('An entry moves nothing.');
      const account = this.account(entry.account_id);
      this.lot(entry.lot_id);
      const key = `${entry.account_id} ${entry.lot_id}`;
      this.#holdings.set(key, added(this.held(entry.account_id, entry.lot_id), entry));
      if (!isWorkPlace(account.kind)) continue;
      const job_id = kept.has(entry.lot_id) ? null : voucherJob;
      const jobKey = `${key} ${job_id ?? ''}`;
      const blank = {
        account_id: entry.account_id,
        lot_id: entry.lot_id,
        mass: ZERO_MASS,
        pieces: null,
        job_id,
        came_by: null,
      };
      const known = this.#jobHoldings.get(jobKey) ?? blank;
      this.#jobHoldings.set(jobKey, { ...blank, ...added(known, entry) });
    }
    for (const entry of voucher.entries) this.#checkPlace(entry.account_id, entry.lot_id, voucher);
    for (const entry of voucher.entries) this.#checkDays(entry.account_id, entry.lot_id, voucher);
  }

  /** Metal of one owner stays that owner's, but for ownership vouchers and what mends or mirrors one. */
  #checkOwners(voucher: VoucherDraft): void {
    if (['ownership', 'reversal', 'correction'].includes(voucher.kind)) return;
    const sums = new Map<string, bigint>();
    for (const entry of voucher.entries) {
      const owner = this.lot(entry.lot_id).owner_id ?? 'house';
      sums.set(owner, (sums.get(owner) ?? 0n) + fineTotal(entry.mass));
    }
    for (const [owner, sum] of sums) {
      if (sum !== 0n)
        throw new Error(`A ${voucher.kind} changes what ${owner} owns without an ownership voucher.`);
    }
  }

  #checkPlace(account_id: string, lot_id: string, voucher: VoucherDraft): void {
    if (!this.isPlace(account_id)) return;
    const { mass, pieces } = this.held(account_id, lot_id);
    const where = `${this.account(account_id).name}, ${this.lot(lot_id).description}, by a ${voucher.kind}`;
    if (hasNegative(mass) || (pieces ?? 0n) < 0n)
      throw new Error(`A place holds less than nothing: ${where}.`);
    if (fineTotal(mass) > mass.gross) throw new Error(`A place holds more fine metal than gross: ${where}.`);
  }

  /** No business day may end with less than nothing: only a voucher dated back can bring that about. */
  #checkDays(account_id: string, lot_id: string, voucher: VoucherDraft): void {
    if (!this.isPlace(account_id) || voucher.business_date === this.today) return;
    const drafts = [...this.records.map((record) => record.draft), voucher];
    const days = new Set(drafts.map((draft) => draft.business_date));
    for (const day of days) {
      const closing = drafts
        .filter((draft) => draft.type === 'voucher' && draft.business_date <= day)
        .flatMap((draft) => (draft.type === 'voucher' ? draft.entries : []))
        .filter((entry) => entry.account_id === account_id && entry.lot_id === lot_id)
        .reduce((sum, entry) => addMass(sum, entry.mass), ZERO_MASS);
      if (hasNegative(closing)) throw new Error(`${day} ends with less than nothing in a place.`);
    }
  }

  #act(act: ActDraft): void {
    if (act.kind === 'lot_described') this.#describe(act.detail);
    if (act.kind === 'lot_held') {
      const lot = this.lot(text(act.detail, 'lot_id'));
      const until = leaf(act.detail, 'until');
      this.lots.set(lot.id, {
        ...lot,
        standing: 'on_hold',
        hold_reason: leaf(act.detail, 'reason'),
        hold_until: until,
      });
    }
    if (act.kind === 'lot_released') {
      const lot = this.lot(text(act.detail, 'lot_id'));
      this.lots.set(lot.id, { ...lot, standing: 'released', hold_reason: null, hold_until: null });
    }
    if (act.kind === 'handover_acknowledged') this.#handover(act.detail, 'acknowledged');
    if (act.kind === 'handover_disputed') this.#handover(act.detail, 'disputed');
  }

  #handover(detail: Detail, state: Handover['state']): void {
    const at = this.handovers.findIndex((h) => h.id === text(detail, 'handover_id'));
    const known = this.handovers[at];
    if (known === undefined) throw new Error('An act names a handover that is not in the book.');
    this.handovers[at] = { ...known, state };
  }

  #describe(detail: Detail): void {
    const id = text(detail, 'lot_id');
    if (this.lots.has(id)) throw new Error('A lot was described twice.');
    if ([...this.lots.values()].some((lot) => lot.code === text(detail, 'code')))
      throw new Error('A lot code was used twice.');
    this.lots.set(id, {
      id,
      code: text(detail, 'code'),
      form: oneOf(LOT_FORMS, text(detail, 'form')),
      alloy: leaf(detail, 'alloy'),
      owner_id: leaf(detail, 'owner_id'),
      origin: oneOf(ORIGINS, text(detail, 'origin')),
      gold_permille: new Decimal(text(detail, 'gold_permille')),
      silver_permille: new Decimal(text(detail, 'silver_permille')),
      platinum_permille: new Decimal(text(detail, 'platinum_permille')),
      palladium_permille: new Decimal(text(detail, 'palladium_permille')),
      basis: oneOf(BASES, text(detail, 'basis')),
      standing: oneOf(['on_hold', 'released'] as const, text(detail, 'standing')),
      hold_reason: leaf(detail, 'hold_reason'),
      hold_until: leaf(detail, 'hold_until'),
      description: text(detail, 'description'),
    });
  }
}

function added(
  holding: Holding,
  entry: { readonly mass: MassVector; readonly pieces: bigint | null },
): Holding {
  const counted = holding.pieces !== null || entry.pieces !== null;
  const pieces = counted ? (holding.pieces ?? 0n) + (entry.pieces ?? 0n) : null;
  return { ...holding, mass: addMass(holding.mass, entry.mass), pieces };
}

function leaf(detail: Detail, key: string): string | null {
  const value = detail[key];
  return typeof value === 'string' ? value : null;
}

function text(detail: Detail, key: string): string {
  const value = leaf(detail, key);
  if (value === null) throw new Error(`A record's detail lacks ${key}.`);
  return value;
}

function oneOf<T extends string>(list: readonly T[], value: string): T {
  const found = list.find((item) => item === value);
  if (found === undefined) throw new Error(`"${value}" is not one of ${list.join(', ')}.`);
  return found;
}

/** Leaves are text or null, lists are flat, masses carry six decimals. */
function checkDetail(detail: Detail): void {
  for (const [key, value] of Object.entries(detail)) {
    if (key.endsWith('_g') && typeof value === 'string' && !/^-?\d+\.\d{6}$/.test(value)) {
      throw new Error(`detail.${key} is "${value}", which is not grams with six decimals.`);
    }
    if (!Array.isArray(value)) continue;
    for (const row of value) {
      const leaves: unknown[] = row !== null && typeof row === 'object' ? Object.values(row) : [row];
      if (leaves.some((item) => item !== null && typeof item !== 'string')) {
        throw new Error(`detail.${key} is nested deeper than a flat list.`);
      }
    }
  }
}

/** Lots that a bench keeps for several jobs: what is used of them leaves the share of none. */
function keptLots(detail: Detail): ReadonlySet<string> {
  const rows = Array.isArray(detail.kept) ? detail.kept : [];
  return new Set(
    rows.flatMap((row: unknown) =>
      typeof row === 'object' && row !== null && 'lot_id' in row && typeof row.lot_id === 'string'
        ? [row.lot_id]
        : [],
    ),
  );
}
