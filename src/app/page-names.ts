/** The pages that the scan field finds by name: "/", "rec", Enter opens the reconciliation. */
import type { Action } from '../../shared/permissions.ts';
import { paths } from './paths.ts';

interface PageName {
  readonly name: string;
  readonly to: string;
  readonly needs: Action;
}

const PAGES: readonly PageName[] = [
  { name: 'Today', to: paths.today, needs: 'book.read' },
  { name: 'Weigh in', to: paths.weighIn, needs: 'book.weigh_in' },
  { name: 'Issue', to: paths.issue, needs: 'book.issue' },
  { name: 'Weigh back', to: paths.weighBack, needs: 'book.weigh_back' },
  { name: 'Lots', to: paths.lots, needs: 'book.read' },
  { name: 'Sweeps and refining', to: paths.refining, needs: 'book.read' },
  { name: 'Balances', to: paths.balances, needs: 'report.read' },
  { name: 'Losses', to: paths.losses, needs: 'report.read' },
  { name: 'Reconciliation', to: paths.reconciliation, needs: 'report.read' },
  { name: 'Vouchers', to: paths.vouchers, needs: 'book.read' },
  { name: 'Insurance and audit', to: paths.insurance, needs: 'dossier.read' },
  { name: 'Check a dossier', to: paths.verify, needs: 'dossier.read' },
  { name: 'Workshop', to: paths.workshop, needs: 'people.read' },
  { name: 'My account', to: paths.account, needs: 'session.read' },
];

/** Pages whose name has a word that begins so, of those that the person may open. */
export function pagesNamed(typed: string, may: readonly string[]): readonly PageName[] {
  const start = typed.trim().toLowerCase();
  if (start === '') return [];
  return PAGES.filter(
    ({ name, needs }) =>
      may.includes(needs) &&
      name
        .toLowerCase()
        .split(' ')
        .some((_, index, words) => words.slice(index).join(' ').startsWith(start)),
  );
}
