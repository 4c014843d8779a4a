/**
 * The paper slip of a handover, the same at the counter and at the bench: what is taken over, fine and gross, which
 * lots, from whom, for which job. What is done with it (PIN, buttons) stands at its foot.
 */
import type { ReactNode } from 'react';
import { METALS } from '../../../shared/mass/vector.ts';
import type { HandoverRow } from '../../../shared/schemas/today.ts';
import { gramsFigure, isNothing, momentText, numberText } from '../../lib/formats.ts';
import { Figure, LabelledFigure } from '../ui/figure.tsx';
import { metalName } from '../ui/metal-key.tsx';
import { StatusWord } from '../ui/status-word.tsx';
import { LotChip, LotCode } from './lot-chip.tsx';

interface HandoverSlipProps {
  readonly handover: HandoverRow;
  /** Whether the reader may open the lots; a goldsmith sees their codes. */
  readonly links: boolean;
  readonly children: ReactNode;
}

export function HandoverSlip({ handover, links, children }: HandoverSlipProps) {
  const metals = METALS.filter((metal) => !isNothing(handover[`${metal}_g`]));
  const [chief, ...others] = metals;
  return (
    <div className="slip">
      <p className="slip-head">
        <StatusWord status={handover.state === 'disputed' ? 'Disputed' : 'Take over this metal'} />
        <span>V {numberText(handover.sequence)}</span>
      </p>
      <div className="slip-figures">
        <LabelledFigure label={chief === undefined ? 'Gross' : `Fine ${metalName(chief).toLowerCase()}`}>
          <Figure
            size={1}
            text={gramsFigure(chief === undefined ? handover.gross_g : handover[`${chief}_g`])}
            unit="g"
          />
        </LabelledFigure>
        {others.map((metal) => (
          <LabelledFigure key={metal} label={metalName(metal)}>
            <Figure text={gramsFigure(handover[`${metal}_g`])} unit="g" />
          </LabelledFigure>
        ))}
        {chief === undefined ? null : (
          <LabelledFigure label="Gross">
            <span className="slip-gross">{gramsFigure(handover.gross_g)} g</span>
          </LabelledFigure>
        )}
      </div>
      <dl className="slip-facts">
        <div>
          <dt>{handover.lots.length === 1 ? 'Lot' : 'Lots'}</dt>
          <dd>
            {handover.lots.map((lot) =>
              links ? (
                <LotChip key={lot.id} {...lot} />
              ) : (
                <span key={lot.id} className="block">
                  <LotCode code={lot.code} /> {lot.description}
                </span>
              ),
            )}
          </dd>
        </div>
        <Fact name="From" value={`${handover.from_name}, ${momentText(handover.recorded_at)}`} />
        <Fact name="To" value={`${handover.place_name}, ${handover.to_name}`} />
        <Fact name="For" value={handover.job_code ?? 'stock work'} />
      </dl>
      {children}
    </div>
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
