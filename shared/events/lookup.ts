/** Finding in the facts what an input names, with the sentence for each way in which it may not be there. */
import type { Account, AccountKind } from '../book/account.ts';
import { isPlace } from '../book/account.ts';
import type { Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts, Job, Party, RecordedVoucher } from '../book/facts.ts';
import type { Lot } from '../book/lot.ts';

/** A place that is open, of one of the kinds where any are named. Refuses any other account. */
export function findPlace(
  facts: Facts,
  account_id: string,
  field: string,
  kinds?: { readonly of: readonly AccountKind[]; readonly sentence: string },
): Outcome<Account> {
  const account = facts.accounts.get(account_id);
  if (account === undefined || !isPlace(account.kind)) {
    const sentence = 'That place is not in the book. Choose one from the list.';
    return refuse({ code: 'not_found', field, sentence });
  }
  if (account.closed) {
    const sentence = `${account.name} is closed, so no metal goes in or out. Choose another place, or open it again.`;
    return refuse({ code: 'place_closed', field, sentence });
  }
  if (kinds !== undefined && !kinds.of.includes(account.kind)) {
    return refuse({ code: 'wrong_place', field, sentence: `${account.name}: ${kinds.sentence}` });
  }
  return accept(account);
}

export function findLot(facts: Facts, lot_id: string, field: string): Outcome<Lot> {
  const lot = facts.lots.get(lot_id);
  if (lot !== undefined) return accept(lot);
  const sentence = 'That lot is not in the book. Look at the label again, or scan it.';
  return refuse({ code: 'not_found', field, sentence });
}

/** A lot that may be worked or sent out. Refuses one on hold or spent. */
export function usableLot(lot: Lot, field: string): Outcome<Lot> {
  if (lot.standing === 'on_hold') {
    const until = lot.hold_until === null ? '' : ` (at least until ${lot.hold_until})`;
    const sentence = `Lot ${lot.code} is on hold${until}: ${lot.hold_reason ?? 'no reason given'}. Release it first, or choose another lot.`;
    return refuse({ code: 'lot_on_hold', field, sentence });
  }
  if (lot.standing === 'spent') {
    const sentence = `Lot ${lot.code} is spent: nothing of it is left. Look at the label again.`;
    return refuse({ code: 'lot_spent', field, sentence });
  }
  return accept(lot);
}

export function findParty(facts: Facts, party_id: string, field: string): Outcome<Party> {
  const party = facts.parties.get(party_id);
  if (party !== undefined) return accept(party);
  const sentence = 'That name is not among the parties. Choose one from the list, or enter it first.';
  return refuse({ code: 'not_found', field, sentence });
}

/** A job by id, or none where none is named (stock work, repairs). */
export function findJob(facts: Facts, job_id: string | null, field: string): Outcome<Job | null> {
  if (job_id === null) return accept(null);
  const job = facts.jobs.get(job_id);
  if (job !== undefined) return accept(job);
  return refuse({
    code: 'not_found',
    field,
    sentence: 'That job is not in the book. Choose one from the list.',
  });
}

export function findVoucher(facts: Facts, voucher_id: string, field: string): Outcome<RecordedVoucher> {
  const voucher = facts.vouchers.get(voucher_id);
  if (voucher !== undefined) return accept(voucher);
  return refuse({
    code: 'not_found',
    field,
    sentence: 'No voucher has that number. Look at the register again.',
  });
}

/** The account of a kind that belongs to a party. Refuses where the party has none. */
export function partyAccount(facts: Facts, party: Party, kind: AccountKind, field: string): Outcome<Account> {
  for (const account of facts.accounts.values()) {
    if (account.kind === kind && account.party_id === party.id && !account.closed) return accept(account);
  }
  const sentence = `${party.name} has no account of that kind yet. Open it under Workshop, parties.`;
  return refuse({ code: 'not_found', field, sentence });
}

/** The working-loss account of an operation. Refuses an operation that the workshop does not keep. */
export function lossAccount(facts: Facts, operation: string, field: string): Outcome<Account> {
  for (const account of facts.accounts.values()) {
    if (account.kind === 'working_loss' && account.operation === operation && !account.closed)
      return accept(account);
  }
  const sentence =
    'The workshop keeps no such operation. Choose one from the list, or add it under Workshop.';
  return refuse({ code: 'not_found', field, sentence });
}

/** The one account of its kind that every workshop has. Throws where it is missing: a fault of the program. */
export function theAccount(
  facts: Facts,
  kind:
    | 'opening_stock'
    | 'sold'
    | 'count_variance'
    | 'assay_variance'
    | 'processors_deduction'
    | 'used_up'
    | 'written_off'
    | 'foreign_matter',
): Account {
  for (const account of facts.accounts.values()) if (account.kind === kind) return account;
  throw new Error(`The workshop has no account ${kind}.`);
}

/** Refuses where two lines of a voucher name the same lot. */
export function eachLotOnce(
  lines: readonly { readonly lot_id: string }[],
  facts: Facts,
  field: string,
): Outcome<null> {
  const seen = new Set<string>();
  for (const [index, line] of lines.entries()) {
    if (seen.has(line.lot_id)) {
      const code = facts.lots.get(line.lot_id)?.code ?? 'That lot';
      const sentence = `${code} stands on two lines of this voucher. Weigh it together, or post two vouchers.`;
      return refuse({ code: 'lot_twice', field: `${field}.${index}.lot_id`, sentence });
    }
    seen.add(line.lot_id);
  }
  return accept(null);
}
