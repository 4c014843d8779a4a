/**
 * The scan field: a lot's code, a voucher's number, a name, or a page. "/" goes there from anywhere but a field; a
 * barcode scanner's burst is taken wherever the focus is.
 */
import { useCallback, useEffect, useId, useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { SearchHit } from '../../shared/schemas/search.ts';
import { Icon } from '../components/ui/icon.tsx';
import { useScannerBurst } from '../lib/scanner-burst.ts';
import { useShortcut } from '../lib/shortcuts.ts';
import { search } from '../queries/lots.ts';
import { useSession } from '../queries/session.ts';
import { pagesNamed } from './page-names.ts';
import { paths } from './paths.ts';

const WAIT_MS = 150;

interface Found {
  readonly to: string;
  readonly label: string;
  readonly words: string;
}

function foundOf(hit: SearchHit): Found {
  const { label, words } = hit;
  switch (hit.what) {
    case 'lot':
      return { label, words, to: paths.lot(hit.id) };
    case 'voucher':
      return { label, words, to: paths.voucher(hit.id) };
    case 'job':
      return { label, words, to: `${paths.vouchers}?job_id=${hit.id}` };
    case 'party':
      return { label, words, to: paths.workshopPart('parties') };
  }
}

interface Finding {
  /** What was looked for: an answer to an older text is never opened. */
  readonly text: string;
  readonly list: readonly Found[];
}

/** What the book and the pages have for a text; only pages where the line is broken. */
async function find(text: string, may: readonly string[]): Promise<Finding> {
  const pages = pagesNamed(text, may).map(({ name, to }) => ({ label: name, words: 'page', to }));
  const hits = await search(text.trim()).catch(() => []);
  return { text, list: [...pages, ...hits.map(foundOf)] };
}

export function ScanField() {
  const [text, setText] = useState('');
  const [found, setFound] = useState<Finding | null>(null);
  const [chosen, setChosen] = useState(0);
  const input = useRef<HTMLInputElement>(null);
  const list = useId();
  const navigate = useNavigate();
  const { may } = useSession();

  useShortcut(
    '/',
    useCallback(() => input.current?.focus(), []),
  );
  useEffect(() => {
    if (text.trim() === '') return undefined;
    let stale = false;
    const timer = setTimeout(() => {
      void find(text, may).then((next) => {
        if (stale) return;
        setFound(next);
        setChosen(0);
      });
    }, WAIT_MS);
    return () => {
      stale = true;
      clearTimeout(timer);
    };
  }, [text, may]);

  const close = () => {
    setText('');
    setFound(null);
  };
  const open = (one: Found) => {
    close();
    input.current?.blur();
    void navigate(one.to);
  };
  const take = async (code: string) => {
    const next = await find(code, may);
    const [first] = next.list;
    if (first !== undefined) open(first);
    else {
      setText(code);
      setFound(next);
      input.current?.focus();
    }
  };
  useScannerBurst((code) => void take(code));
  const onKeyDown = (key: string) => {
    const last = (found?.list.length ?? 1) - 1;
    const one = found?.text === text ? found.list[chosen] : undefined;
    if (key === 'Enter' && one !== undefined) open(one);
    else if (key === 'Enter' && text.trim() !== '') void take(text);
    if (key === 'ArrowDown') setChosen((at) => Math.min(at + 1, last));
    if (key === 'ArrowUp') setChosen((at) => Math.max(0, at - 1));
    if (key === 'Escape') close();
  };
  return (
    <div className="scan on-dark">
      <Icon name="scan" size={20} />
      <input
        ref={input}
        role="combobox"
        aria-label="Scan or type a lot"
        aria-expanded={found !== null}
        aria-controls={list}
        aria-activedescendant={found?.list[chosen] === undefined ? undefined : `${list}-${chosen}`}
        placeholder="Scan or type a lot"
        autoComplete="off"
        value={text}
        onChange={(event) => {
          setText(event.target.value);
          if (event.target.value.trim() === '') setFound(null);
        }}
        onBlur={() => setTimeout(() => setFound(null), 200)}
        onKeyDown={(event) => onKeyDown(event.key)}
      />
      <kbd>/</kbd>
      <FoundList id={list} found={found?.list ?? null} chosen={chosen} onOpen={open} />
    </div>
  );
}

interface FoundListProps {
  readonly id: string;
  readonly found: readonly Found[] | null;
  readonly chosen: number;
  readonly onOpen: (one: Found) => void;
}

function FoundList({ id, found, chosen, onOpen }: FoundListProps) {
  return (
    <div className="scan-hits" role="listbox" id={id} aria-label="Found" hidden={found === null}>
      {found?.length === 0 ? (
        <div className="none p-3" role="option" aria-selected="false">
          Nothing in the book has that code or name. Look at the label again, or scan it.
        </div>
      ) : null}
      {found?.map((one, index) => (
        <a
          key={one.to + one.label}
          id={`${id}-${index}`}
          href={one.to}
          role="option"
          tabIndex={-1}
          aria-selected={index === chosen}
          onClick={(event) => {
            event.preventDefault();
            onOpen(one);
          }}
        >
          <b>{one.label}</b> {one.words}
        </a>
      ))}
    </div>
  );
}
