/** What would be posted, voucher by voucher, as it was drafted when the signature was asked for. */
import { Link } from 'react-router-dom';
import { METALS } from '../../../shared/mass/vector.ts';
import type { DraftPreview } from '../../../shared/schemas/signature-request.ts';
import { metalSymbol } from '../../components/ui/metal-key.tsx';
import { gramsFigure, isNothing, longDayText, words } from '../../lib/formats.ts';
import { useFacts } from '../../queries/facts.ts';
import { useAccounts } from '../../queries/registers.ts';
import { paths } from '../../app/paths.ts';

type Draft = DraftPreview[number];

export function RequestPreview({ preview }: { readonly preview: DraftPreview }) {
  return preview
    .filter(({ entries }) => entries.length > 0)
    .map((draft) => <DraftTable key={JSON.stringify(draft.entries)} draft={draft} preview={preview} />);
}

function DraftTable({ draft, preview }: { readonly draft: Draft; readonly preview: DraftPreview }) {
  const accounts = useAccounts();
  const opened = new Set(
    preview.flatMap(({ detail }) => (typeof detail['lot_id'] === 'string' ? [detail['lot_id']] : [])),
  );
  const known = draft.entries.map(({ lot_id }) => lot_id).filter((id) => !opened.has(id));
  const { lots } = useFacts({ lot_ids: [...new Set(known)] });
  const reason = draft.detail['reason'];
  return (
    <div className="table-region" role="region" aria-label={words(draft.kind)} tabIndex={0}>
      <table className="register mb-3">
        <caption className="fig-label pb-1">
          {words(draft.kind)} of {longDayText(draft.business_date)}
          {typeof reason === 'string' ? `: ${reason}` : ''}
        </caption>
        <thead>
          <tr>
            <th scope="col">Account</th>
            <th scope="col">Lot</th>
            <th scope="col" className="num">
              Fine, g
            </th>
            <th scope="col" className="num">
              Gross, g
            </th>
          </tr>
        </thead>
        <tbody>
          {draft.entries.map((entry, at) => {
            const lot = lots.get(entry.lot_id);
            return (
              <tr key={`${entry.account_id}${entry.lot_id}${at}`}>
                <th scope="row">
                  {accounts.find(({ id }) => id === entry.account_id)?.name ?? 'a new account'}
                </th>
                <td>{lot === undefined ? 'a new lot' : <Link to={paths.lot(lot.id)}>{lot.code}</Link>}</td>
                <td className="num fine">
                  {METALS.filter((metal) => !isNothing(entry[`${metal}_g`])).map((metal) => (
                    <div key={metal}>
                      {gramsFigure(entry[`${metal}_g`])} {metalSymbol(metal)}
                    </div>
                  ))}
                </td>
                <td className="num gross">{gramsFigure(entry.gross_g)}</td>
              </tr>
            );
          })}
        </tbody>
      </table>
    </div>
  );
}
