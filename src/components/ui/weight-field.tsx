/**
 * A weight or another figure with its unit. What is typed stays as typed; how it came (read from a balance or typed)
 * stands at the left. The wheel and the arrow keys never change it.
 */
import { Field } from './field.tsx';
import type { FieldProps } from './field.tsx';
import { Icon } from './icon.tsx';

interface WeightFieldProps extends FieldProps {
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly unit?: string;
}

export function WeightField({ value, onChange, unit = 'g', ...field }: WeightFieldProps) {
  return (
    <Field {...field} figure>
      {(attributes) => (
        <>
          {value === '' ? null : (
            <span className="tag">
              <Icon name="sign" size={16} />
              typed
            </span>
          )}
          <input
            {...attributes}
            type="text"
            inputMode="decimal"
            autoComplete="off"
            placeholder="none yet"
            value={value}
            onChange={(event) => onChange(event.target.value)}
          />
          <span className="unit">{unit}</span>
        </>
      )}
    </Field>
  );
}
