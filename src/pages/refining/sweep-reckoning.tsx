/** The estimate of a sweep-up: what each feeding operation gives, and how rich that makes the container. */
import type { Facts } from '../../../shared/book/facts.ts';
import { finenessOf, printPermille } from '../../../shared/alloy/fineness.ts';
import { sweepEstimate } from '../../../shared/events/refining/sweep-up.ts';
import { readTypedMass } from '../../../shared/mass/typed-mass.ts';
import { sumMass } from '../../../shared/mass/vector.ts';
import { Figure, LabelledFigure } from '../../components/ui/figure.tsx';
import { metalName } from '../../components/ui/metal-key.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import type { TypedWeighing } from '../../forms/typed.ts';
import { ugFigure, words } from '../../lib/formats.ts';
import { FineMasses, chiefMetal } from './fine-masses.tsx';

interface SweepReckoningProps {
  readonly facts: Facts;
  readonly bin_id: string;
  readonly weighing: TypedWeighing;
}

/** More than any container holds: the estimate before the container is weighed. */
const ANY_WEIGHT = 10n ** 15n;

function netTyped({ gross, tare }: TypedWeighing): bigint | null {
  const [read, empty] = [readTypedMass(gross), readTypedMass(tare.trim() === '' ? '0' : tare)];
  if (!read.ok || !empty.ok || read.ug <= empty.ug) return null;
  return read.ug - empty.ug;
}

export function SweepReckoning({ facts, bin_id, weighing }: SweepReckoningProps) {
  if (bin_id === '') return <p className="none">Choose the bin first; then its estimate shows here.</p>;
  const feeds = facts.bin_feeds.filter((feed) => feed.bin_id === bin_id);
  const net = netTyped(weighing);
  const shares = sweepEstimate(feeds, facts.unswept, net ?? ANY_WEIGHT);
  const expected = sumMass(shares.map(({ metal }) => metal));
  const chief = chiefMetal(expected);
  const rich = net === null ? null : finenessOf({ ...expected, gross: net });
  return (
    <>
      {chief === null ? null : (
        <div className="figures mb-5">
          <LabelledFigure
            label={`Fine ${metalName(chief).toLowerCase()} expected`}
            under={<StatusWord status="Estimate" />}
          >
            <Figure size={1} text={ugFigure(expected[chief])} unit="g" />
          </LabelledFigure>
          {net === null || rich === null ? null : (
            <LabelledFigure
              label="Of the container’s net"
              under={`${printPermille(rich[chief])} per thousand ${metalName(chief).toLowerCase()}`}
            >
              <Figure text={ugFigure(net)} unit="g gross" />
            </LabelledFigure>
          )}
        </div>
      )}
      <RegisterTable
        caption="What each operation gives to the estimate"
        rows={shares}
        rowKey={(share) => `${share.operation}${share.bench_id ?? ''}`}
        empty={
          feeds.length === 0
            ? 'This bin names no operation that feeds it.'
            : 'Nothing was lost into this bin since it was last swept up.'
        }
        emptyWords={
          feeds.length === 0
            ? 'Set its rates under Workshop, allowances.'
            : 'Its dust is foreign matter only.'
        }
        columns={[
          { id: 'operation', head: 'Operation', cell: (share) => words(share.operation) },
          {
            id: 'bench',
            head: 'Bench',
            cell: (share) =>
              share.bench_id === null
                ? 'every bench'
                : (facts.accounts.get(share.bench_id)?.name ?? 'a bench'),
          },
          {
            id: 'fine',
            head: 'Expected, g fine',
            figure: 'fine',
            cell: (share) => <FineMasses mass={share.metal} />,
          },
        ]}
      />
    </>
  );
}
