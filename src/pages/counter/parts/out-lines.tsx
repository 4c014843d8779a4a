/** The left side of a weigh-back: what the bench holds for the job, with its totals. */
import type { Facts } from '../../../../shared/book/facts.ts';
import type { JobHolding } from '../../../../shared/book/holding.ts';
import { METALS, sumMass } from '../../../../shared/mass/vector.ts';
import { LotChip } from '../../../components/domain/lot-chip.tsx';
import { metalSymbol } from '../../../components/ui/metal-key.tsx';
import { ugFigure } from '../../../lib/formats.ts';

/** What a place holds for a job; "none" is stock work, null is no job chosen. */
export function outOf(facts: Facts, place_id: string, job: string | null): readonly JobHolding[] {
  if (job === null) return [];
  const job_id = job === 'none' ? null : job;
  return facts.job_holdings.filter(
    (row) => row.account_id === place_id && row.job_id === job_id && row.mass.gross > 0n,
  );
}

export function OutLines({ facts, out }: { readonly facts: Facts; readonly out: readonly JobHolding[] }) {
  const total = sumMass(out.map((row) => row.mass));
  return (
    <section aria-label="Out to the bench">
      <h2>Out to the bench</h2>
      {out.map((row) => {
        const lot = facts.lots.get(row.lot_id);
        return lot === undefined ? null : (
          <div className="line" key={row.lot_id}>
            <LotChip {...lot} />
            <span className="fig text-right text-ink-2">{ugFigure(row.mass.gross)} g</span>
            <span className="text-right">
              {METALS.filter((metal) => row.mass[metal] > 0n).map((metal) => (
                <b className="fig block" key={metal}>
                  {ugFigure(row.mass[metal])} {metalSymbol(metal)}
                </b>
              ))}
            </span>
          </div>
        );
      })}
      <div className="side-total">
        <span>Out</span>
        <span className="fig">{ugFigure(total.gross)} g</span>
      </div>
    </section>
  );
}
