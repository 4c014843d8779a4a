/**
 * A book in memory, for tests that read as a day at the counter: name the people and places, put metal there, run
 * events, read the ledger. It posts what events draft under the same rules that the database holds (DESIGN
 * section 2) and refuses to show an event more facts than it asked for. It is no database: the rules themselves are
 * attacked in `tests/database`.
 */
import type { Account, AccountKind } from '../../shared/book/account.ts';
import { describeLot, codeLetter } from '../../shared/book/describe-lot.ts';
import type { RecordDraft, Refusal, VoucherDraft } from '../../shared/book/draft.ts';
import type { Facts, Job, Party, Person, WorkshopSettings } from '../../shared/book/facts.ts';
import type { Lot, LotForm } from '../../shared/book/lot.ts';
import { Decimal } from '../../shared/decimal.ts';
import type { Actor, EventDefinition, EventDraft } from '../../shared/events/definition.ts';
import { massFromFineness } from '../../shared/mass/apportion.ts';
import type { MassVector } from '../../shared/mass/vector.ts';
import { METALS, ZERO_MASS, addMass, negateMass } from '../../shared/mass/vector.ts';
import { fineness } from '../../shared/alloy/fineness.ts';
import { BookState } from './book-state.ts';
import { factsFor } from './book-facts.ts';
import { parseTestGrams, shortGrams } from './grams.ts';

export interface PutLot {
  readonly form?: LotForm;
  readonly alloy?: string | null;
  readonly owner_id?: string | null;
  readonly gold?: string;
  readonly silver?: string;
  readonly platinum?: string;
  readonly palladium?: string;
  readonly pieces?: bigint;
  readonly job_id?: string;
  readonly basis?: Lot['basis'];
  readonly origin?: Lot['origin'];
  readonly hold_reason?: string | null;
}

export class Book {
  readonly state = new BookState();

  /** Today's business date. */
  get today(): string {
    return this.state.today;
  }

  set today(date: string) {
    this.state.today = date;
  }

  /** Closes every day up to and with a date. */
  closeThrough(date: string): void {
    this.state.closed_through = date;
  }

  set(settings: Partial<WorkshopSettings>): void {
    this.state.settings = { ...this.state.settings, ...settings };
  }

  person(name: string, role: Person['role']): Actor {
    const person: Person = { id: this.state.newId(), name, role, active: true };
    this.state.people.set(person.id, person);
    return { person_id: person.id, role };
  }

  /** Opens an account and gives its id. */
  account(kind: AccountKind, name: string, more: Partial<Account> = {}): string {
    const blank = { custodian_id: null, party_id: null, operation: null, closed: false };
    const account: Account = { id: this.state.newId(), kind, name, ...blank, ...more };
    this.state.accounts.set(account.id, account);
    return account.id;
  }

  place(
    kind: AccountKind,
    name: string,
    custodian: Actor | null = null,
    more: Partial<Account> = {},
  ): string {
    return this.account(kind, name, { custodian_id: custodian?.person_id ?? null, ...more });
  }

  /** Changes an account (closes it, gives it another custodian). */
  change(account_id: string, more: Partial<Account>): void {
    this.state.accounts.set(account_id, { ...this.state.account(account_id), ...more });
  }

  /** Enters a party and, for a supplier or customer, the account of that kind. */
  party(kind: Party['kind'], name: string): string {
    const party: Party = { id: this.state.newId(), kind, name };
    this.state.parties.set(party.id, party);
    if (kind === 'supplier' || kind === 'customer') this.account(kind, name, { party_id: party.id });
    return party.id;
  }

  job(title: string, customer_id: string | null = null): string {
    const serial = this.state.jobs.size + 1;
    const job: Job = { id: this.state.newId(), code: `J26-${serial}`, title, customer_id };
    this.state.jobs.set(job.id, job);
    return job.id;
  }

  document(): string {
    const id = this.state.newId();
    this.state.documents.set(id, { id, sha256: id.replaceAll('-', '').padEnd(64, '0') });
    return id;
  }

  /** Id of the one account of a kind, or of a kind and operation or party. */
  find(kind: AccountKind, which: string | null = null): string {
    for (const account of this.state.accounts.values()) {
      const fits = which === null || account.operation === which || account.party_id === which;
      if (account.kind === kind && fits) return account.id;
    }
    throw new Error(`The test's book has no account ${kind} ${which ?? ''}.`);
  }

  /** Puts a new lot into a place from opening stock, as found there before the book began; gives its id. */
  put(place_id: string, words: string, grams: string, as: PutLot = {}): string {
    const described = this.#describe(words, as);
    const mass = massFromFineness(parseTestGrams(grams), described.lot.fineness);
    this.state.post([described.record], null);
    this.post(described.lot.lot_id, mass, {
      to: place_id,
      pieces: as.pieces ?? null,
      job_id: as.job_id ?? null,
    });
    return described.lot.lot_id;
  }

  /** More of a lot that is there already, from opening stock, at its described fineness. */
  post(
    lot_id: string,
    mass: MassVector,
    at: { readonly to: string; readonly pieces?: bigint | null; readonly job_id?: string | null },
  ): void {
    const pieces = at.pieces ?? null;
    const entries = [
      {
        account_id: this.find('opening_stock'),
        lot_id,
        mass: negateMass(mass),
        pieces: pieces === null ? null : -pieces,
      },
      { account_id: at.to, lot_id, mass, pieces },
    ];
    const detail = { job_id: at.job_id ?? null };
    this.state.post([{ ...this.#blankVoucher(), detail, entries }], null);
  }

  lot(lot_id: string): Lot {
    return this.state.lot(lot_id);
  }

  /** The lot that was described last, or n before it. */
  newestLot(back = 0): Lot {
    const lot = [...this.state.lots.values()].at(-1 - back);
    if (lot === undefined) throw new Error('The test’s book has no lot yet.');
    return lot;
  }

  held(account_id: string, lot_id: string): MassVector {
    return this.state.held(account_id, lot_id).mass;
  }

  pieces(account_id: string, lot_id: string): bigint | null {
    return this.state.held(account_id, lot_id).pieces;
  }

  /** Runs an event and posts it, whether or not it wants a second signature; throws where it is refused. */
  run<Input>(event: EventDefinition<Input>, body: unknown, actor: Actor): EventDraft {
    const draft = this.draft(event, body, actor);
    this.state.post(draft.records, actor.person_id);
    for (const handover of draft.handovers) this.state.handovers.push({ ...handover, state: 'waiting' });
    return draft;
  }

  /** Runs an event and posts it where it is accepted; gives null where it is refused. */
  attempt<Input>(event: EventDefinition<Input>, body: unknown, actor: Actor): EventDraft | null {
    return this.#ask(event, body, actor).ok ? this.run(event, body, actor) : null;
  }

  /** What an event would post. Throws with its sentences where it is refused. */
  draft<Input>(event: EventDefinition<Input>, body: unknown, actor: Actor): EventDraft {
    const outcome = this.#ask(event, body, actor);
    if (outcome.ok) return outcome.value;
    throw new Error(outcome.refusals.map((refusal) => `${refusal.code}: ${refusal.sentence}`).join('\n'));
  }

  /** Why an event is refused: nothing of it stays. Throws where it would be posted. */
  refusals<Input>(event: EventDefinition<Input>, body: unknown, actor: Actor): readonly Refusal[] {
    const outcome = this.#ask(event, body, actor);
    if (!outcome.ok) return outcome.refusals;
    throw new Error(`${event.name} was accepted, though the test expects a refusal.`);
  }

  /** The one refusal of an event. */
  refusal<Input>(event: EventDefinition<Input>, body: unknown, actor: Actor): Refusal {
    const [first, ...more] = this.refusals(event, body, actor);
    if (first === undefined || more.length > 0) {
      throw new Error(`${event.name} gave ${more.length + 1} refusals where the test expects one.`);
    }
    return first;
  }

  /** Facts as an event gets them: nothing that it did not ask for. */
  facts(needed: Parameters<typeof factsFor>[1]): Facts {
    return factsFor(this.state, needed);
  }

  /** The newest voucher. */
  lastVoucher(back = 0): VoucherDraft {
    const vouchers = this.state.records.filter((record) => record.draft.type === 'voucher');
    const draft = vouchers.at(-1 - back)?.draft;
    if (draft?.type !== 'voucher') throw new Error('The test’s book has no voucher yet.');
    return draft;
  }

  /** A voucher as lines: "Safe | 750 sheet | -20.000 g | gold -15.000". */
  voucherLines(voucher: VoucherDraft): readonly string[] {
    return voucher.entries.map((entry) =>
      this.#line(entry.account_id, entry.lot_id, entry.mass, entry.pieces),
    );
  }

  /** What is anywhere, in the order in which accounts and lots were opened, as lines. */
  ledger(of: 'all' | 'places' = 'all'): readonly string[] {
    return this.state
      .allHoldings()
      .filter((h) => of === 'all' || this.state.isPlace(h.account_id))
      .map((h) => this.#line(h.account_id, h.lot_id, h.mass, h.pieces));
  }

  /** The sum of every account: nothing, always. */
  total(): MassVector {
    return this.state.allHoldings().reduce((sum, holding) => addMass(sum, holding.mass), ZERO_MASS);
  }

  #ask<Input>(event: EventDefinition<Input>, body: unknown, actor: Actor) {
    const input = event.schema.parse(body);
    return event.draft(input, this.facts(event.needs(input)), actor);
  }

  #line(account_id: string, lot_id: string, mass: MassVector, pieces: bigint | null): string {
    const fine = METALS.filter((metal) => mass[metal] !== 0n).map(
      (metal) => `${metal} ${shortGrams(mass[metal])}`,
    );
    const count = pieces === null ? [] : [`${pieces} pieces`];
    const words = [this.state.account(account_id).name, this.state.lot(lot_id).description];
    return [...words, `${shortGrams(mass.gross)} g`, ...fine, ...count].join(' | ');
  }

  #describe(words: string, as: PutLot) {
    const fine = fineness({
      gold: new Decimal(as.gold ?? '0'),
      silver: new Decimal(as.silver ?? '0'),
      platinum: new Decimal(as.platinum ?? '0'),
      palladium: new Decimal(as.palladium ?? '0'),
    });
    const form = as.form ?? 'sheet';
    const lot = {
      lot_id: this.state.newId(),
      code: this.state.ids.lotCode(codeLetter(form, fine)),
      form,
      alloy: as.alloy ?? null,
      owner_id: as.owner_id ?? null,
      origin: as.origin ?? 'recycled',
      fineness: fine,
      basis: as.basis ?? 'certificate',
      description: words,
      hold_reason: as.hold_reason ?? null,
      hold_until: null,
      parents: [],
    } as const;
    const record: RecordDraft = describeLot(lot, this.state.newId(), this.today);
    return { lot, record };
  }

  #blankVoucher(): VoucherDraft {
    return {
      type: 'voucher',
      id: this.state.newId(),
      kind: 'opening',
      business_date: this.today,
      note: null,
      detail: {},
      documents: [],
      reverses: null,
      entries: [],
    };
  }
}
