/** The standing lot of a metal on a metal account: form account, fine = gross; opened at its first use. */
import { fineness } from '../../alloy/fineness.ts';
import type { Account } from '../../book/account.ts';
import type { RecordDraft } from '../../book/draft.ts';
import type { Facts } from '../../book/facts.ts';
import { heldOf } from '../../book/holding.ts';
import type { Micrograms } from '../../mass/micrograms.ts';
import type { MassVector, Metal } from '../../mass/vector.ts';
import { massVector } from '../../mass/vector.ts';
import { openLot } from '../new-lot.ts';

const WHOLE = '1000';

/** So much of one metal, fine and gross alike. */
export const fineMetal = (metal: Metal, ug: Micrograms): MassVector => massVector({ gross: ug, [metal]: ug });

/** Gives the standing lot of an account and metal, and the act that opens it where there is none yet. */
export class StandingLots {
  readonly records: RecordDraft[] = [];
  readonly #opened = new Map<string, string>();
  readonly #facts: Facts;
  readonly #business_date: string;

  constructor(facts: Facts, business_date: string) {
    this.#facts = facts;
    this.#business_date = business_date;
  }

  of(account: Account, metal: Metal): string {
    const key = `${account.id} ${metal}`;
    const known = this.#opened.get(key) ?? standingLotId(this.#facts, account.id, metal);
    if (known !== null) return known;
    const opened = openLot(this.#facts, this.#business_date, {
      form: 'account',
      alloy: null,
      owner_id: null,
      origin: 'undeclared',
      fineness: fineness({ [metal]: WHOLE }),
      basis: 'declared',
      description: `${metal} on account, ${account.name}`,
      hold_reason: null,
      hold_until: null,
      parents: [],
    });
    this.records.push(opened.act);
    this.#opened.set(key, opened.lot_id);
    return opened.lot_id;
  }
}

/** The standing lot that an account has for a metal, or null. */
export function standingLotId(facts: Facts, account_id: string, metal: Metal): string | null {
  const held = facts.holdings.find((h) => {
    const lot = facts.lots.get(h.lot_id);
    return h.account_id === account_id && lot?.form === 'account' && lot[`${metal}_permille`].eq(WHOLE);
  });
  return held?.lot_id ?? null;
}

/** What an account stands at for a metal: below nothing the house owes. */
export function claimOf(facts: Facts, account_id: string, metal: Metal): Micrograms {
  const lot_id = standingLotId(facts, account_id, metal);
  return lot_id === null ? 0n : heldOf(facts.holdings, account_id, lot_id).mass[metal];
}
