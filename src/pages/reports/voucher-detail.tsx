/** What a voucher knows beside its entries: single facts with names for ids, and its lists as tables. */
import { Link } from 'react-router-dom';
import { parseGrams } from '../../../shared/mass/micrograms.ts';
import type { VoucherWhole } from '../../../shared/schemas/vouchers.ts';
import { z } from '../../../shared/schemas/zod.ts';
import { Section } from '../../components/ui/page.tsx';
import { gramsFigure, momentText, words } from '../../lib/formats.ts';
import { useAccounts, useJobs, useParties, usePeople } from '../../queries/registers.ts';
import { paths } from '../../app/paths.ts';

const leaf = z.union([z.string(), z.null()]);
const list = z.array(z.record(z.string(), leaf)).min(1);

/** Names of what ids in a detail stand for; lots come from the voucher's own entries. */
function useNames(voucher: VoucherWhole): (id: string) => { name: string; to: string | null } | null {
  const accounts = useAccounts();
  const people = usePeople();
  const parties = useParties();
  const jobs = useJobs();
  return (id) => {
    const entry = voucher.entries.find(({ lot_id }) => lot_id === id);
    if (entry !== undefined) return { name: entry.lot_code, to: paths.lot(id) };
    const known =
      accounts.find((row) => row.id === id)?.name ??
      people.find((row) => row.id === id)?.name ??
      parties.find((row) => row.id === id)?.name ??
      jobs.find((row) => row.id === id)?.code;
    return known === undefined ? null : { name: known, to: null };
  };
}

type NameOf = ReturnType<typeof useNames>;

const UUID = /^[0-9a-f]{8}-[0-9a-f-]{27}$/;

export function DetailFacts({ voucher }: { readonly voucher: VoucherWhole }) {
  const nameOf = useNames(voucher);
  const facts = Object.entries(voucher.detail).flatMap(([key, value]) => {
    const read = leaf.safeParse(value);
    return read.success && read.data !== null && read.data !== '' ? [{ key, value: read.data }] : [];
  });
  if (facts.length === 0) return <p className="none">Nothing beside its entries.</p>;
  return (
    <dl className="facts">
      {facts.map(({ key, value }) => (
        <div key={key}>
          <dt>{headOf(key)}</dt>
          <dd>
            <Value name={key} value={value} nameOf={nameOf} />
          </dd>
        </div>
      ))}
    </dl>
  );
}

export function DetailLists({ voucher }: { readonly voucher: VoucherWhole }) {
  const nameOf = useNames(voucher);
  return Object.entries(voucher.detail).map(([key, value]) => {
    const rows = list.safeParse(value);
    if (!rows.success) return null;
    return (
      <Section
        key={key}
        heading={words(key)}
        notes={NOTES[key] === undefined ? undefined : <p>{NOTES[key]}</p>}
      >
        <ListTable name={key} rows={rows.data} nameOf={nameOf} />
      </Section>
    );
  });
}

const NOTES: Readonly<Record<string, string>> = {
  weighings: 'As they were read or typed, with who weighed.',
  packages: 'Each with the number of its seal.',
  shares: 'What each operation gave to the estimate.',
};

interface ListTableProps {
  readonly name: string;
  readonly rows: readonly Readonly<Record<string, string | null>>[];
  readonly nameOf: NameOf;
}

function ListTable({ name, rows, nameOf }: ListTableProps) {
  const columns = [...new Set(rows.flatMap((row) => Object.keys(row)))].filter(
    (column) => column !== 'id' && rows.some((row) => row[column] !== null && row[column] !== undefined),
  );
  return (
    <div className="table-region" role="region" aria-label={`${words(name)}, row by row`} tabIndex={0}>
      <table className="register">
        <caption className="sr-only">{words(name)}</caption>
        <thead>
          <tr>
            {columns.map((column) => (
              <th key={column} scope="col" className={isMass(column) ? 'num' : ''}>
                {headOf(column)}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={JSON.stringify(row)}>
              {columns.map((column) => (
                <td key={column} className={isMass(column) ? 'num' : ''}>
                  <Value name={column} value={row[column] ?? null} nameOf={nameOf} />
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

const isMass = (name: string): boolean => name.endsWith('_g');

/** "Gross, g" of "gross_g", "Lot" of "lot_id". */
function headOf(name: string): string {
  if (isMass(name)) return `${words(name.slice(0, -2))}, g`;
  if (name === 'stones_ct') return 'Stones, ct';
  return words(name.replace(/_id$/, ''));
}

interface ValueProps {
  readonly name: string;
  readonly value: string | null;
  readonly nameOf: NameOf;
}

function Value({ name, value, nameOf }: ValueProps) {
  if (value === null || value === '') return <span className="none">none</span>;
  if (isMass(name) && parseGrams(value, { signed: true }).ok) return gramsFigure(value);
  if (UUID.test(value)) return <Named id={value} nameOf={nameOf} />;
  if (/^\d{4}-\d\d-\d\dT/.test(value)) return momentText(value);
  if (PLAIN_WORDS.has(name)) return words(value);
  return value;
}

/** Fields whose values are words of the program's own, stored with strokes between. */
const PLAIN_WORDS = new Set([
  'operation',
  'finding',
  'how',
  'tare_kind',
  'stage',
  'way',
  'corrected_kind',
  'reversed_kind',
  'line',
  'metal',
  'form',
  'what',
]);

function Named({ id, nameOf }: { readonly id: string; readonly nameOf: NameOf }) {
  const known = nameOf(id);
  if (known === null) return <span className="hash">{id}</span>;
  return known.to === null ? known.name : <Link to={known.to}>{known.name}</Link>;
}
