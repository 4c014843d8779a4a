/** Gross, tare and stones of one weighing. */
import type { TypedWeighing } from '../../forms/typed.ts';
import { WeightField } from '../ui/weight-field.tsx';

interface WeighingFieldsProps {
  readonly value: TypedWeighing;
  readonly onChange: (value: TypedWeighing) => void;
  readonly errorOf: (field: 'gross_g' | 'tare_g' | 'stones_ct') => string | null;
  readonly stones?: boolean;
}

export function WeighingFields({ value, onChange, errorOf, stones = false }: WeighingFieldsProps) {
  return (
    <>
      <WeightField
        label="Gross on the balance"
        value={value.gross}
        onChange={(gross) => onChange({ ...value, gross })}
        error={errorOf('gross_g')}
      />
      <WeightField
        label="Tare"
        hint="Empty without a dish."
        value={value.tare}
        onChange={(tare) => onChange({ ...value, tare })}
        error={errorOf('tare_g')}
      />
      {stones ? (
        <WeightField
          label="Stones"
          unit="ct"
          value={value.stones_ct}
          onChange={(stones_ct) => onChange({ ...value, stones_ct })}
          error={errorOf('stones_ct')}
        />
      ) : null}
    </>
  );
}
