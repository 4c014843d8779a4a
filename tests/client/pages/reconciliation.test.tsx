/** The reconciliation page: a double rule only where the period adds up, and figures that open their vouchers. */
import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { render, screen, within } from '@testing-library/react';
import { Suspense } from 'react';
import { MemoryRouter } from 'react-router-dom';
import { describe, expect, it } from 'vitest';
import { ReconciliationPage } from '../../../src/pages/reports/reconciliation.tsx';
import { fakeServer, json } from '../support/fake-server.ts';
import { SESSION } from '../support/session.ts';

const masses = (gross_g: string, gold_g: string) => ({
  gross_g,
  gold_g,
  silver_g: '0.000000',
  platinum_g: '0.000000',
  palladium_g: '0.000000',
});

const SPAN = 'from=2026-04-01&to=2026-04-30';

function open(left_over: ReturnType<typeof masses>): void {
  fakeServer({
    'GET /session': json(SESSION),
    'GET /parties': json({ rows: [] }),
    [`GET /reports/reconciliation?${SPAN}&owner=house`]: json({
      from: '2026-04-01',
      to: '2026-04-30',
      owner: 'house',
      opening: masses('100.000000', '75.000000'),
      lines: [
        {
          line: 'from_suppliers',
          name: 'From suppliers',
          account_kind: null,
          ...masses('20.000000', '20.000000'),
        },
        { line: 'used_up', name: 'Used up', account_kind: 'used_up', ...masses('0.000000', '0.000000') },
      ],
      closing: masses('120.000000', '95.000000'),
      left_over,
      places: [],
    }),
  });
  render(
    <QueryClientProvider client={new QueryClient({ defaultOptions: { queries: { retry: false } } })}>
      <MemoryRouter initialEntries={[`/reports/reconciliation?${SPAN}`]}>
        <Suspense fallback="Reading the book …">
          <ReconciliationPage />
        </Suspense>
      </MemoryRouter>
    </QueryClientProvider>,
  );
}

describe('the reconciliation of a period', () => {
  it('draws the double rule where nothing is left over, and says nothing of a fault', async () => {
    open(masses('0.000000', '0.000000'));
    const closing = await screen.findByRole('row', { name: /^Closing, book/ });
    expect(closing.className).toBe('total');
    expect(screen.queryByRole('alert')).toBeNull();
  });

  it('draws no double rule where something is left over, and says so', async () => {
    open(masses('0.100000', '0.000000'));
    expect((await screen.findByRole('alert')).textContent).toContain('does not add up');
    expect(screen.getByRole('row', { name: /^Closing, book/ }).className).toBe('');
    expect(screen.getByRole('row', { name: /^Left over/ }).textContent).toContain('+0.100');
  });

  it('opens the vouchers of the period, the owner and the line behind a figure', async () => {
    open(masses('0.000000', '0.000000'));
    const line = await screen.findByRole('row', { name: /^From suppliers/ });
    const figures = within(line).getAllByRole('link');
    expect(figures.map((figure) => figure.textContent)).toEqual(['+20.000', '+20.000']);
    expect(figures[0]?.getAttribute('href')).toBe(
      `/reports/vouchers?${SPAN}&owner=house&line=from_suppliers`,
    );
  });

  it('leaves out the lines of which nothing came or went', async () => {
    open(masses('0.000000', '0.000000'));
    await screen.findByRole('row', { name: /^From suppliers/ });
    expect(screen.queryByRole('row', { name: /^Used up/ })).toBeNull();
  });
});
