/** One of a few ways to show the same thing: buttons in a row, the one in use pressed. */
import { useId } from 'react';

interface SegmentsProps<Value extends string> {
  readonly legend: string;
  readonly value: string;
  readonly options: readonly { readonly value: Value; readonly label: string }[];
  readonly onChange: (value: Value) => void;
}

export function Segments<Value extends string>({ legend, value, options, onChange }: SegmentsProps<Value>) {
  const label = useId();
  return (
    <div className="field">
      <span className="label" id={label}>
        {legend}
      </span>
      <div className="segments" role="group" aria-labelledby={label}>
        {options.map((option) => (
          <button
            key={option.value}
            type="button"
            aria-pressed={option.value === value}
            onClick={() => onChange(option.value)}
          >
            {option.label}
          </button>
        ))}
      </div>
    </div>
  );
}
