/** What is done at the counter: the everyday acts first, the rare ones after them. */
import { Link } from 'react-router-dom';
import { paths } from '../../app/paths.ts';
import { LinkButton } from '../../components/ui/button.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { MOVES } from './moves.ts';

export function Counter() {
  return (
    <Page
      title="Counter"
      lede="Weigh it, and the book follows."
      first={
        <p className="mt-4 flex flex-wrap gap-2">
          <LinkButton counter kind="primary" icon="in" to={paths.weighIn}>
            Weigh in
          </LinkButton>
          <LinkButton counter icon="out" to={paths.issue}>
            Issue
          </LinkButton>
          <LinkButton counter icon="back" to={paths.weighBack}>
            Weigh back
          </LinkButton>
          <LinkButton counter icon="work" to="/counter/move/deliver">
            Deliver
          </LinkButton>
        </p>
      }
    >
      <Section
        heading="Other acts"
        notes={<p>Each is posted with its own voucher and shown before it is.</p>}
      >
        <ul className="m-0 list-none p-0">
          {Object.entries(MOVES).map(([what, move]) => (
            <li key={what} className="border-b border-rule py-3">
              <Link to={`/counter/move/${what}`}>{move.title}</Link>
              <br />
              <small className="text-ink-2">{move.words}</small>
            </li>
          ))}
          <li className="py-3">
            <Link to={paths.opening}>Opening stock</Link>
            <br />
            <small className="text-ink-2">What was counted when the book began.</small>
          </li>
        </ul>
      </Section>
    </Page>
  );
}
