/** My bench: metal to take over, what lies there by job, and asking the counter for more. */
import { Page, Section } from '../../components/ui/page.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { FineCell } from '../../components/domain/fine-cell.tsx';
import { LotChip } from '../../components/domain/lot-chip.tsx';
import { Grams } from '../../components/ui/figure.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { longDayText } from '../../lib/formats.ts';
import type { MyBenchJson } from '../../../shared/schemas/today.ts';
import { useSession } from '../../queries/session.ts';
import { useMyBench } from '../../queries/today.ts';
import { AskForMetal } from './ask-for-metal.tsx';
import { TakeOverSlip } from './take-over-slip.tsx';

type Held = MyBenchJson['holdings'][number];

const plain = (row: Held) => `${row.lot.code} ${row.lot.description}`;

export function MyBench() {
  const bench = useMyBench();
  const session = useSession();
  const canOpen = session.can('book.read');
  const columns: readonly Column<Held>[] = [
    {
      id: 'lot',
      head: 'Lot',
      value: plain,
      cell: (row) => (canOpen ? <LotChip {...row.lot} /> : <b>{plain(row)}</b>),
    },
    {
      id: 'job',
      head: 'Job',
      value: (row) => row.job_code ?? '',
      cell: (row) => row.job_code ?? 'stock work',
    },
    { id: 'pieces', head: 'Pieces', cell: (row) => row.pieces ?? <span className="none">none</span> },
    {
      id: 'gross_g',
      head: 'Gross, g',
      figure: 'gross',
      value: (row) => row.gross_g,
      cell: (row) => <Grams grams={row.gross_g} />,
    },
    {
      id: 'gold_g',
      head: 'Fine, g',
      figure: 'fine',
      value: (row) => row.gold_g,
      cell: (row) => <FineCell masses={row} />,
    },
  ];
  return (
    <Page
      title="My bench"
      lede={bench.places.map((place) => place.name).join(', ') || 'No bench is in your charge yet.'}
      margin={
        <p>
          Business day
          <br />
          <b className="text-ink">{longDayText(session.today)}</b>
        </p>
      }
      first={
        session.person.has_pin ? undefined : (
          <div className="mt-4">
            <Notice severity="near" what="You have no handover PIN yet.">
              Set one under My account; then you can take metal over at the counter.
            </Notice>
          </div>
        )
      }
    >
      <Section
        heading="To take over"
        notes={
          <p>
            Weigh it before you say that you have it. If the weight differs, say so: it is weighed again
            before both.
          </p>
        }
      >
        {bench.handovers.length === 0 ? (
          <p className="none">Nothing waits for you.</p>
        ) : (
          bench.handovers.map((handover) => <TakeOverSlip key={handover.id} handover={handover} />)
        )}
      </Section>
      <Section heading="What I hold" notes={<p>By job, as it stands in the book.</p>}>
        <RegisterTable
          caption="What lies at my bench"
          columns={columns}
          rows={bench.holdings}
          rowKey={(row) => `${row.account_id}${row.lot.id}${row.job_id ?? ''}`}
          empty="Nothing lies at your bench. What the counter issues to you shows here."
        />
      </Section>
      {bench.places.length === 0 ? null : (
        <Section heading="Ask for metal" notes={<p>It shows at the counter at once.</p>}>
          <AskForMetal bench={bench} />
        </Section>
      )}
    </Page>
  );
}
