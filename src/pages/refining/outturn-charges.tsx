/** The refiner's charges in money, line by line, with their sum. */
import { Decimal } from '../../../shared/decimal.ts';
import { Button } from '../../components/ui/button.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { typedFigure } from '../../forms/typed.ts';
import { moneyText } from '../../lib/formats.ts';
import { useSession } from '../../queries/session.ts';
import type { OutturnValues } from './outturn-values.ts';

interface OutturnChargesProps {
  readonly charges: OutturnValues['charges'];
  readonly onChange: (charges: OutturnValues['charges']) => void;
  readonly errorOf: (field: string) => string | null;
}

export function OutturnCharges({ charges, onChange, errorOf }: OutturnChargesProps) {
  const { workshop } = useSession();
  const change = (at: number, row: OutturnValues['charges'][number]) =>
    onChange(charges.map((one, index) => (index === at ? row : one)));
  const sum = charges
    .map(({ amount }) => typedFigure(amount))
    .filter((amount) => /^\d+(\.\d+)?$/.test(amount))
    .reduce((total, amount) => total.plus(amount), new Decimal(0));
  return (
    <>
      {charges.map((row, at) => (
        <div key={at} className="fields mb-4">
          <TextField
            label="What for"
            value={row.what}
            onChange={(what) => change(at, { ...row, what })}
            error={errorOf(`charges.${at}.what`)}
          />
          <WeightField
            label="Amount"
            unit={workshop.currency}
            value={row.amount}
            onChange={(amount) => change(at, { ...row, amount })}
            error={errorOf(`charges.${at}.amount`)}
          />
          <Button kind="quiet" onPress={() => onChange(charges.filter((_, index) => index !== at))}>
            Take it away
          </Button>
        </div>
      ))}
      {charges.length === 0 ? <p className="none mt-0">No charge in money yet.</p> : null}
      {charges.length === 0 ? null : (
        <p>
          Charges <b className="fig">{moneyText(sum.toFixed(2), workshop.currency, true)}</b>
        </p>
      )}
      <Button icon="plus" onPress={() => onChange([...charges, { what: '', amount: '' }])}>
        Add a charge
      </Button>
    </>
  );
}
