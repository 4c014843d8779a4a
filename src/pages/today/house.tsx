/** Where the house's metal lies, metal by metal: safe, benches, bins, outside; with a bar to one scale. */
import type { TodayJson } from '../../../shared/schemas/today.ts';
import { gramsText } from '../../../shared/mass/grams-text.ts';
import { Grams } from '../../components/ui/figure.tsx';
import { MetalKey } from '../../components/ui/metal-key.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { ShareBar, ShareKey } from '../../components/ui/share-bar.tsx';

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

const PLACES = [
  { name: 'Safe', ground: 'ink', grams: (row: Row) => row.safe_g },
  { name: 'Benches and stations', ground: 'brass', grams: (row: Row) => row.benches_g },
  { name: 'Sweeps bins', ground: 'grain', grams: (row: Row) => row.bins_g },
  { name: 'Courier and refiner', ground: 'open', grams: (row: Row) => row.outside_g },
] as const;

function Bar({ row }: { readonly row: Row }) {
  return (
    <ShareBar
      parts={PLACES.map(({ name, ground, grams }) => ({ name, ground, ug: gramsText(grams(row)) }))}
    />
  );
}

export function House({ day }: { readonly day: TodayJson }) {
  return (
    <>
      <RegisterTable
        caption="Fine grams of the house by place"
        columns={COLUMNS}
        rows={day.house}
        rowKey={(row) => row.metal}
        empty="The house holds no metal yet. Weigh in the first delivery, or enter what is there under Counter, opening stock."
      />
      {day.house.length === 0 ? null : <ShareKey parts={PLACES} />}
    </>
  );
}
