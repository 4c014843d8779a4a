/** What every field has alike: label above, hint under it, then the error, then the field itself. */
import type { ReactNode } from 'react';
import { useId } from 'react';
import { Icon } from './icon.tsx';

export interface FieldProps {
  readonly label: string;
  readonly hint?: string | undefined;
  readonly error?: string | null | undefined;
}

/** Attributes that tie a control to its label, hint and error. */
export interface ControlAttributes {
  readonly id: string;
  readonly 'aria-invalid': true | undefined;
  readonly 'aria-describedby': string | undefined;
}

export function Field({
  label,
  hint,
  error,
  figure = false,
  children,
}: FieldProps & {
  readonly figure?: boolean;
  readonly children: (attributes: ControlAttributes) => ReactNode;
}) {
  const id = useId();
  const described = [hint === undefined ? null : `${id}-hint`, error ? `${id}-error` : null].filter(
    (part) => part !== null,
  );
  return (
    <div className="field" data-error={error || undefined}>
      <label htmlFor={id}>{label}</label>
      {hint === undefined ? null : (
        <span className="hint" id={`${id}-hint`}>
          {hint}
        </span>
      )}
      {error ? (
        <span className="error" id={`${id}-error`}>
          <Icon name="bad" size={18} />
          <span>{error}</span>
        </span>
      ) : null}
      <div className={`control ${figure ? 'figure' : ''} ${error ? 'fault' : ''}`}>
        {children({
          id,
          'aria-invalid': error ? true : undefined,
          'aria-describedby': described.join(' ') || undefined,
        })}
      </div>
    </div>
  );
}
