/**
 * A weight or another figure with its unit. What is typed stays as typed and is set right on leaving: a comma becomes
 * a point, blanks and a pasted unit go; a weight that can't be read is told beside the field at once. The wheel and
 * the arrow keys never change it, since it is a field of text.
 */
import { useState } from 'react';
import { readTypedMass } from '../../../shared/mass/typed-mass.ts';
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
  const [left, setLeft] = useState(false);
  const read = unit === 'g' && value.trim() !== '' ? readTypedMass(value) : null;
  const unread = left && read?.ok === false ? read.reason : null;
  const setRight = () => {
    setLeft(true);
    const right = unit === 'g' ? setMassRight(value) : setFigureRight(value);
    if (right !== value) onChange(right);
  };
  return (
    <Field {...field} error={field.error ?? unread} figure>
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
            onChange={(event) => {
              setLeft(false);
              onChange(event.target.value);
            }}
            onBlur={setRight}
          />
          <span className="unit">{unit}</span>
        </>
      )}
    </Field>
  );
}
