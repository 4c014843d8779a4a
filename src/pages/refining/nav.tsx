/** The pages of refining beside each other. */
import { NavLink } from 'react-router-dom';
import { useSession } from '../../queries/session.ts';
import { paths } from '../../app/paths.ts';

export function RefiningNav() {
  const { can } = useSession();
  return (
    <nav className="subnav" aria-label="Sweeps and refining">
      <NavLink to={paths.refining} end>
        Overview
      </NavLink>
      {can('book.sweep_up') ? <NavLink to={paths.sweepUp}>Sweep up</NavLink> : null}
      {can('book.consign') ? <NavLink to={paths.consign}>Consign</NavLink> : null}
      <NavLink to={paths.metalAccounts}>Metal accounts</NavLink>
    </nav>
  );
}
