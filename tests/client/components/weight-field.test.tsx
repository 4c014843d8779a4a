/** The field for weights: pasted units, no wheel, no arrow keys, and a fault that is tied to it. */
import { fireEvent, render, screen } from '@testing-library/react';
import { useState } from 'react';
import { expect, it } from 'vitest';
import { WeightField } from '../../../src/components/ui/weight-field.tsx';

function Typed({ error = null }: { readonly error?: string | null }) {
  const [value, setValue] = useState('');
  return <WeightField label="Gross" hint="On balance B2" value={value} onChange={setValue} error={error} />;
}

const field = () => screen.getByRole('textbox', { name: 'Gross' });

it('keeps what is typed while it is typed, and sets it right on leaving', () => {
  render(<Typed />);
  fireEvent.change(field(), { target: { value: '38,2 g' } });
  expect(field()).toHaveProperty('value', '38,2 g');
  fireEvent.blur(field());
  expect(field()).toHaveProperty('value', '38.200');
});

it('says at once where the decimals can’t be told, and only after the field was left', () => {
  render(<Typed />);
  fireEvent.change(field(), { target: { value: '1,234' } });
  expect(field().getAttribute('aria-invalid')).toBeNull();
  fireEvent.blur(field());
  expect(field()).toHaveProperty('value', '1,234');
  expect(field().getAttribute('aria-invalid')).toBe('true');
  fireEvent.change(field(), { target: { value: '1.234' } });
  expect(field().getAttribute('aria-invalid')).toBeNull();
});

it('says that the figure was typed, once there is one', () => {
  render(<Typed />);
  expect(screen.queryByText('typed')).toBeNull();
  fireEvent.change(field(), { target: { value: '1' } });
  expect(screen.getByText('typed')).toBeTruthy();
});

it('is no number field, so that wheel and arrow keys can’t change a weight', () => {
  render(<Typed />);
  fireEvent.change(field(), { target: { value: '5.000' } });
  fireEvent.keyDown(field(), { key: 'ArrowUp' });
  fireEvent.wheel(field(), { deltaY: -100 });
  expect(field().getAttribute('type')).toBe('text');
  expect(field().getAttribute('inputmode')).toBe('decimal');
  expect(field()).toHaveProperty('value', '5.000');
});

it('ties hint and fault to the field for those who hear the page', () => {
  render(<Typed error="Tare is heavier than gross. Weigh the empty dish again." />);
  const described = (field().getAttribute('aria-describedby') ?? '').split(' ');
  const words = described.map((id) => document.getElementById(id)?.textContent);
  expect(words).toEqual(['On balance B2', 'Tare is heavier than gross. Weigh the empty dish again.']);
  expect(field().getAttribute('aria-invalid')).toBe('true');
});
