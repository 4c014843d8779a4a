/** What can be read of the book, and where each report answers what. */
import { Link } from 'react-router-dom';
import { Page, Section } from '../../components/ui/page.tsx';
import { numberText } from '../../lib/formats.ts';
import { useSession } from '../../queries/session.ts';
import { paths } from '../../app/paths.ts';
import { ReportNav } from './nav.tsx';

const REPORTS = [
  {
    to: paths.balances,
    name: 'Balances',
    words: 'What lies where, of which metal and whose, at the end of any day, with its value.',
  },
  {
    to: paths.losses,
    name: 'Losses',
    words:
      'Loss against allowance by operation, bench, person, alloy, job or month, and what came back of it.',
  },
  {
    to: paths.reconciliation,
    name: 'Reconciliation',
    words: 'Opening, in, out, loss and closing of a period. Every figure opens its vouchers.',
  },
  {
    to: paths.refiners,
    name: 'Refiners',
    words: 'Each consignment: sent, expected, found, kept, credited, and the days it took.',
  },
  {
    to: paths.statement,
    name: 'Statements',
    words: 'The metal of one customer or supplier: movements, loss charged, what is owed.',
  },
  {
    to: paths.vouchers,
    name: 'Vouchers',
    words: 'Every voucher in its order, each with its entries, its hash and who signed it.',
  },
] as const;

export function ReportsPage() {
  const { book, workshop } = useSession();
  return (
    <Page
      title="Reports"
      lede={workshop.name}
      nav={<ReportNav />}
      margin={<p>Each report is told from the vouchers alone. What a page shows can be taken as CSV.</p>}
    >
      <Section heading="Read the book" notes={<p>Voucher {numberText(book.sequence)} is the last one.</p>}>
        <ul className="link-rows">
          {REPORTS.map(({ to, name, words }) => (
            <li key={to}>
              <Link to={to}>{name}</Link>
              <span>{words}</span>
            </li>
          ))}
        </ul>
      </Section>
    </Page>
  );
}
