/** Sent less credited, explained line by line: two totals that agree, under a double rule only where they do. */
import type { Lot } from '../../../shared/book/lot.ts';
import { gramsText } from '../../../shared/mass/grams-text.ts';
import type { Metal } from '../../../shared/mass/vector.ts';
import { METALS } from '../../../shared/mass/vector.ts';
import { metalName } from '../../components/ui/metal-key.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import { ugFigure } from '../../lib/formats.ts';
import type { OutturnRow } from './use-consignment.ts';

const PARTS = [
  { key: 'weighing_difference_g', name: 'Weighing difference' },
  { key: 'assay_difference_g', name: 'Assay difference' },
  { key: 'deduction_g', name: 'Refiner’s deduction' },
  { key: 'charge_g', name: 'Charge in metal' },
] as const;

interface OutturnIdentityProps {
  readonly rows: readonly OutturnRow[] | null;
  readonly lots: readonly Lot[];
}

export function OutturnIdentity({ rows, lots }: OutturnIdentityProps) {
  if (rows === null)
    return <p className="none">The reckoning shows here as soon as the statement and its payment are in.</p>;
  return METALS.filter((metal) => rows.some((row) => row.metal === metal)).map((metal) => (
    <MetalIdentity key={metal} metal={metal} rows={rows.filter((row) => row.metal === metal)} lots={lots} />
  ));
}

interface MetalIdentityProps {
  readonly metal: Metal;
  readonly rows: readonly OutturnRow[];
  readonly lots: readonly Lot[];
}

function MetalIdentity({ metal, rows, lots }: MetalIdentityProps) {
  const sum = (of: (row: OutturnRow) => string) =>
    rows.reduce((total, row) => total + gramsText(of(row)), 0n);
  const [sent, credited] = [sum((row) => row.sent_g), sum((row) => row.credited_g)];
  const explained = PARTS.reduce((total, { key }) => total + sum((row) => row[key]), 0n);
  const agrees = sent - credited === explained;
  return (
    <div className="account mb-6">
      <section aria-label={`${metalName(metal)}: sent and credited`}>
        <h2>{metalName(metal)}, sent and credited</h2>
        {rows.map((row) => (
          <Row
            key={row.lot_id}
            name={`Sent, ${lots.find(({ id }) => id === row.lot_id)?.code ?? 'lot'}`}
            ug={gramsText(row.sent_g)}
          />
        ))}
        <Row name="Less credited" ug={-credited} />
        <Total name="Not credited" ug={sent - credited} agrees={agrees} />
      </section>
      <section aria-label={`${metalName(metal)}: where the rest is`}>
        <h2>Where the rest is</h2>
        {PARTS.map(({ key, name }) => (
          <Row key={key} name={name} ug={sum((row) => row[key])} />
        ))}
        <Total name={agrees ? 'Explained, it agrees' : 'Explained'} ug={explained} agrees={agrees} />
        {agrees ? null : <StatusWord status="Unexplained" />}
      </section>
    </div>
  );
}

function Row({ name, ug }: { readonly name: string; readonly ug: bigint }) {
  return (
    <div className="flex justify-between gap-4 border-b border-rule py-2">
      <span>{name}</span>
      <span className="fig">{ug === 0n ? <span className="none">none</span> : `${ugFigure(ug)} g`}</span>
    </div>
  );
}

function Total({
  name,
  ug,
  agrees,
}: {
  readonly name: string;
  readonly ug: bigint;
  readonly agrees: boolean;
}) {
  return (
    <div className={agrees ? 'side-total' : 'flex justify-between gap-4 py-2 font-semibold'}>
      <span>{name}</span>
      <span className="fig">{ugFigure(ug)} g</span>
    </div>
  );
}
