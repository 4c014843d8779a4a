/**
 * The scan field: a lot's code, a voucher's number, a name, or a page. "/" goes there from anywhere but a field; a
 * barcode scanner is a keyboard that ends with Enter.
 */
import { useEffect, useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { SearchHit } from '../../shared/schemas/search.ts';
import { Icon } from '../components/ui/icon.tsx';
import { search } from '../queries/lots.ts';
import { paths } from './paths.ts';

const WAIT_MS = 150;

function target(hit: SearchHit): string {
  switch (hit.what) {
    case 'lot':
      return paths.lot(hit.id);
    case 'voucher':
      return paths.voucher(hit.id);
    case 'job':
      return `${paths.vouchers}?job_id=${hit.id}`;
    case 'party':
      return paths.workshopPart('parties');
  }
}

export function ScanField() {
  const [text, setText] = useState('');
  const [hits, setHits] = useState<readonly SearchHit[] | null>(null);
  const [chosen, setChosen] = useState(0);
  const input = useRef<HTMLInputElement>(null);
  const navigate = useNavigate();

  useEffect(() => {
    const onKey = (event: KeyboardEvent) => {
      const inField = event.target instanceof HTMLElement && event.target.matches('input, textarea, select');
      if (event.key !== '/' || inField) return;
      event.preventDefault();
      input.current?.focus();
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, []);
  useEffect(() => {
    const q = text.trim();
    if (q === '') return undefined;
    const timer = setTimeout(() => {
      search(q)
        .then((found) => {
          setHits(found);
          setChosen(0);
        })
        .catch(() => setHits(null));
    }, WAIT_MS);
    return () => clearTimeout(timer);
  }, [text]);

  const close = () => {
    setText('');
    setHits(null);
  };
  const go = async (to: SearchHit | undefined) => {
    const hit = to ?? (await search(text.trim()).catch(() => []))[0];
    if (hit === undefined) return;
    close();
    input.current?.blur();
    void navigate(target(hit));
  };
  return (
    <div className="scan on-dark">
      <Icon name="scan" size={20} />
      <input
        ref={input}
        aria-label="Scan or type a lot"
        placeholder="Scan or type a lot"
        value={text}
        onChange={(event) => {
          setText(event.target.value);
          if (event.target.value.trim() === '') setHits(null);
        }}
        onBlur={() => setTimeout(() => setHits(null), 200)}
        onKeyDown={(event) => {
          if (event.key === 'Enter') void go(hits?.[chosen]);
          if (event.key === 'ArrowDown') setChosen((at) => Math.min(at + 1, (hits?.length ?? 1) - 1));
          if (event.key === 'ArrowUp') setChosen((at) => Math.max(0, at - 1));
          if (event.key === 'Escape') close();
        }}
      />
      <kbd>/</kbd>
      {hits === null ? null : (
        <div className="scan-hits" role="listbox" aria-label="Found">
          {hits.length === 0 ? <p className="none p-3">Nothing in the book has that code or name.</p> : null}
          {hits.map((hit, index) => (
            <a
              key={`${hit.what}${hit.id}`}
              href={target(hit)}
              role="option"
              aria-selected={index === chosen}
              onClick={(event) => {
                event.preventDefault();
                void go(hit);
              }}
            >
              <b>{hit.label}</b> {hit.words}
            </a>
          ))}
        </div>
      )}
    </div>
  );
}
