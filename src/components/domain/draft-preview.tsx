/** What a form would post: each voucher as entries with their signs, balanced under a double rule. */
import type { RecordDraft, VoucherDraft } from '../../../shared/book/draft.ts';
import { draftSum, isBalanced } from '../../../shared/book/draft.ts';
import type { Facts } from '../../../shared/book/facts.ts';
import { METALS, fineTotal } from '../../../shared/mass/vector.ts';
import { ugFigure, words } from '../../lib/formats.ts';
import { metalSymbol } from '../ui/metal-key.tsx';

export interface Names {
  account(id: string): string;
  lot(id: string): string;
}

/** Names out of facts and out of the lots that the draft itself would open. */
export function namesOf(facts: Pick<Facts, 'accounts' | 'lots'>, records: readonly RecordDraft[]): Names {
  const opened = new Map(
    records
      .filter((record) => record.kind === 'lot_described')
      .map(({ detail }) => [detail['lot_id'], newLot(detail['description'])] as const),
  );
  return {
    account: (id) => facts.accounts.get(id)?.name ?? 'account',
    lot: (id) => facts.lots.get(id)?.code ?? opened.get(id) ?? 'lot',
  };
}

const newLot = (description: unknown): string =>
  typeof description === 'string' ? `new lot, ${description}` : 'new lot';

export function DraftPreview({
  records,
  names,
}: {
  readonly records: readonly RecordDraft[];
  readonly names: Names;
}) {
  const vouchers = records.filter((record): record is VoucherDraft => record.type === 'voucher');
  return (
    <div>
      {vouchers.map((voucher) => (
        <table key={voucher.id} className="register mb-4">
          <caption className="fig-label pb-1">{words(voucher.kind)}</caption>
          <thead>
            <tr>
              <th scope="col">Account and lot</th>
              <th scope="col" className="num">
                Gross, g
              </th>
              <th scope="col" className="num">
                Fine, g
              </th>
            </tr>
          </thead>
          <tbody>
            {voucher.entries.map((entry, index) => (
              <tr key={`${entry.account_id}${entry.lot_id}${index}`}>
                <td>
                  {names.account(entry.account_id)}
                  <br />
                  <small className="text-ink-2">{names.lot(entry.lot_id)}</small>
                </td>
                <td className="num gross">{ugFigure(entry.mass.gross)}</td>
                <td className="num fine">
                  {METALS.filter((metal) => entry.mass[metal] !== 0n).map((metal) => (
                    <div key={metal}>
                      {ugFigure(entry.mass[metal])} {metalSymbol(metal)}
                    </div>
                  ))}
                </td>
              </tr>
            ))}
          </tbody>
          <tfoot>
            <tr className={isBalanced(voucher.entries) ? 'total' : 'total open'}>
              <th scope="row">{isBalanced(voucher.entries) ? 'Sum, it agrees' : 'Sum, it does not agree'}</th>
              <td className="num">{ugFigure(draftSum(voucher.entries).gross)}</td>
              <td className="num">{ugFigure(fineTotal(draftSum(voucher.entries)))}</td>
            </tr>
          </tfoot>
        </table>
      ))}
    </div>
  );
}
