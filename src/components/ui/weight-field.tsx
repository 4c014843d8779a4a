/**
 * A weight or another figure with its unit. What is typed stays as typed and is set right on leaving: a comma becomes
 * a point, blanks and a pasted unit go. The wheel and the arrow keys never change it, since it is a field of text.
 */
import { setFigureRight, setMassRight } from '../../forms/set-right.ts';
import { Field } from './field.tsx';
import type { FieldProps } from './field.tsx';
import { Icon } from './icon.tsx';

interface WeightFieldProps extends FieldProps {
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly unit?: string;
  /** Given by the book or the alloy: shown, not changed. */
  readonly fixed?: boolean;
}

export function WeightField({ value, onChange, unit = 'g', fixed = false, ...field }: WeightFieldProps) {
  const setRight = () => {
    const right = unit === 'g' ? setMassRight(value) : setFigureRight(value);
    if (right !== value) onChange(right);
  };
  return (
    <Field {...field} figure>
      {(attributes) => (
        <>
          {value === '' || fixed || unit !== 'g' ? null : (
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
            readOnly={fixed}
            onChange={(event) => onChange(event.target.value)}
            onBlur={setRight}
          />
          <span className="unit">{unit}</span>
        </>
      )}
    </Field>
  );
}
