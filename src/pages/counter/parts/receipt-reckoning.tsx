/** A line's reckoning: fine into the safe, the difference to the invoice on an index plate, and the decision it asks for. */
import type { Facts } from '../../../../shared/book/facts.ts';
import { fineness, isPossibleFineness } from '../../../../shared/alloy/fineness.ts';
import { invoiceDifference } from '../../../../shared/events/invoice-difference.ts';
import { massFromFineness } from '../../../../shared/mass/apportion.ts';
import { readTypedMass } from '../../../../shared/mass/typed-mass.ts';
import { METALS } from '../../../../shared/mass/vector.ts';
import { printGrams } from '../../../../shared/mass/micrograms.ts';
import { Choices } from '../../../components/ui/choice.tsx';
import { Figure, LabelledFigure } from '../../../components/ui/figure.tsx';
import { IndexPlate } from '../../../components/ui/index-plate.tsx';
import { metalName } from '../../../components/ui/metal-key.tsx';
import { StatusWord } from '../../../components/ui/status-word.tsx';
import { typedFigure } from '../../../forms/typed.ts';
import { moneyText, ugFigure } from '../../../lib/formats.ts';
import type { ReceiptLine } from './receipt-line.ts';

const DECISIONS = [
  {
    value: 'accept',
    label: 'Accept as weighed',
    words: 'The supplier owes nothing; the weighed mass is booked.',
  },
  {
    value: 'claim',
    label: 'Claim',
    words: 'Booked as weighed and held until it is settled with the supplier.',
  },
  { value: 'send_back', label: 'Send back', words: 'Nothing of this line enters the safe.' },
] as const;

interface ReceiptReckoningProps {
  readonly line: ReceiptLine;
  readonly facts: Facts;
  readonly onDecide: (decision: 'accept' | 'claim' | 'send_back') => void;
  readonly error: string | null;
}

export function ReceiptReckoning({ line, facts, onDecide, error }: ReceiptReckoningProps) {
  const read = readLine(line);
  if (read === null) return null;
  const { net, fine } = read;
  const mass = massFromFineness(net, fine);
  const chief = METALS.find((metal) => mass[metal] > 0n);
  const invoice = readTypedMass(line.invoice);
  const difference =
    invoice.ok && invoice.ug > 0n
      ? invoiceDifference({ invoice_ug: invoice.ug, weighed_ug: net, fineness: fine }, facts)
      : null;
  const tolerance = facts.settings.invoice_tolerance_ug;
  return (
    <div className="mt-6 grid gap-5 border-t border-ink pt-4">
      <div className="figures">
        <LabelledFigure
          label={
            chief === undefined
              ? 'Gross into the safe'
              : `Fine ${metalName(chief).toLowerCase()} into the safe`
          }
          under={`net ${ugFigure(net)} g`}
        >
          <Figure size={1} text={ugFigure(chief === undefined ? net : mass[chief])} unit="g" />
        </LabelledFigure>
        {difference === null ? null : (
          <>
            <LabelledFigure
              label={difference.difference_ug < 0n ? 'Difference to invoice: short' : 'Difference to invoice'}
              under={`${difference.percent.toFixed(3)} %${difference.money === null ? '' : `, ${moneyText(difference.money.toFixed(2), facts.settings.currency, true)}`}`}
            >
              <Figure
                text={`${difference.difference_ug > 0n ? '+' : ''}${ugFigure(difference.difference_ug)}`}
                unit="g"
                rouge={!difference.within}
              />
            </LabelledFigure>
            <div className="min-w-[260px] flex-1">
              <IndexPlate
                both
                value={Number.parseFloat(printGrams(difference.difference_ug))}
                limit={Number.parseFloat(printGrams(tolerance))}
                limitName={`tolerance ${ugFigure(tolerance)} g`}
                finding={`Difference of ${ugFigure(difference.difference_ug)} g, tolerance ${ugFigure(tolerance)} g`}
              />
              <StatusWord status={difference.within ? 'Within tolerance' : 'Outside tolerance'} />
            </div>
          </>
        )}
      </div>
      {difference === null || difference.within ? null : (
        <Choices
          legend="The weight is outside the agreed tolerance. What happens with this line?"
          value={line.decision}
          onChange={onDecide}
          choices={DECISIONS}
          error={error}
        />
      )}
    </div>
  );
}

function readLine(line: ReceiptLine) {
  const [gross, tare] = [
    readTypedMass(line.weighing.gross),
    line.weighing.tare.trim() === '' ? { ok: true as const, ug: 0n } : readTypedMass(line.weighing.tare),
  ];
  if (!gross.ok || !tare.ok || gross.ug <= tare.ug) return null;
  const figures = METALS.map((metal) => typedFigure(line[metal]));
  if (figures.some((figure) => figure !== '' && !/^\d{1,4}(\.\d{1,4})?$/.test(figure))) return null;
  const fine = fineness(Object.fromEntries(METALS.map((metal, index) => [metal, figures[index] || '0'])));
  return isPossibleFineness(fine) ? { net: gross.ug - tare.ug, fine } : null;
}
