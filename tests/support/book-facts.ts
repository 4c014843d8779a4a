/**
 * The facts that an event asked for, out of the in-memory book, and nothing beyond: an event that forgets to ask for
 * something fails its tests. What is read along with what follows the comments of `FactsNeeded`.
 */
import { accountGroup } from '../../shared/book/account.ts';
import type { Account } from '../../shared/book/account.ts';
import type { VoucherDraft } from '../../shared/book/draft.ts';
import { detailLeaf } from '../../shared/book/facts.ts';
import type { Facts, FactsNeeded, RecordedEntry, RecordedVoucher } from '../../shared/book/facts.ts';
import type { BookState, Posted } from './book-state.ts';
import { unsweptLoss } from './unswept.ts';

export function factsFor(state: BookState, needed: FactsNeeded): Facts {
  const vouchers = vouchersOf(state, needed);
  const traced = new Set(needed.trace_voucher_ids ?? []);
  const tracedLots = [...vouchers.values()]
    .filter((v) => traced.has(v.id))
    .flatMap((v) => v.entries.map((e) => e.lot_id));
  const lotIds = new Set([...(needed.lot_ids ?? []), ...tracedLots]);
  const places = new Set(needed.place_ids ?? []);
  const holdings = state.allHoldings().filter((h) => lotIds.has(h.lot_id) || places.has(h.account_id));
  const history = new Set([...(needed.history_lot_ids ?? []), ...tracedLots]);
  const lot_entries = allEntries(state).filter((entry) => history.has(entry.lot_id));
  const handovers = state.handovers.filter((handover) => vouchers.has(handover.voucher_id));
  const named = [...holdings, ...lot_entries, ...[...vouchers.values()].flatMap((v) => v.entries)];
  const jobs = pick(state.jobs, needed.job_ids ?? []);
  const lots = pick(state.lots, [...lotIds, ...history, ...named.map((row) => row.lot_id)]);
  const owners = [...lots.values()].flatMap((lot) => lot.owner_id ?? []);
  const partyIds = [
    ...(needed.party_ids ?? []),
    ...owners,
    ...[...jobs.values()].flatMap((job) => job.customer_id ?? []),
  ];
  const accountIds = [
    ...(needed.account_ids ?? []),
    ...places,
    ...named.map((row) => row.account_id),
    ...handovers.map((handover) => handover.place_id),
  ];
  const accounts = accountsOf(state, new Set(accountIds), partyIds);
  const partiesOfAccounts = accountIds.flatMap((id) => accounts.get(id)?.party_id ?? []);
  const bin_feeds = state.bin_feeds.filter((feed) => (needed.bin_ids ?? []).includes(feed.bin_id));
  return {
    today: state.today,
    closed_through: state.closed_through,
    periods: [],
    accounts,
    lots,
    holdings,
    job_holdings: state.allJobHoldings().filter((h) => places.has(h.account_id)),
    vouchers,
    handovers,
    documents: pick(state.documents, needed.document_ids ?? []),
    lot_entries,
    parties: pick(state.parties, [...partyIds, ...partiesOfAccounts]),
    jobs,
    people: state.people,
    allowances: state.allowances,
    bin_feeds,
    unswept: unsweptLoss(state, bin_feeds),
    prices: state.prices,
    settings: state.settings,
    ids: state.ids,
  };
}

function accountsOf(
  state: BookState,
  ids: ReadonlySet<string>,
  party_ids: readonly string[],
): Map<string, Account> {
  const wanted = [...state.accounts.values()].filter((account) => {
    const standing = account.kind === 'sold' || account.kind === 'opening_stock';
    const ofParty = account.party_id !== null && party_ids.includes(account.party_id);
    return accountGroup(account.kind) === 'result' || standing || ids.has(account.id) || ofParty;
  });
  return new Map(wanted.map((account) => [account.id, account]));
}

function vouchersOf(state: BookState, needed: FactsNeeded): Map<string, RecordedVoucher> {
  const ids = new Set([...(needed.voucher_ids ?? []), ...(needed.trace_voucher_ids ?? [])]);
  const found = state.records.flatMap((posted) => {
    const { draft } = posted;
    return draft.type === 'voucher' && ids.has(draft.id) ? [recorded(state, posted, draft)] : [];
  });
  return new Map(found.map((voucher) => [voucher.id, voucher]));
}

function recorded(state: BookState, posted: Posted, voucher: VoucherDraft): RecordedVoucher {
  return {
    id: voucher.id,
    sequence: posted.sequence.toString(),
    kind: voucher.kind,
    business_date: voucher.business_date,
    recorded_by: posted.recorded_by ?? '',
    approved_by: null,
    reverses: voucher.reverses,
    reversed_by: reversedBy(state, voucher.id),
    note: voucher.note,
    detail: voucher.detail,
    entries: entriesOf(state, posted, voucher),
  };
}

function entriesOf(state: BookState, posted: Posted, voucher: VoucherDraft): readonly RecordedEntry[] {
  return voucher.entries.map((entry, index) => ({
    ...entry,
    voucher_id: voucher.id,
    voucher_sequence: posted.sequence.toString(),
    voucher_kind: voucher.kind,
    business_date: voucher.business_date,
    line: String(index + 1),
    operation: detailLeaf(voucher.detail, 'operation'),
    bench: detailLeaf(voucher.detail, 'bench'),
    reversed_by: reversedBy(state, voucher.id),
    corrects: detailLeaf(voucher.detail, 'corrects'),
  }));
}

function allEntries(state: BookState): readonly RecordedEntry[] {
  return state.records.flatMap((posted) => {
    const { draft } = posted;
    return draft.type === 'voucher' ? entriesOf(state, posted, draft) : [];
  });
}

function reversedBy(state: BookState, voucher_id: string): string | null {
  const found = state.records.find(({ draft }) => draft.type === 'voucher' && draft.reverses === voucher_id);
  return found?.draft.id ?? null;
}

function pick<T>(all: ReadonlyMap<string, T>, ids: readonly string[]): Map<string, T> {
  const found = new Map<string, T>();
  for (const id of ids) {
    const value = all.get(id);
    if (value !== undefined) found.set(id, value);
  }
  return found;
}
