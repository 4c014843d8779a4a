/** The register table: figures sort by size, totals stand apart, one stop for the keyboard, long lists in parts. */
import { fireEvent, render, screen, within } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import type { Column } from '../../../src/components/ui/register-table.tsx';
import { RegisterTable } from '../../../src/components/ui/register-table.tsx';

interface Row {
  readonly place: string;
  readonly fine: string;
}

const columns: readonly Column<Row>[] = [
  {
    id: 'place',
    head: 'Place',
    cell: (row) => <a href={`#${row.place}`}>{row.place}</a>,
    value: (row) => row.place,
  },
  { id: 'gold_g', head: 'Fine, g', figure: 'fine', cell: (row) => row.fine, value: (row) => row.fine },
  { id: 'note', head: 'Note', cell: () => 'none' },
];

const ROWS: readonly Row[] = [
  { place: 'Bench 10', fine: '12.450000' },
  { place: 'Bench 2', fine: '12.500000' },
  { place: 'Bench 1', fine: '-3.000000' },
  { place: 'Casting', fine: '108.000000' },
];

function show(rows: readonly Row[], total?: readonly string[]) {
  return render(
    <RegisterTable
      caption="Where it lies"
      columns={columns}
      rows={rows}
      rowKey={(row) => row.place}
      total={total}
      empty="Nothing is out of the safe."
    />,
  );
}

const shown = () => screen.getAllByRole('rowheader').map((cell) => cell.textContent);

describe('sorting', () => {
  it('puts figures in order of size, whatever their decimals and signs', () => {
    show(ROWS);
    fireEvent.click(screen.getByRole('button', { name: 'Fine, g' }));
    expect(shown()).toEqual(['Bench 1', 'Bench 10', 'Bench 2', 'Casting']);
    fireEvent.click(screen.getByRole('button', { name: 'Fine, g' }));
    expect(shown()).toEqual(['Casting', 'Bench 2', 'Bench 10', 'Bench 1']);
  });

  it('puts bench 2 before bench 10', () => {
    show(ROWS);
    fireEvent.click(screen.getByRole('button', { name: 'Place' }));
    expect(shown()).toEqual(['Bench 1', 'Bench 2', 'Bench 10', 'Casting']);
  });

  it('says which column it goes by, and offers none where there is nothing to go by', () => {
    show(ROWS);
    fireEvent.click(screen.getByRole('button', { name: 'Place' }));
    expect(screen.getByRole('columnheader', { name: 'Place' }).getAttribute('aria-sort')).toBe('ascending');
    expect(screen.queryByRole('button', { name: 'Note' })).toBeNull();
  });
});

it('has a name, column heads and row heads', () => {
  show(ROWS, ['All', '129.950', '']);
  const table = screen.getByRole('table', { name: 'Where it lies' });
  expect(within(table).getAllByRole('columnheader')).toHaveLength(3);
  expect(within(table).getByRole('rowheader', { name: 'All' }).closest('tr')?.className).toBe('total');
});

it('is one stop for the keyboard; arrow keys then go from row to row', () => {
  show(ROWS);
  const links = screen.getAllByRole('link');
  expect(links.map((link) => link.tabIndex)).toEqual([0, -1, -1, -1]);
  links[0]?.focus();
  fireEvent.keyDown(document.activeElement ?? document.body, { key: 'ArrowDown' });
  expect(document.activeElement?.textContent).toBe('Bench 2');
  fireEvent.keyDown(document.activeElement ?? document.body, { key: 'ArrowUp' });
  expect(document.activeElement?.textContent).toBe('Bench 10');
});

it('says in words that there is nothing', () => {
  show([]);
  expect(screen.getByText('Nothing is out of the safe.')).toBeTruthy();
  expect(screen.queryByRole('table')).toBeNull();
});

it('shows a long list in parts and offers the rest', () => {
  const many = Array.from({ length: 450 }, (_, index) => ({ place: `Place ${index}`, fine: '1.000000' }));
  show(many);
  expect(shown()).toHaveLength(200);
  fireEvent.click(screen.getByRole('button', { name: 'Show more, 200 of 450 are here' }));
  fireEvent.click(screen.getByRole('button', { name: 'Show more, 400 of 450 are here' }));
  expect(shown()).toHaveLength(450);
  expect(screen.queryByRole('button', { name: /Show more/ })).toBeNull();
});
