/** The registers of the workshop, as links above each of their pages. */
import { NavLink } from 'react-router-dom';

const PARTS = [
  ['/workshop', 'Places'],
  ['/workshop/people', 'People'],
  ['/workshop/parties', 'Parties'],
  ['/workshop/jobs', 'Jobs'],
  ['/workshop/alloys', 'Alloys'],
  ['/workshop/allowances', 'Operations & allowances'],
  ['/workshop/prices', 'Prices'],
  ['/workshop/settings', 'Limits & estimates'],
  ['/workshop/periods', 'Periods'],
] as const;

export function WorkshopNav() {
  return (
    <nav className="subnav" aria-label="Workshop">
      {PARTS.map(([to, name]) => (
        <NavLink key={to} to={to} end>
          {name}
        </NavLink>
      ))}
    </nav>
  );
}
