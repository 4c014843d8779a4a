/**
 * A date as it is written here ("14 May 2026"), typed in any usual way with the day first, or picked from the
 * browser's calendar. The value is the ISO date; what can't be read stays as it was typed, for the form to refuse.
 */
import { useRef, useState } from 'react';
import { readTypedDate, writtenDate } from '../../lib/typed-date.ts';
import type { ControlAttributes } from './field.tsx';
import { Icon } from './icon.tsx';

interface DateLineProps {
  readonly attributes: ControlAttributes;
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly required?: boolean | undefined;
}

export function DateLine({ attributes, value, onChange, required }: DateLineProps) {
  const [typing, setTyping] = useState<string | null>(null);
  const calendar = useRef<HTMLInputElement>(null);
  return (
    <>
      <input
        {...attributes}
        type="text"
        autoComplete="off"
        placeholder="no date"
        required={required}
        value={typing ?? writtenDate(value)}
        onChange={(event) => {
          const typed = event.target.value;
          setTyping(typed);
          onChange(readTypedDate(typed) ?? typed);
        }}
        onBlur={() => setTyping(null)}
      />
      <span className="calendar">
        <button
          type="button"
          aria-label="Choose from a calendar"
          onClick={() => calendar.current?.showPicker()}
        >
          <Icon name="cal" size={20} />
        </button>
        <input
          ref={calendar}
          type="date"
          tabIndex={-1}
          aria-hidden="true"
          value={readTypedDate(value) ?? ''}
          onChange={(event) => {
            setTyping(null);
            onChange(event.target.value);
          }}
        />
      </span>
    </>
  );
}
