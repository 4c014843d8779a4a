/**
 * The metal account with a refiner, supplier or casting house: metal is drawn from it, handed over to it, bought or
 * fixed, sold, or moved to another account. Below nothing the house owes, to the limit that was agreed and no further.
 */
import { fineness, finenessOf } from '../../alloy/fineness.ts';
import type { Account } from '../../book/account.ts';
import type { EntryDraft, Outcome, RecordDraft } from '../../book/draft.ts';
import { accept, refuse } from '../../book/draft.ts';
import type { Facts } from '../../book/facts.ts';
import { LOT_FORMS } from '../../book/lot.ts';
import { massFromFineness } from '../../mass/apportion.ts';
import type { Micrograms } from '../../mass/micrograms.ts';
import { printGrams } from '../../mass/micrograms.ts';
import type { Metal } from '../../mass/vector.ts';
import { METALS, fineTotal, massVector, negateMass } from '../../mass/vector.ts';
import { gramsAboveZero, id, money, permille, pieces, shortText } from '../../schemas/primitives.ts';
import { z } from '../../schemas/zod.ts';
import { netOf, weighingSchema } from '../../weighing/weighing.ts';
import { amountSchema, drawAmount } from '../amount.ts';
import type { Common } from '../common-fields.ts';
import { commonFields, readCommon } from '../common-fields.ts';
import type { Actor, EventDefinition } from '../definition.ts';
import { recordsOnly } from '../definition.ts';
import { findLot, findParty, findPlace, partyAccount, theAccount, usableLot } from '../lookup.ts';
import { makeVoucher, weighingRows } from '../make-voucher.ts';
import { isCounted, openLot } from '../new-lot.ts';
import { StandingLots, claimOf, fineMetal } from './standing-lot.ts';

const metal = z.enum(METALS);
const deal = {
  metal,
  mass_g: gramsAboveZero,
  /** Price per troy ounce in the workshop's currency, and what it rests on. */
  price_per_ozt: money.nullable().default(null),
  reference: shortText.nullable().default(null),
};

const schema = z.strictObject({
  ...commonFields,
  account_id: id,
  act: z.discriminatedUnion('way', [
    z.strictObject({
      way: z.literal('draw'),
      metal,
      safe_id: id,
      form: z.enum(LOT_FORMS),
      alloy: shortText.nullable().default(null),
      description: shortText,
      permille,
      weighing: weighingSchema,
      /** Castings of the caster's own metal are counted too. */
      pieces: pieces.nullable().default(null),
    }),
    z.strictObject({ way: z.literal('hand_over'), safe_id: id, lot_id: id, amount: amountSchema }),
    /** Bought, or metal that was drawn is fixed: who sold it is a supplier of the workshop. */
    z.strictObject({ way: z.literal('buy'), supplier_id: id, ...deal }),
    z.strictObject({ way: z.literal('sell'), ...deal }),
    z.strictObject({ way: z.literal('move'), metal, mass_g: gramsAboveZero, to_account_id: id }),
  ]),
});
export type SettleInput = z.output<typeof schema>;
type Act = SettleInput['act'];

interface Settling {
  readonly account: Account;
  readonly common: Common;
  readonly standing: StandingLots;
  readonly facts: Facts;
}

/** What an act does: the records before it, its entries, what it adds to detail. */
interface Settled {
  readonly records: readonly RecordDraft[];
  readonly entries: readonly EntryDraft[];
}

export const settle: EventDefinition<SettleInput> = {
  name: 'settle',
  schema,
  action: 'book.settle',
  summary: 'Draws from a metal account, hands over to it, buys, sells or moves metal on it.',
  needs: ({ account_id, act, document_ids }) => ({
    place_ids: act.way === 'move' ? [account_id, act.to_account_id] : [account_id],
    account_ids: 'safe_id' in act ? [act.safe_id] : [],
    lot_ids: act.way === 'hand_over' ? [act.lot_id] : [],
    party_ids: act.way === 'buy' ? [act.supplier_id] : [],
    document_ids,
  }),
  draft(input, facts, actor) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const account = metalAccount(input.account_id, 'account_id', facts);
    if (!account.ok) return account;
    const standing = new StandingLots(facts, common.value.business_date);
    const done = carryOut(input.act, { account: account.value, common: common.value, standing, facts });
    if (!done.ok) return done;
    const limit = withinLimits(done.value.entries, facts);
    if (!limit.ok) return limit;
    const voucher = makeVoucher(facts, common.value, {
      kind: 'settle',
      detail: {
        ...actDetail(input.act, facts, actor),
        account_id: account.value.id,
        counterparty_id: account.value.party_id,
      },
      entries: done.value.entries,
    });
    return accept(recordsOnly([...standing.records, ...done.value.records, voucher]));
  },
};

function metalAccount(account_id: string, field: string, facts: Facts): Outcome<Account> {
  const account = facts.accounts.get(account_id);
  if (account?.kind === 'metal_account' && !account.closed) return accept(account);
  return refuse({
    code: 'wrong_place',
    field,
    sentence: 'That is no open metal account. Choose one from the list.',
  });
}

function carryOut(act: Act, by: Settling): Outcome<Settled> {
  switch (act.way) {
    case 'draw':
      return draw(act, by);
    case 'hand_over':
      return handOver(act, by);
    case 'buy': {
      const party = findParty(by.facts, act.supplier_id, 'act.supplier_id');
      if (!party.ok) return party;
      const supplier = partyAccount(by.facts, party.value, 'supplier', 'act.supplier_id');
      return supplier.ok ? between(supplier.value, by.account, act, by) : supplier;
    }
    case 'sell':
      return between(by.account, theAccount(by.facts, 'sold'), act, by);
    case 'move': {
      const to = metalAccount(act.to_account_id, 'act.to_account_id', by.facts);
      if (!to.ok) return to;
      if (to.value.id === by.account.id) {
        return refuse({
          code: 'wrong_place',
          field: 'act.to_account_id',
          sentence: 'That is the same account. Choose another.',
        });
      }
      const mass = fineMetal(act.metal, act.mass_g);
      return accept({
        records: [],
        entries: [
          {
            account_id: by.account.id,
            lot_id: by.standing.of(by.account, act.metal),
            mass: negateMass(mass),
            pieces: null,
          },
          { account_id: to.value.id, lot_id: by.standing.of(to.value, act.metal), mass, pieces: null },
        ],
      });
    }
  }
}

/** Metal of the account's own standing lot between two accounts. */
function between(
  from: Account,
  to: Account,
  act: { metal: Metal; mass_g: Micrograms },
  by: Settling,
): Outcome<Settled> {
  const lot_id = by.standing.of(by.account, act.metal);
  const mass = fineMetal(act.metal, act.mass_g);
  return accept({
    records: [],
    entries: [
      { account_id: from.id, lot_id, mass: negateMass(mass), pieces: null },
      { account_id: to.id, lot_id, mass, pieces: null },
    ],
  });
}

function draw(act: Extract<Act, { way: 'draw' }>, by: Settling): Outcome<Settled> {
  const safe = findPlace(by.facts, act.safe_id, 'act.safe_id', {
    of: ['safe'],
    sentence: 'drawn metal is weighed into a safe.',
  });
  if (!safe.ok) return safe;
  const net = netOf(act.weighing, 'act.weighing');
  if (!net.ok) return net;
  if (isCounted(act.form) !== (act.pieces !== null)) {
    const sentence = isCounted(act.form)
      ? 'Metal of this form is kept by pieces too. Count them.'
      : 'Metal of this form is not kept by pieces. Leave the count empty.';
    return refuse({ code: 'pieces_needed', field: 'act.pieces', sentence });
  }
  const fine = fineness({ [act.metal]: act.permille });
  const mass = massFromFineness(net.value, fine);
  const opened = openLot(by.facts, by.common.business_date, {
    form: act.form,
    alloy: act.alloy,
    owner_id: null,
    origin: 'undeclared',
    fineness: finenessOf(mass) ?? fine,
    basis: 'declared',
    description: act.description,
    hold_reason: null,
    hold_until: null,
    parents: [],
  });
  const claim = fineMetal(act.metal, mass[act.metal]);
  return accept({
    records: [opened.act],
    entries: [
      {
        account_id: by.account.id,
        lot_id: by.standing.of(by.account, act.metal),
        mass: negateMass(claim),
        pieces: null,
      },
      { account_id: safe.value.id, lot_id: opened.lot_id, mass, pieces: act.pieces },
      baseMetal(opened.lot_id, mass[act.metal] - mass.gross, by.facts),
    ],
  });
}

function handOver(act: Extract<Act, { way: 'hand_over' }>, by: Settling): Outcome<Settled> {
  const safe = findPlace(by.facts, act.safe_id, 'act.safe_id', {
    of: ['safe'],
    sentence: 'metal is handed over out of a safe.',
  });
  if (!safe.ok) return safe;
  const found = findLot(by.facts, act.lot_id, 'act.lot_id');
  const lot = found.ok ? usableLot(found.value, 'act.lot_id') : found;
  if (!lot.ok) return lot;
  if (lot.value.owner_id !== null) {
    const sentence = `${lot.value.code} is not the house’s, so it can’t pay the house’s debt. Change its owner first.`;
    return refuse({ code: 'wrong_owner', field: 'act.lot_id', sentence });
  }
  const drawn = drawAmount(
    by.facts,
    { account: safe.value, lot: lot.value, job_id: null },
    act.amount,
    'act.amount',
  );
  if (!drawn.ok) return drawn;
  const { mass, pieces } = drawn.value;
  const credits = METALS.filter((key) => mass[key] > 0n).map((key) => ({
    account_id: by.account.id,
    lot_id: by.standing.of(by.account, key),
    mass: fineMetal(key, mass[key]),
    pieces: null,
  }));
  return accept({
    records: [],
    entries: [
      {
        account_id: safe.value.id,
        lot_id: lot.value.id,
        mass: negateMass(mass),
        pieces: pieces === null ? null : -pieces,
      },
      ...credits,
      baseMetal(lot.value.id, mass.gross - fineTotal(mass), by.facts),
    ],
  });
}

/** Base metal in what is drawn or handed over is the processor's matter: gross only, in the deduction. */
function baseMetal(lot_id: string, gross: Micrograms, facts: Facts): EntryDraft {
  return {
    account_id: theAccount(facts, 'processors_deduction').id,
    lot_id,
    mass: massVector({ gross }),
    pieces: null,
  };
}

/** No metal account falls below what was agreed with its party. */
function withinLimits(entries: readonly EntryDraft[], facts: Facts): Outcome<null> {
  for (const entry of entries) {
    const account = facts.accounts.get(entry.account_id);
    if (account?.kind !== 'metal_account') continue;
    for (const key of METALS) {
      if (entry.mass[key] >= 0n) continue;
      const after = claimOf(facts, account.id, key) + entry.mass[key];
      const limit =
        facts.settings.claim_limits.find((row) => row.account_id === account.id && row.metal === key)
          ?.limit_ug ?? 0n;
      if (after >= -limit) continue;
      const sentence = `${account.name} would stand at ${printGrams(after, 3)} g of ${key}; agreed is a debt of ${printGrams(limit, 3)} g at most. Draw less, hand metal over first, or have the limit raised.`;
      return refuse({ code: 'over_limit', field: 'act', sentence });
    }
  }
  return accept(null);
}

function actDetail(act: Act, facts: Facts, actor: Actor) {
  const weighing =
    act.way === 'draw'
      ? act.weighing
      : act.way === 'hand_over' && act.amount.how === 'weighed'
        ? act.amount.weighing
        : null;
  return {
    way: act.way,
    metal: 'metal' in act ? act.metal : null,
    mass_g: 'mass_g' in act ? printGrams(act.mass_g) : null,
    price_per_ozt: 'price_per_ozt' in act ? (act.price_per_ozt?.toFixed() ?? null) : null,
    supplier_id: act.way === 'buy' ? act.supplier_id : null,
    reference: 'reference' in act ? act.reference : null,
    weighings: weighingRows([{ weighing, line: 1 }], facts, actor),
  };
}
