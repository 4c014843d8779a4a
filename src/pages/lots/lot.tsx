/** One lot: what it is, where it lies, its family, its custody trail; held, released, given to another owner. */
import { useParams } from 'react-router-dom';
import { Link } from 'react-router-dom';
import type { LotWhole } from '../../../shared/schemas/lots.ts';
import { paths } from '../../app/paths.ts';
import { kindIcon } from '../../components/domain/kind-icon.ts';
import { LotCode, formIcon } from '../../components/domain/lot-chip.tsx';
import { FineCell } from '../../components/domain/fine-cell.tsx';
import { LinkButton } from '../../components/ui/button.tsx';
import { CompositionBar } from '../../components/ui/composition-bar.tsx';
import { Figure, Grams, LabelledFigure } from '../../components/ui/figure.tsx';
import { Icon } from '../../components/ui/icon.tsx';
import { metalName } from '../../components/ui/metal-key.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import { METALS } from '../../../shared/mass/vector.ts';
import { dayText, gramsFigure, isNothing, momentText, numberText, words } from '../../lib/formats.ts';
import { useLot } from '../../queries/lots.ts';
import { useSession } from '../../queries/session.ts';
import { Family } from './family.tsx';
import { LotStanding } from './standing.tsx';

const STANDINGS = { released: 'Released', on_hold: 'On hold', spent: 'Spent' } as const;

export function Lot() {
  const { id = '' } = useParams();
  const lot = useLot(id);
  const session = useSession();
  const chief = METALS.find((metal) => !isNothing(lot[`${metal}_g`]));
  return (
    <Page
      title={lot.code}
      drawn={
        <>
          <Icon name={formIcon(lot.form)} size={30} /> <LotCode code={lot.code} />
        </>
      }
      lede={lot.description}
      margin="Lot"
      actions={
        <>
          {session.can('book.issue') && lot.standing === 'released' ? (
            <LinkButton kind="primary" icon="out" to={`${paths.issue}?lot=${lot.id}`}>
              Issue
            </LinkButton>
          ) : null}
          <a className="btn" href={`/api/v1/lots/${lot.id}/label`} target="_blank" rel="noreferrer">
            <Icon name="print" /> Label
          </a>
        </>
      }
    >
      <Section
        heading="What it is"
        notes={<p>{`Fineness is ${lot.basis}. The figures are what its masses say now.`}</p>}
      >
        <div className="figures mb-4">
          <LabelledFigure
            label={
              chief === undefined
                ? 'Gross'
                : `Fine ${metalName(chief).toLowerCase()}${lot.basis === 'estimated' ? ', estimated' : ''}`
            }
            under={`gross ${gramsFigure(lot.gross_g)} g`}
          >
            <Figure
              size={1}
              text={gramsFigure(chief === undefined ? lot.gross_g : lot[`${chief}_g`])}
              unit="g"
            />
          </LabelledFigure>
          <dl className="facts min-w-[280px] flex-1">
            <Fact name="Form" value={words(lot.form)} />
            <Fact name="Alloy" value={lot.alloy ?? 'none'} />
            <Fact name="Owner" value={lot.owner_name ?? 'House'} />
            <Fact name="Origin" value={words(lot.origin)} />
            <div>
              <dt>Standing</dt>
              <dd>
                <StatusWord status={STANDINGS[lot.standing]} />
              </dd>
            </div>
            <Fact name="Described" value={`${dayText(lot.described_on)}, gold ${lot.gold_permille}`} />
          </dl>
        </div>
        <CompositionBar masses={lot} />
        <LotStanding lot={lot} />
      </Section>
      <Section heading="Where it lies">
        <RegisterTable
          caption="Where it lies"
          columns={PLACES}
          rows={lot.holdings}
          rowKey={(row) => row.account_id}
          empty="Nothing of it lies anywhere any more."
          total={[
            'In the book',
            '',
            <Grams key="g" grams={lot.gross_g} />,
            <FineCell key="f" masses={lot} />,
          ]}
        />
      </Section>
      <Section heading="Family" notes={<p>What it came from, and what came of it.</p>}>
        <Family lot={lot} />
      </Section>
      <Section heading="Custody" notes={<p>Newest first. Nothing here can be changed, only reversed.</p>}>
        <Trail lot={lot} />
      </Section>
    </Page>
  );
}

function Fact({ name, value }: { readonly name: string; readonly value: string }) {
  return (
    <div>
      <dt>{name}</dt>
      <dd>{value}</dd>
    </div>
  );
}

type Held = LotWhole['holdings'][number];

const PLACES: readonly Column<Held>[] = [
  {
    id: 'place',
    head: 'Place',
    value: (row) => row.account_name,
    cell: (row) => `${row.account_name}${row.custodian_name === null ? '' : `, ${row.custodian_name}`}`,
  },
  { id: 'since', head: 'Since', value: (row) => row.since, cell: (row) => dayText(row.since) },
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

function Trail({ lot }: { readonly lot: LotWhole }) {
  return (
    <ol className="history">
      {lot.trail.map((step) => (
        <li key={step.sequence}>
          <span className="text-ink-2">{momentText(step.recorded_at)}</span>
          <span className="mark">
            <Icon name={kindIcon(step.kind)} size={18} />
          </span>
          <span>
            <b>{words(step.kind)}</b>
            {step.reversed ? ', reversed' : ''}
            <br />
            <small className="text-ink-2">
              {step.from_names ?? 'nowhere'} to {step.to_names ?? 'nowhere'}
              {step.job_code === null ? '' : `, job ${step.job_code}`}, {step.recorded_by_name}
            </small>
          </span>
          <b className="fig">{gramsFigure(step.gross_g)} g</b>
          <Link to={paths.voucher(step.sequence)}>V {numberText(step.sequence)}</Link>
        </li>
      ))}
    </ol>
  );
}
