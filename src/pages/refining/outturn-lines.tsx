/** Per lot and metal: expected by the book, assayed and credited by the refiner, and how far the two are apart. */
import { finenessOf, printPermille } from '../../../shared/alloy/fineness.ts';
import { Decimal } from '../../../shared/decimal.ts';
import { readTypedMass } from '../../../shared/mass/typed-mass.ts';
import type { Metal } from '../../../shared/mass/vector.ts';
import { METALS } from '../../../shared/mass/vector.ts';
import { LotChip } from '../../components/domain/lot-chip.tsx';
import { MetalKey, metalName } from '../../components/ui/metal-key.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { ugFigure } from '../../lib/formats.ts';
import type { OutturnValues, TypedLine, TypedMetal } from './outturn-values.ts';
import { fieldOf, noLine, noMetal } from './outturn-values.ts';
import type { HeldLot } from './use-consignment.ts';

interface OutturnLinesProps {
  readonly values: OutturnValues;
  readonly lots: readonly HeldLot[];
  readonly onChange: (lines: OutturnValues['lines']) => void;
  readonly errorOf: (field: string) => string | null;
}

export function OutturnLines({ values, lots, onChange, errorOf }: OutturnLinesProps) {
  return lots.map((held) => {
    const line = values.lines[held.lot_id] ?? noLine;
    const set = (change: Partial<TypedLine>) =>
      onChange({ ...values.lines, [held.lot_id]: { ...line, ...change } });
    const at = fieldOf(values, lots, held.lot_id);
    return (
      <section key={held.lot_id} className="mb-7" aria-label={`Lot ${held.lot.code}`}>
        <p className="m-0 flex flex-wrap items-center gap-3">
          <LotChip {...held.lot} />
          <span className="text-ink-2">
            {ugFigure(held.mass.gross)} g gross at the refiner
            {held.lot.basis === 'estimated' ? ', content estimated' : ''}
          </span>
        </p>
        <MetalTable
          held={held}
          line={line}
          onChange={(metal, typed) => set({ metals: { ...line.metals, [metal]: typed } })}
          errorOf={(metal, field) => errorOf(`${fieldOf(values, lots, held.lot_id, metal)}.${field}`)}
        />
        <div className="fields mt-4">
          <WeightField
            label="Bar after melting"
            hint="Where the paper names it"
            value={line.after_melt}
            onChange={(after_melt) => set({ after_melt })}
            error={errorOf(`${at}.after_melt_g`)}
          />
          <WeightField
            label="Settled gross"
            hint="Empty where all of the lot is settled"
            value={line.part}
            onChange={(part) => set({ part })}
            error={errorOf(`${at}.settle.gross_g`) ?? errorOf(`${at}.metals`)}
          />
        </div>
      </section>
    );
  });
}

interface MetalTableProps {
  readonly held: HeldLot;
  readonly line: TypedLine;
  readonly onChange: (metal: Metal, typed: TypedMetal) => void;
  readonly errorOf: (metal: Metal, field: string) => string | null;
}

function MetalTable({ held, line, onChange, errorOf }: MetalTableProps) {
  const shown = METALS.filter((metal) => held.mass[metal] > 0n || line.metals[metal] !== undefined);
  const others = METALS.filter((metal) => !shown.includes(metal));
  return (
    <>
      <div className="table-region" role="region" aria-label={`Metals of ${held.lot.code}`} tabIndex={0}>
        <table className="register reflow">
          <caption className="sr-only">Metals of {held.lot.code}</caption>
          <thead>
            <tr>
              <th scope="col">Metal</th>
              <th scope="col" className="num">
                Expected, g
              </th>
              <th scope="col">Assayed, fine</th>
              <th scope="col" className="num">
                Against expected
              </th>
              <th scope="col">Credited, fine</th>
              <th scope="col">Charge in metal</th>
            </tr>
          </thead>
          <tbody>
            {shown.map((metal) => (
              <MetalRow
                key={metal}
                metal={metal}
                held={held}
                line={line}
                typed={line.metals[metal] ?? noMetal}
                onChange={(typed) => onChange(metal, typed)}
                errorOf={(field) => errorOf(metal, field)}
              />
            ))}
          </tbody>
        </table>
      </div>
      {others.length === 0 ? null : (
        <p className="mb-0">
          The statement names another metal:{' '}
          {others.map((metal) => (
            <button key={metal} type="button" className="btn quiet" onClick={() => onChange(metal, noMetal)}>
              {metalName(metal)}
            </button>
          ))}
        </p>
      )}
    </>
  );
}

interface MetalRowProps {
  readonly metal: Metal;
  readonly held: HeldLot;
  readonly line: TypedLine;
  readonly typed: TypedMetal;
  readonly onChange: (typed: TypedMetal) => void;
  readonly errorOf: (field: string) => string | null;
}

function MetalRow({ metal, held, line, typed, onChange, errorOf }: MetalRowProps) {
  const expected = held.mass[metal];
  return (
    <tr>
      <th scope="row">
        <MetalKey metal={metal} />
        <BarFineness metal={metal} assayed={typed.assayed} bar={line.after_melt} />
      </th>
      <td className="num gross" data-label="Expected, g">
        {expected === 0n ? <span className="none">none</span> : ugFigure(expected)}
      </td>
      <td>
        <WeightField
          label={`Assayed ${metalName(metal).toLowerCase()}`}
          value={typed.assayed}
          onChange={(assayed) => onChange({ ...typed, assayed })}
          error={errorOf('assayed_g')}
        />
      </td>
      <td className="num" data-label="Against expected">
        {line.part.trim() === '' ? <Against expected={expected} assayed={typed.assayed} /> : null}
      </td>
      <td>
        <WeightField
          label={`Credited ${metalName(metal).toLowerCase()}`}
          value={typed.credited}
          onChange={(credited) => onChange({ ...typed, credited })}
          error={errorOf('credited_g')}
        />
      </td>
      <td>
        <WeightField
          label={`Charged ${metalName(metal).toLowerCase()}`}
          value={typed.charge}
          onChange={(charge) => onChange({ ...typed, charge })}
          error={errorOf('charge_g')}
        />
      </td>
    </tr>
  );
}

/** The fineness of the poured bar, where both figures are there. */
function BarFineness({
  metal,
  assayed,
  bar,
}: {
  readonly metal: Metal;
  readonly assayed: string;
  readonly bar: string;
}) {
  const [fine, gross] = [readTypedMass(assayed), readTypedMass(bar)];
  if (!fine.ok || !gross.ok || gross.ug <= 0n) return null;
  const vector = { gross: gross.ug, gold: 0n, silver: 0n, platinum: 0n, palladium: 0n, [metal]: fine.ug };
  const found = finenessOf(vector);
  return found === null ? null : (
    <small className="block text-ink-2">{printPermille(found[metal])} in the bar</small>
  );
}

function Against({ expected, assayed }: { readonly expected: bigint; readonly assayed: string }) {
  const read = readTypedMass(assayed);
  if (!read.ok) return <span className="none">not entered yet</span>;
  const off = read.ug - expected;
  const percent =
    expected === 0n ? null : new Decimal(off.toString()).times(100).div(expected.toString()).toFixed(1);
  return (
    <>
      {off > 0n ? '+' : ''}
      {ugFigure(off)}
      {percent === null ? null : (
        <small className="ml-3 text-ink-2">{`${off > 0n ? '+' : ''}${percent.replace('-', '\u2212')} %`}</small>
      )}
    </>
  );
}
