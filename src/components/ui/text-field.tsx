/** One line of text, a password, a date, or several lines. */
import { Field } from './field.tsx';
import type { FieldProps } from './field.tsx';

interface TextFieldProps extends FieldProps {
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly type?: 'text' | 'email' | 'password' | 'date' | 'search';
  readonly lines?: number;
  readonly autoComplete?: string;
  readonly inputMode?: 'text' | 'decimal' | 'numeric';
  readonly required?: boolean;
}

export function TextField({
  value,
  onChange,
  type = 'text',
  lines,
  autoComplete,
  inputMode,
  ...field
}: TextFieldProps) {
  return (
    <Field {...field}>
      {(attributes) =>
        lines === undefined ? (
          <input
            {...attributes}
            type={type}
            value={value}
            autoComplete={autoComplete ?? 'off'}
            inputMode={inputMode}
            onChange={(event) => onChange(event.target.value)}
          />
        ) : (
          <textarea
            {...attributes}
            rows={lines}
            value={value}
            onChange={(event) => onChange(event.target.value)}
          />
        )
      }
    </Field>
  );
}
