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
import { figureText, moneyText, ugFigure } from '../../../lib/formats.ts';
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

/** What a line comes to, once its weight and fineness can be read. */
export function reckonReceipt(line: ReceiptLine, facts: Facts) {
  const read = readLine(line);
  if (read === null) return null;
  const { net, fine } = read;
  const mass = massFromFineness(net, fine);
  const invoice = readTypedMass(line.invoice);
  const difference =
    invoice.ok && invoice.ug > 0n
      ? invoiceDifference({ invoice_ug: invoice.ug, weighed_ug: net, fineness: fine }, facts)
      : null;
  return { net, mass, difference };
}

type Reckoned = NonNullable<ReturnType<typeof reckonReceipt>>;

interface ReceiptReckoningProps {
  readonly reckoned: Reckoned | null;
  readonly facts: Facts;
}

/** The column at the right: fine into the safe, then the difference to the invoice and how it is judged. */
export function ReceiptReckoning({ reckoned, facts }: ReceiptReckoningProps) {
  return (
    <aside className="reckoning" aria-label="Reckoning">
      <div className="reckoning-inner">
        <h3>Reckoning</h3>
        {reckoned === null ? (
          <p className="none">Nothing yet. Enter the weight and the fineness.</p>
        ) : (
          <>
            <IntoTheSafe reckoned={reckoned} />
            {reckoned.difference === null ? null : (
              <ToTheInvoice difference={reckoned.difference} facts={facts} />
            )}
          </>
        )}
      </div>
    </aside>
  );
}

function IntoTheSafe({ reckoned: { net, mass } }: { readonly reckoned: Reckoned }) {
  const [chief, ...others] = METALS.filter((metal) => mass[metal] > 0n);
  return (
    <div className="reckoned">
      <LabelledFigure
        label={
          chief === undefined ? 'Gross into the safe' : `Fine ${metalName(chief).toLowerCase()} into the safe`
        }
        under={`net ${ugFigure(net)} g`}
      >
        <Figure size={1} text={ugFigure(chief === undefined ? net : mass[chief])} unit="g" />
      </LabelledFigure>
      {others.map((metal) => (
        <LabelledFigure key={metal} label={`Fine ${metalName(metal).toLowerCase()}`}>
          <Figure text={ugFigure(mass[metal])} unit="g" />
        </LabelledFigure>
      ))}
    </div>
  );
}

interface ToTheInvoiceProps {
  readonly difference: NonNullable<Reckoned['difference']>;
  readonly facts: Facts;
}

function ToTheInvoice({ difference, facts }: ToTheInvoiceProps) {
  const { difference_ug, percent, money, within } = difference;
  const tolerance = facts.settings.invoice_tolerance_ug;
  const value = money === null ? '' : `, ${moneyText(money.toFixed(2), facts.settings.currency, true)}`;
  return (
    <div className="reckoned">
      <LabelledFigure
        label={difference_ug < 0n ? 'Difference to invoice: short' : 'Difference to invoice'}
        under={`${figureText(percent.toFixed(3))} %${value}`}
      >
        <Figure
          text={`${difference_ug > 0n ? '+' : ''}${ugFigure(difference_ug)}`}
          unit="g"
          rouge={!within}
        />
      </LabelledFigure>
      <IndexPlate
        both
        value={Number.parseFloat(printGrams(difference_ug))}
        limit={Number.parseFloat(printGrams(tolerance))}
        limitName={`tolerance ${ugFigure(tolerance)}`}
        finding={`Difference of ${ugFigure(difference_ug)} g, ${within ? 'within' : 'outside'} the tolerance of ${ugFigure(tolerance)} g`}
      />
      <StatusWord status={within ? 'Within tolerance' : 'Outside tolerance'} />
    </div>
  );
}

interface ReceiptDecisionProps {
  readonly reckoned: Reckoned | null;
  readonly decision: ReceiptLine['decision'];
  readonly onDecide: (decision: 'accept' | 'claim' | 'send_back') => void;
  readonly error: string | null;
}

/** Asked for only where the difference is beyond the tolerance. */
export function ReceiptDecision({ reckoned, decision, onDecide, error }: ReceiptDecisionProps) {
  if (reckoned?.difference?.within !== false) return null;
  return (
    <div className="mt-5">
      <Choices
        legend="The weight is outside the agreed tolerance. What happens with this line?"
        value={decision}
        onChange={onDecide}
        choices={DECISIONS}
        error={error}
      />
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
