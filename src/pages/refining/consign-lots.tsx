/** The lots of a consignment, ticked from what lies at the place; each goes whole unless a part is weighed. */
import type { Facts } from '../../../shared/book/facts.ts';
import { useState } from 'react';
import type { Lot, LotForm } from '../../../shared/book/lot.ts';
import { MIXED_FORMS, PIECE_FORMS } from '../../../shared/book/lot.ts';
import { sumMass } from '../../../shared/mass/vector.ts';
import { AmountFields } from '../../components/domain/amount.tsx';
import { LotChip } from '../../components/domain/lot-chip.tsx';
import { CheckBox } from '../../components/ui/choice.tsx';
import { Empty } from '../../components/ui/empty.tsx';
import { ugFigure } from '../../lib/formats.ts';
import type { ConsignValues } from './consign.tsx';
import { FineMasses } from './fine-masses.tsx';
import { wholeLot } from './whole-lot.ts';

/** What usually goes to a refiner: mixed residues, and scrap whose fineness is known. */
const REFINED: readonly LotForm[] = [...MIXED_FORMS, 'clean_scrap', 'tree_scrap', 'plating_salts'];

const forRefining = (lot: Lot | undefined): boolean => lot !== undefined && REFINED.includes(lot.form);

interface ConsignLotsProps {
  readonly facts: Facts;
  readonly place_id: string;
  readonly lines: ConsignValues['lines'];
  readonly onChange: (lines: ConsignValues['lines']) => void;
  readonly errorOf: (field: string) => string | null;
}

export function ConsignLots({ facts, place_id, lines, onChange, errorOf }: ConsignLotsProps) {
  const [every, setEvery] = useState(false);
  const there = facts.holdings.filter((row) => row.account_id === place_id && row.mass.gross > 0n);
  const held = there.filter(
    (row) =>
      every || forRefining(facts.lots.get(row.lot_id)) || lines.some((line) => line.lot_id === row.lot_id),
  );
  if (place_id === '') return <p className="none">Choose the safe first; then its lots show here.</p>;
  if (there.length === 0)
    return <Empty what="Nothing lies there." words="Lots show here once they are weighed in or swept up." />;
  const chosen = held.filter((row) => lines.some((line) => line.lot_id === row.lot_id));
  const change = (line: ConsignValues['lines'][number]) =>
    onChange(lines.map((one) => (one.lot_id === line.lot_id ? line : one)));
  const toggle = (lot_id: string, on: boolean) =>
    onChange(on ? [...lines, { lot_id, amount: wholeLot }] : lines.filter((line) => line.lot_id !== lot_id));
  const sum = sumMass(chosen.map((row) => row.mass));
  return (
    <>
      <CheckBox
        label="Every lot that lies there, not only scrap and residues"
        checked={every}
        onChange={setEvery}
      />
      <div className="table-region" role="region" aria-label="Lots that can be consigned" tabIndex={0}>
        <table className="register reflow">
          <caption className="sr-only">Lots that can be consigned</caption>
          <thead>
            <tr>
              <th scope="col">Goes</th>
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
            {held.map((row) => {
              const lot = facts.lots.get(row.lot_id);
              const at = lines.findIndex((line) => line.lot_id === row.lot_id);
              const line = lines[at];
              return lot === undefined ? null : (
                <tr key={row.lot_id} className={line === undefined ? '' : 'chosen'}>
                  <td>
                    <CheckBox
                      label={line === undefined ? 'stays' : 'goes'}
                      checked={line !== undefined}
                      onChange={(on) => toggle(row.lot_id, on)}
                    />
                  </td>
                  <td>
                    <LotChip {...lot} />
                    {line === undefined ? null : (
                      <div className="mt-3">
                        <AmountFields
                          value={line.amount}
                          onChange={(amount) => change({ ...line, amount })}
                          field={`lines.${at}.amount`}
                          errorOf={errorOf}
                          counted={PIECE_FORMS.some((form) => form === lot.form)}
                        />
                      </div>
                    )}
                  </td>
                  <td className="num fine">
                    <FineMasses mass={row.mass} />
                  </td>
                  <td className="num gross">{ugFigure(row.mass.gross)}</td>
                </tr>
              );
            })}
          </tbody>
          <tfoot>
            <tr>
              <td />
              <th scope="row">The chosen lots, whole</th>
              <td className="num fine">
                <FineMasses mass={sum} />
              </td>
              <td className="num gross">{ugFigure(sum.gross)}</td>
            </tr>
          </tfoot>
        </table>
      </div>
    </>
  );
}
