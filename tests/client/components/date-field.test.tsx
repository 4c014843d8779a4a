/** Dates: written out, day first, typed in any usual way; what is no date stays for the form to refuse. */
import { fireEvent, render, screen } from '@testing-library/react';
import { useState } from 'react';
import { describe, expect, it } from 'vitest';
import { TextField } from '../../../src/components/ui/text-field.tsx';
import { readTypedDate, writtenDate } from '../../../src/lib/typed-date.ts';

describe('a typed date', () => {
  it.each([
    ['14 May 2026', '2026-05-14'],
    ['Thursday 14 May 2026', '2026-05-14'],
    ['14.5.2026', '2026-05-14'],
    ['04/05/2026', '2026-05-04'],
    ['2026-05-14', '2026-05-14'],
    [' 1 sept 2026 ', '2026-09-01'],
    ['29 February 2028', '2028-02-29'],
  ])('%j is %j', (typed, iso) => {
    expect(readTypedDate(typed)).toBe(iso);
  });

  it.each(['', '05/14/2026', '31 June 2026', '29.2.2026', '14 May', '14 Mai 2026', 'yesterday'])(
    '%j is none',
    (typed) => {
      expect(readTypedDate(typed)).toBeNull();
    },
  );

  it('is written out', () => {
    expect(writtenDate('2026-05-14')).toBe('14 May 2026');
    expect(writtenDate('31 June 2026')).toBe('31 June 2026');
  });
});

function Until() {
  const [value, setValue] = useState('');
  return (
    <>
      <TextField label="Until" type="date" value={value} onChange={setValue} />
      <output>{value}</output>
    </>
  );
}

describe('the field for dates', () => {
  const field = () => screen.getByRole('textbox', { name: 'Until' });

  it('keeps what is typed while it is typed, and writes it out on leaving', () => {
    render(<Until />);
    fireEvent.change(field(), { target: { value: '14.5.2026' } });
    expect(field()).toHaveProperty('value', '14.5.2026');
    expect(screen.getByRole('status').textContent).toBe('2026-05-14');
    fireEvent.blur(field());
    expect(field()).toHaveProperty('value', '14 May 2026');
  });

  it('hands on what is no date, so that it can be refused beside the field', () => {
    render(<Until />);
    fireEvent.change(field(), { target: { value: '31 June 2026' } });
    fireEvent.blur(field());
    expect(screen.getByRole('status').textContent).toBe('31 June 2026');
  });
});
