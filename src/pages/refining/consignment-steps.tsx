/** The way of a consignment: sent, received, melted, assayed, credited, each with its day and mass. */
import type { ReactNode } from 'react';
import { gramsText } from '../../../shared/mass/grams-text.ts';
import type { Metal } from '../../../shared/mass/vector.ts';
import { Figure } from '../../components/ui/figure.tsx';
import { metalName } from '../../components/ui/metal-key.tsx';
import { dayText, ugFigure } from '../../lib/formats.ts';
import { chiefMetal } from './fine-masses.tsx';
import type { Consignment } from './use-consignment.ts';
import { readOutturn } from './use-consignment.ts';

export function ConsignmentSteps({
  consignment,
  now,
}: {
  readonly consignment: Consignment;
  readonly now: Step;
}) {
  const { sent, arrived, arrived_on, outturns } = consignment;
  const metal = chiefMetal(sent) ?? 'gold';
  const rows = outturns.flatMap((voucher) => readOutturn(voucher.detail)?.lines ?? []);
  const settled_on = outturns.at(-1)?.business_date ?? null;
  const melted = [...new Map(rows.map((row) => [row.lot_id, row.after_melt_g])).values()];
  const of = (key: 'assayed_g' | 'credited_g', which: Metal) =>
    rows.filter((row) => row.metal === which).reduce((sum, row) => sum + gramsText(row[key]), 0n);
  const fine = `fine ${metalName(metal).toLowerCase()}`;
  return (
    <ol className="steps">
      <StepItem name="Sent" day={consignment.sent_on} ug={sent.gross} what="gross" now={now === 'sent'} />
      <StepItem name="Received" day={arrived_on} ug={arrived.gross} what="gross" now={now === 'received'} />
      <StepItem
        name="Burnt and melted"
        day={melted.some((grams) => grams !== null) ? settled_on : null}
        ug={melted.reduce((sum, grams) => sum + (grams === null ? 0n : gramsText(grams)), 0n)}
        what="bar"
        now={false}
        otherwise={settled_on === null ? 'not yet' : 'not named'}
      />
      <StepItem name="Assayed" day={settled_on} ug={of('assayed_g', metal)} what={fine} now={false} />
      <StepItem
        name="Credited"
        day={settled_on}
        ug={of('credited_g', metal)}
        what={fine}
        now={now === 'credited'}
      />
    </ol>
  );
}

export type Step = 'sent' | 'received' | 'credited';

interface StepProps {
  readonly name: string;
  readonly day: string | null;
  readonly ug: bigint;
  readonly what: ReactNode;
  readonly now: boolean;
  /** What is said where there is no day. */
  readonly otherwise?: string;
}

function StepItem({ name, day, ug, what, now, otherwise = 'not yet' }: StepProps) {
  return (
    <li className={day === null && !now ? 'ahead' : ''} aria-current={now ? 'step' : undefined}>
      <b>{name}</b>
      {day === null ? (
        <span className="none">{otherwise}</span>
      ) : (
        <>
          <span className="fig-label">{dayText(day)}</span>
          <div>
            <Figure text={ugFigure(ug)} unit="g" />
          </div>
          <span className="fig-under">{what}</span>
        </>
      )}
    </li>
  );
}
