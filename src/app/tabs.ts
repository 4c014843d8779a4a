/** The index tabs that each role sees; no entry leads to what the role may not do. */
import type { IconName } from '../components/ui/icon.tsx';
import type { Session } from '../queries/session.ts';
import { paths } from './paths.ts';

export interface Tab {
  readonly to: string;
  readonly name: string;
  readonly icon: IconName;
}

const TODAY: Tab = { to: paths.today, name: 'Today', icon: 'cal' };
const COUNTER: Tab = { to: paths.counter, name: 'Counter', icon: 'balance' };
const BENCH: Tab = { to: paths.myBench, name: 'My bench', icon: 'bench' };
const LOTS: Tab = { to: paths.lots, name: 'Lots', icon: 'sheet' };
const REFINING: Tab = { to: paths.refining, name: 'Sweeps & refining', icon: 'sweeps' };
const REPORTS: Tab = { to: paths.reports, name: 'Reports', icon: 'book' };
const INSURANCE: Tab = { to: paths.insurance, name: 'Insurance & audit', icon: 'seal' };
const WORKSHOP: Tab = { to: paths.workshop, name: 'Workshop', icon: 'safe' };
const ACCOUNT: Tab = { to: paths.account, name: 'My account', icon: 'user' };

export function tabsFor(session: Session): readonly Tab[] {
  switch (session.person.role) {
    case 'goldsmith':
      return [BENCH, ACCOUNT];
    case 'auditor':
      return [TODAY, LOTS, REFINING, REPORTS, INSURANCE, WORKSHOP];
    case 'keeper':
    case 'proprietor':
      return [TODAY, COUNTER, LOTS, REFINING, REPORTS, INSURANCE, WORKSHOP];
  }
}
