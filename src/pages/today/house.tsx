/** Where the house's metal lies, metal by metal: safe, benches, bins, outside; with a bar to one scale. */
import type { TodayJson } from '../../../shared/schemas/today.ts';
import { gramsText } from '../../../shared/mass/grams-text.ts';
import { Grams } from '../../components/ui/figure.tsx';
import { MetalKey } from '../../components/ui/metal-key.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';

type Row = TodayJson['house'][number];

const COLUMNS: readonly Column<Row>[] = [
  { id: 'metal', head: 'Metal', value: (row) => row.metal, cell: (row) => <MetalKey metal={row.metal} /> },
  {
    id: 'safe_g',
    head: 'Safe',
    figure: 'plain',
    value: (row) => row.safe_g,
    cell: (row) => <Grams grams={row.safe_g} />,
  },
  {
    id: 'benches_g',
    head: 'Benches, stations',
    figure: 'plain',
    value: (row) => row.benches_g,
    cell: (row) => <Grams grams={row.benches_g} />,
  },
  {
    id: 'bins_g',
    head: 'Sweeps bins, est.',
    figure: 'plain',
    value: (row) => row.bins_g,
    cell: (row) => <Grams grams={row.bins_g} />,
  },
  {
    id: 'outside_g',
    head: 'Courier, refiner',
    figure: 'plain',
    value: (row) => row.outside_g,
    cell: (row) => <Grams grams={row.outside_g} />,
  },
  {
    id: 'house_g',
    head: 'House',
    figure: 'fine',
    value: (row) => row.house_g,
    cell: (row) => <Grams grams={row.house_g} />,
  },
  { id: 'bar', head: 'Where it lies', cell: (row) => <Bar row={row} /> },
];

const FILLS = ['var(--ink)', 'var(--brass-line)', 'var(--rule-strong)', 'var(--field)'];

function Bar({ row }: { readonly row: Row }) {
  const whole = gramsText(row.house_g);
  if (whole <= 0n) return null;
  const parts = [row.safe_g, row.benches_g, row.bins_g, row.outside_g].map((grams) =>
    Number.parseInt(((gramsText(grams) * 1000n) / whole).toString(), 10),
  );
  return (
    <svg width="200" height="12" viewBox="0 0 1000 12" preserveAspectRatio="none" aria-hidden="true">
      {parts.map((part, index) => (
        <rect
          key={FILLS[index]}
          x={parts.slice(0, index).reduce((sum, one) => sum + one, 0)}
          y="1"
          width={part}
          height="10"
          fill={FILLS[index]}
          stroke="var(--ink)"
          strokeWidth={part > 0 ? 1 : 0}
        />
      ))}
    </svg>
  );
}

export function House({ day }: { readonly day: TodayJson }) {
  return (
    <RegisterTable
      caption="Fine grams of the house by place"
      columns={COLUMNS}
      rows={day.house}
      rowKey={(row) => row.metal}
      empty="The house holds no metal yet. Weigh in the first delivery, or enter what is there under Counter, opening stock."
    />
  );
}
