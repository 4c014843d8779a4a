/** Loss since a bin was last swept up, out of the in-memory book: the same sum as `unswept_loss` in the database. */
import type { VoucherDraft } from '../../shared/book/draft.ts';
import { detailLeaf } from '../../shared/book/facts.ts';
import type { BinFeed, UnsweptLoss } from '../../shared/book/facts.ts';
import { ZERO_MASS, addMass } from '../../shared/mass/vector.ts';
import type { BookState } from './book-state.ts';

const NO_LOSS_OF_WORK = ['sweep_up', 'outturn', 'write_off'];

export function unsweptLoss(state: BookState, feeds: readonly BinFeed[]): readonly UnsweptLoss[] {
  const vouchers = state.records.flatMap(({ draft }) => (draft.type === 'voucher' ? [draft] : []));
  return feeds.map(({ bin_id, operation, bench_id }) => {
    const last = vouchers.findLastIndex(
      (v) => v.kind === 'sweep_up' && v.detail.bin_id === bin_id && !isReversed(v, vouchers),
    );
    const loss = vouchers
      .slice(last + 1)
      .filter((v) => isOfWork(v, bench_id, vouchers))
      .flatMap((v) => v.entries)
      .filter((entry) => state.account(entry.account_id).operation === operation)
      .reduce((sum, entry) => addMass(sum, entry.mass), ZERO_MASS);
    return { bin_id, operation, bench_id, loss };
  });
}

function isReversed(voucher: VoucherDraft, vouchers: readonly VoucherDraft[]): boolean {
  return vouchers.some((other) => other.reverses === voucher.id);
}

/** Whether a voucher, or the one that it mirrors, booked loss of work at the bench that is asked for. */
function isOfWork(
  voucher: VoucherDraft,
  bench_id: string | null,
  vouchers: readonly VoucherDraft[],
): boolean {
  const first = vouchers.find((other) => other.id === voucher.reverses) ?? voucher;
  const atBench = bench_id === null || detailLeaf(first.detail, 'bench') === bench_id;
  return atBench && !NO_LOSS_OF_WORK.includes(first.kind);
}
