/** The reports beside each other, and the filter that each keeps in its address. */
import { NavLink, useSearchParams } from 'react-router-dom';
import { paths } from '../../app/paths.ts';

const REPORTS = [
  { to: paths.balances, name: 'Balances' },
  { to: paths.losses, name: 'Losses' },
  { to: paths.reconciliation, name: 'Reconciliation' },
  { to: paths.refiners, name: 'Refiners' },
  { to: paths.statement, name: 'Statements' },
  { to: paths.vouchers, name: 'Vouchers' },
] as const;

export function ReportNav() {
  return (
    <nav className="subnav" aria-label="Reports">
      {REPORTS.map(({ to, name }) => (
        <NavLink key={to} to={to}>
          {name}
        </NavLink>
      ))}
    </nav>
  );
}

/** Filters as they stand in the address: a link to a report shows what the sender saw. */
export function useAddressFilter<Filter extends Readonly<Record<string, string>>>(initial: Filter) {
  const [query, setQuery] = useSearchParams();
  const filter = Object.fromEntries(
    Object.entries(initial).map(([name, value]) => [name, query.get(name) ?? value]),
  );
  const set = (change: Partial<Filter>) => setQuery({ ...filter, ...definite(change) }, { replace: true });
  return [{ ...initial, ...filter }, set] as const;
}

function definite(change: Readonly<Record<string, string | undefined>>): Record<string, string> {
  return Object.fromEntries(
    Object.entries(change).flatMap(([name, value]) => (value === undefined ? [] : [[name, value]])),
  );
}
