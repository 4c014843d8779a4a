/** One line of text, a password, a date, or several lines. */
import { useState } from 'react';
import { DateLine } from './date-line.tsx';
import { Field } from './field.tsx';
import type { ControlAttributes, FieldProps } from './field.tsx';

interface TextFieldProps extends FieldProps {
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly type?: 'text' | 'email' | 'password' | 'date' | 'search';
  readonly lines?: number;
  readonly autoComplete?: string;
  readonly inputMode?: 'text' | 'decimal' | 'numeric';
  readonly required?: boolean;
}

export function TextField(props: TextFieldProps) {
  const { label, hint, error, value, onChange, lines } = props;
  return (
    <Field label={label} hint={hint} error={error}>
      {(attributes) =>
        lines === undefined ? (
          <Line {...props} attributes={attributes} />
        ) : (
          <textarea
            {...attributes}
            rows={lines}
            value={value}
            required={props.required}
            onChange={(event) => onChange(event.target.value)}
          />
        )
      }
    </Field>
  );
}

/** A single line; a password can be shown, pasted and filled in by a password manager. */
function Line(props: TextFieldProps & { readonly attributes: ControlAttributes }) {
  const { attributes, value, onChange, type = 'text', autoComplete = 'off', inputMode, required } = props;
  const [shown, setShown] = useState(false);
  if (type === 'date') return <DateLine {...{ attributes, value, onChange, required }} />;
  return (
    <>
      <input
        {...attributes}
        type={shown ? 'text' : type}
        value={value}
        autoComplete={autoComplete}
        inputMode={inputMode}
        required={required}
        onChange={(event) => onChange(event.target.value)}
      />
      {type === 'password' ? (
        <button type="button" className="show" aria-pressed={shown} onClick={() => setShown(!shown)}>
          {shown ? 'Hide' : 'Show'}
        </button>
      ) : null}
    </>
  );
}
