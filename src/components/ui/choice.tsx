/** A decision: radio rows with the whole row as target, and what each will do in a second line. */
import { useId } from 'react';
import { Icon } from './icon.tsx';

export interface Choice<Value extends string> {
  readonly value: Value;
  readonly label: string;
  readonly words?: string;
}

interface ChoicesProps<Value extends string> {
  readonly legend: string;
  readonly value: Value | '';
  readonly onChange: (value: Value) => void;
  readonly choices: readonly Choice<Value>[];
  readonly error?: string | null;
}

export function Choices<Value extends string>({
  legend,
  value,
  onChange,
  choices,
  error,
}: ChoicesProps<Value>) {
  const name = useId();
  return (
    <fieldset
      className="choices"
      data-error={error || undefined}
      aria-describedby={error ? `${name}-error` : undefined}
    >
      <legend>{legend}</legend>
      {error ? (
        <p className="choices-error" id={`${name}-error`}>
          <Icon name="bad" size={18} />
          <span>{error}</span>
        </p>
      ) : null}
      {choices.map((choice) => (
        <label key={choice.value} className="choice">
          <input
            type="radio"
            name={name}
            checked={value === choice.value}
            onChange={() => onChange(choice.value)}
          />
          <span>
            <b>{choice.label}</b>
            {choice.words === undefined ? null : <small>{choice.words}</small>}
          </span>
        </label>
      ))}
    </fieldset>
  );
}

export function CheckBox({
  label,
  checked,
  onChange,
}: {
  readonly label: string;
  readonly checked: boolean;
  readonly onChange: (checked: boolean) => void;
}) {
  return (
    <label className="check">
      <input type="checkbox" checked={checked} onChange={(event) => onChange(event.target.checked)} />
      {label}
    </label>
  );
}
