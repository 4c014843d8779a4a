/** The scan field: pages by name, codes from a scanner wherever the focus is, keys that can be switched off. */
import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { fireEvent, render, screen, waitFor } from '@testing-library/react';
import { Suspense } from 'react';
import { MemoryRouter, useLocation } from 'react-router-dom';
import { describe, expect, it } from 'vitest';
import { pagesNamed } from '../../../src/app/page-names.ts';
import { ScanField } from '../../../src/app/scan-field.tsx';
import { switchShortcuts } from '../../../src/lib/shortcuts.ts';
import { fakeServer, json } from '../support/fake-server.ts';
import { SESSION } from '../support/session.ts';

const LOT = { what: 'lot', id: 'l1', label: 'G26-0512-V', words: '750 yellow sheet' };

function Address() {
  return <p>{`at ${useLocation().pathname}`}</p>;
}

async function open(hits: Readonly<Record<string, readonly object[]>>) {
  const answers = Object.entries(hits).map(
    ([q, found]) => [`GET /search?q=${encodeURIComponent(q)}`, json({ hits: found })] as const,
  );
  const asked = fakeServer({ 'GET /session': json(SESSION), ...Object.fromEntries(answers) });
  render(
    <QueryClientProvider client={new QueryClient()}>
      <MemoryRouter>
        <Suspense fallback="Reading the book …">
          <button type="button">elsewhere</button>
          <textarea aria-label="A field" />
          <ScanField />
          <Address />
        </Suspense>
      </MemoryRouter>
    </QueryClientProvider>,
  );
  await screen.findByRole('combobox');
  return asked;
}

const field = () => screen.getByRole('combobox', { name: 'Scan or type a lot' });
const scan = (code: string, target: HTMLElement) => {
  for (const key of [...code.split(''), 'Enter']) fireEvent.keyDown(target, { key });
};

describe('typing', () => {
  it('opens what is found, by Enter', async () => {
    await open({ 'G26-0512-V': [LOT] });
    fireEvent.change(field(), { target: { value: 'G26-0512-V' } });
    await screen.findByRole('option');
    fireEvent.keyDown(field(), { key: 'Enter' });
    await screen.findByText('at /lots/l1');
  });

  it('looks again where Enter comes before the answer, and never opens an older one', async () => {
    await open({ 'G26-0512': [{ ...LOT, id: 'older' }], 'G26-0512-V': [LOT] });
    fireEvent.change(field(), { target: { value: 'G26-0512' } });
    await screen.findByRole('option');
    fireEvent.change(field(), { target: { value: 'G26-0512-V' } });
    fireEvent.keyDown(field(), { key: 'Enter' });
    await screen.findByText('at /lots/l1');
  });

  it('says in words that there is nothing', async () => {
    await open({ 'G26-0521-Q': [] });
    fireEvent.change(field(), { target: { value: 'G26-0521-Q' } });
    await screen.findByText(/Nothing in the book has that code or name/);
  });
});

describe('a scanner', () => {
  it('is understood wherever the focus is', async () => {
    await open({ 'G26-0512-V': [LOT] });
    scan('G26-0512-V', screen.getByRole('button', { name: 'elsewhere' }));
    await screen.findByText('at /lots/l1');
  });

  it('is left alone in a field', async () => {
    const asked = await open({ 'G26-0512-V': [LOT] });
    scan('G26-0512-V', screen.getByRole('textbox', { name: 'A field' }));
    await waitFor(() => expect(asked.map(({ path }) => path)).toEqual(['/session']));
    expect(screen.getByText('at /')).toBeTruthy();
  });
});

describe('the key “/”', () => {
  it('goes to the scan field, but not out of a field', async () => {
    await open({});
    fireEvent.keyDown(screen.getByRole('textbox', { name: 'A field' }), { key: '/' });
    expect(document.activeElement).not.toBe(field());
    fireEvent.keyDown(document.body, { key: '/' });
    expect(document.activeElement).toBe(field());
  });

  it('can be switched off', async () => {
    await open({});
    switchShortcuts(false);
    fireEvent.keyDown(document.body, { key: '/' });
    expect(document.activeElement).not.toBe(field());
  });
});

describe('pages by name', () => {
  it('are found by the beginning of a word', () => {
    expect(pagesNamed('rec', ['report.read']).map(({ name }) => name)).toEqual(['Reconciliation']);
    expect(pagesNamed('back', ['book.weigh_back']).map(({ name }) => name)).toEqual(['Weigh back']);
  });

  it('are only those that the person may open', () => {
    expect(pagesNamed('weigh', ['book.read'])).toEqual([]);
  });

  it('are none for nothing', () => {
    expect(pagesNamed('  ', ['report.read'])).toEqual([]);
  });
});
