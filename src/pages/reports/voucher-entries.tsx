/** The entries of a voucher with their signs; the double rule stands only under sums that are nothing. */
import { Link } from 'react-router-dom';
import { MASS_KEYS, isZeroMass, massFromJson, sumMass } from '../../../shared/mass/vector.ts';
import type { MassKey } from '../../../shared/mass/vector.ts';
import type { VoucherEntry } from '../../../shared/schemas/vouchers.ts';
import { metalName } from '../../components/ui/metal-key.tsx';
import { gramsFigure, isNothing, ugFigure } from '../../lib/formats.ts';
import { paths } from '../../app/paths.ts';

export function EntriesTable({ entries }: { readonly entries: readonly VoucherEntry[] }) {
  const sum = sumMass(entries.map(massFromJson));
  const shown = MASS_KEYS.filter(
    (key) => key === 'gross' || entries.some((entry) => !isNothing(entry[`${key}_g`])),
  );
  const counted = entries.some((entry) => entry.pieces !== null);
  return (
    <div className="table-region" role="region" aria-label="Entries of the voucher" tabIndex={0}>
      <table className="register">
        <caption className="sr-only">Entries of the voucher, in grams</caption>
        <thead>
          <tr>
            <th scope="col">Account</th>
            <th scope="col">Lot</th>
            {shown.map((key) => (
              <th key={key} scope="col" className="num">
                {headOf(key)}
              </th>
            ))}
            {counted ? (
              <th scope="col" className="num">
                Pieces
              </th>
            ) : null}
          </tr>
        </thead>
        <tbody>
          {entries.map((entry) => (
            <tr key={entry.line}>
              <th scope="row">
                <Link className="plain" to={`${paths.vouchers}?account_id=${entry.account_id}`}>
                  {entry.account_name}
                </Link>
              </th>
              <td>
                <Link to={paths.lot(entry.lot_id)}>{entry.lot_code}</Link>
                <small className="block text-ink-2">{entry.lot_description}</small>
              </td>
              {shown.map((key) => (
                <td key={key} className={`num ${key === 'gross' ? 'gross' : 'fine'}`}>
                  <SignedGrams grams={entry[`${key}_g`]} />
                </td>
              ))}
              {counted ? <td className="num">{entry.pieces ?? <span className="none">none</span>}</td> : null}
            </tr>
          ))}
        </tbody>
        <tfoot>
          <tr className={isZeroMass(sum) ? 'total' : ''}>
            <th scope="row">{isZeroMass(sum) ? 'Sum, it agrees' : 'Left over'}</th>
            <td />
            {shown.map((key) => (
              <td key={key} className="num">
                {ugFigure(sum[key])}
              </td>
            ))}
            {counted ? <td /> : null}
          </tr>
        </tfoot>
      </table>
    </div>
  );
}

const headOf = (key: MassKey): string => (key === 'gross' ? 'Gross, g' : `${metalName(key)}, g`);

function SignedGrams({ grams }: { readonly grams: string }) {
  if (isNothing(grams)) return <span className="none">none</span>;
  return `${grams.startsWith('-') ? '' : '+'}${gramsFigure(grams)}`;
}
