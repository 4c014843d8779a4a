/** One of a list. The first entry asks to choose where nothing is chosen yet. */
import { Field } from './field.tsx';
import type { FieldProps } from './field.tsx';

export interface Option {
  readonly value: string;
  readonly label: string;
  readonly group?: string;
}

interface SelectFieldProps extends FieldProps {
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly options: readonly Option[];
  /** Words for "nothing chosen": "Choose a bench", "Every metal". */
  readonly none?: string;
}

export function SelectField({ value, onChange, options, none, ...field }: SelectFieldProps) {
  const groups = [...new Set(options.map((option) => option.group ?? ''))];
  return (
    <Field {...field}>
      {(attributes) => (
        <select {...attributes} value={value} onChange={(event) => onChange(event.target.value)}>
          {none === undefined ? null : <option value="">{none}</option>}
          {groups.map((group) => {
            const inside = options
              .filter((option) => (option.group ?? '') === group)
              .map((option) => (
                <option key={option.value} value={option.value}>
                  {option.label}
                </option>
              ));
            return group === '' ? (
              inside
            ) : (
              <optgroup key={group} label={group}>
                {inside}
              </optgroup>
            );
          })}
        </select>
      )}
    </Field>
  );
}
