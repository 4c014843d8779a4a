/** Sweeps and refining at a glance: what the bins should hold by now, the containers, what is with the refiner. */
import { Link } from 'react-router-dom';
import type { Facts } from '../../../shared/book/facts.ts';
import { MIXED_FORMS } from '../../../shared/book/lot.ts';
import { sweepEstimate } from '../../../shared/events/refining/sweep-up.ts';
import { sumMass } from '../../../shared/mass/vector.ts';
import { LotChip } from '../../components/domain/lot-chip.tsx';
import { LinkButton } from '../../components/ui/button.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import { dayText, ugFigure, words } from '../../lib/formats.ts';
import { useFacts } from '../../queries/facts.ts';
import { useAccounts } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import { useToday } from '../../queries/today.ts';
import { paths } from '../../app/paths.ts';
import { FineMasses } from './fine-masses.tsx';
import { RefiningNav } from './nav.tsx';

export function RefiningPage() {
  const { can } = useSession();
  const places = useAccounts().filter(({ kind, closed }) => !closed && (kind === 'bin' || kind === 'safe'));
  const bins = places.filter(({ kind }) => kind === 'bin');
  const facts = useFacts({ place_ids: places.map(({ id }) => id), bin_ids: bins.map(({ id }) => id) });
  return (
    <Page
      title="Sweeps & refining"
      nav={<RefiningNav />}
      margin={<p>What is swept up is an estimate until a refiner’s outturn says what was in it.</p>}
      actions={
        <>
          {can('book.sweep_up') ? (
            <LinkButton to={paths.sweepUp} icon="sweeps">
              Sweep up a bin
            </LinkButton>
          ) : null}
          {can('book.consign') ? (
            <LinkButton to={paths.consign} icon="courier">
              Consign to a refiner
            </LinkButton>
          ) : null}
        </>
      }
    >
      <Section
        heading="Bins"
        notes={<p>Each feeding operation’s loss since the last sweep-up, times the bin’s rate.</p>}
      >
        <Bins bins={bins} facts={facts} />
      </Section>
      <Section heading="Containers" notes={<p>One lot each, consigned whole.</p>}>
        <Containers facts={facts} />
      </Section>
      <Section heading="Consignments" notes={<p>On the way, or at the refiner and not settled yet.</p>}>
        <Consignments />
      </Section>
    </Page>
  );
}

/** More than any bin holds, so that no estimate is cut down to a container. */
const ANY_WEIGHT = 10n ** 15n;

interface BinsProps {
  readonly bins: readonly { readonly id: string; readonly name: string }[];
  readonly facts: Facts;
}

function Bins({ bins, facts }: BinsProps) {
  const { can } = useSession();
  const rows = bins.map((bin) => {
    const feeds = facts.bin_feeds.filter((feed) => feed.bin_id === bin.id);
    const shares = sweepEstimate(feeds, facts.unswept, ANY_WEIGHT);
    return { ...bin, feeds, expected: sumMass(shares.map(({ metal }) => metal)) };
  });
  return (
    <RegisterTable
      caption="Bins and what is expected in them"
      rows={rows}
      rowKey={(row) => row.id}
      empty="The workshop has no bin yet."
      emptyWords="Bins for floor, polishing and the sink trap are opened under Workshop, places."
      columns={[
        { id: 'name', head: 'Bin', cell: (row) => <b>{row.name}</b>, value: (row) => row.name },
        {
          id: 'feeds',
          head: 'Fed by',
          cell: (row) =>
            row.feeds.length === 0 ? (
              <span className="none">no operation named</span>
            ) : (
              [...new Set(row.feeds.map((feed) => words(feed.operation)))].join(', ')
            ),
        },
        {
          id: 'expected',
          head: 'Expected since the last sweep-up, g',
          figure: 'fine',
          cell: (row) => <FineMasses mass={row.expected} />,
        },
        { id: 'state', head: '', cell: () => <StatusWord status="Estimate" /> },
        ...(can('book.sweep_up')
          ? [
              {
                id: 'act',
                head: '',
                cell: (row: BinsProps['bins'][number]) => (
                  <Link to={`${paths.sweepUp}?bin=${row.id}`}>Sweep up</Link>
                ),
              },
            ]
          : []),
      ]}
    />
  );
}

function Containers({ facts }: { readonly facts: Facts }) {
  const rows = facts.holdings.flatMap((held) => {
    const lot = facts.lots.get(held.lot_id);
    const mixed = lot !== undefined && MIXED_FORMS.some((form) => form === lot.form);
    return mixed && held.mass.gross > 0n ? [{ ...held, lot }] : [];
  });
  return (
    <RegisterTable
      caption="Containers of sweeps, polishings, filings, sludge and old gold"
      rows={rows}
      rowKey={(row) => `${row.account_id}${row.lot_id}`}
      empty="No container stands anywhere."
      emptyWords="A bin that is swept up becomes a container with a lot of its own."
      columns={[
        { id: 'lot', head: 'Lot', cell: ({ lot }) => <LotChip {...lot} />, value: ({ lot }) => lot.code },
        {
          id: 'place',
          head: 'Stands at',
          cell: (row) => facts.accounts.get(row.account_id)?.name ?? 'a place',
          value: (row) => facts.accounts.get(row.account_id)?.name ?? '',
        },
        {
          id: 'basis',
          head: 'Content is',
          cell: ({ lot }) => words(lot.basis),
          value: ({ lot }) => lot.basis,
        },
        { id: 'fine', head: 'Fine, g', figure: 'fine', cell: (row) => <FineMasses mass={row.mass} /> },
        {
          id: 'gross',
          head: 'Gross, g',
          figure: 'gross',
          cell: (row) => ugFigure(row.mass.gross),
          value: (row) => row.mass.gross.toString(),
        },
      ]}
    />
  );
}

function Consignments() {
  const { consignments } = useToday();
  return (
    <RegisterTable
      caption="Open consignments"
      rows={consignments}
      rowKey={(row) => row.id}
      empty="Nothing is with a courier or a refiner."
      emptyWords="A consignment shows here from the day it leaves until its outturn has settled all of it."
      emptyAction={<Link to={`${paths.vouchers}?kind=consign`}>See earlier consignments</Link>}
      columns={[
        {
          id: 'code',
          head: 'Consignment',
          cell: (row) => <Link to={paths.consignment(row.id)}>{row.code}</Link>,
          value: (row) => row.code,
        },
        { id: 'to', head: 'To', cell: (row) => row.destination_name, value: (row) => row.destination_name },
        {
          id: 'sent',
          head: 'Sent',
          cell: (row) => dayText(row.business_date),
          value: (row) => row.business_date,
        },
        {
          id: 'state',
          head: 'Stands',
          cell: (row) => <StatusWord status={row.state === 'on_the_way' ? 'On the way' : 'Waiting'} />,
          value: (row) => row.state,
        },
      ]}
    />
  );
}
