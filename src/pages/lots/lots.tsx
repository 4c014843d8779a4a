/** The lots of the book: filtered, sorted, page by page, as CSV. */
import { useSearchParams } from 'react-router-dom';
import { LOT_FORMS } from '../../../shared/book/lot.ts';
import { METALS } from '../../../shared/mass/vector.ts';
import type { LotRow } from '../../../shared/schemas/lots.ts';
import { FineCell } from '../../components/domain/fine-cell.tsx';
import { LotChip } from '../../components/domain/lot-chip.tsx';
import { Button } from '../../components/ui/button.tsx';
import { Grams } from '../../components/ui/figure.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { dayText, words } from '../../lib/formats.ts';
import { useLots } from '../../queries/lots.ts';
import { useAccounts, useParties } from '../../queries/registers.ts';

const STANDINGS = { released: 'Released', on_hold: 'On hold', spent: 'Spent' } as const;

const COLUMNS: readonly Column<LotRow>[] = [
  {
    id: 'code',
    head: 'Lot',
    value: (row) => row.code,
    cell: (row) => <LotChip {...row} owner={row.owner_name} />,
  },
  { id: 'form', head: 'Form', value: (row) => row.form, cell: (row) => words(row.form) },
  {
    id: 'standing',
    head: 'Standing',
    value: (row) => row.standing,
    cell: (row) => <StatusWord status={STANDINGS[row.standing]} />,
  },
  { id: 'basis', head: 'Fineness is', value: (row) => row.basis, cell: (row) => words(row.basis) },
  {
    id: 'described_on',
    head: 'Since',
    value: (row) => row.described_on,
    cell: (row) => dayText(row.described_on),
  },
  {
    id: 'gross_g',
    head: 'Gross, g',
    figure: 'gross',
    value: (row) => row.gross_g,
    cell: (row) => <Grams grams={row.gross_g} />,
  },
  {
    id: 'gold_g',
    head: 'Fine, g',
    figure: 'fine',
    value: (row) => row.gold_g,
    cell: (row) => <FineCell masses={row} />,
  },
];

const option = (value: string) => ({ value, label: words(value) });

export function Lots() {
  const [query, setQuery] = useSearchParams({ standing: 'released' });
  const lots = useLots(cleaned(query));
  const accounts = useAccounts();
  const parties = useParties();
  const rows = lots.data?.pages.flatMap((page) => page.rows) ?? [];
  const of = (name: string) => query.get(name) ?? '';
  const set = (name: string) => (value: string) =>
    setQuery((before) => {
      before.set(name, value);
      return before;
    });
  const places = accounts.filter((account) =>
    ['safe', 'bench', 'station', 'bin', 'outworker', 'approval', 'courier', 'refiner'].includes(account.kind),
  );
  return (
    <Page title="Lots" lede="Batches of like material, with what is left of each.">
      <Section heading="In the book" notes={<p>Newest first. A lot that lies nowhere any more is spent.</p>}>
        <div className="filters">
          <TextField label="Code or words" type="search" value={of('q')} onChange={set('q')} />
          <SelectField
            label="Standing"
            none="Every"
            value={of('standing')}
            onChange={set('standing')}
            options={Object.entries(STANDINGS).map(([value, label]) => ({ value, label }))}
          />
          <SelectField
            label="Form"
            none="Every form"
            value={of('form')}
            onChange={set('form')}
            options={LOT_FORMS.map(option)}
          />
          <SelectField
            label="Metal"
            none="Every metal"
            value={of('metal')}
            onChange={set('metal')}
            options={METALS.map(option)}
          />
          <SelectField
            label="Owner"
            none="Everybody"
            value={of('owner')}
            onChange={set('owner')}
            options={[
              { value: 'house', label: 'House' },
              ...parties
                .filter((party) => party.kind === 'customer' || party.kind === 'supplier')
                .map(({ id, name }) => ({ value: id, label: name })),
            ]}
          />
          <SelectField
            label="Place"
            none="Every place"
            value={of('place_id')}
            onChange={set('place_id')}
            options={places.map(({ id, name }) => ({ value: id, label: name }))}
          />
        </div>
        {lots.isPending ? (
          <p>Reading the book …</p>
        ) : (
          <RegisterTable
            caption="Lots"
            columns={COLUMNS}
            rows={rows}
            rowKey={(row) => row.id}
            csv="lots"
            empty="No lot fits what was looked for. Take a filter away."
          />
        )}
        {lots.hasNextPage ? <Button onPress={() => void lots.fetchNextPage()}>Show more</Button> : null}
      </Section>
    </Page>
  );
}

/** Only what is really asked for goes to the server. */
function cleaned(query: URLSearchParams): string {
  return new URLSearchParams([...query].filter(([, value]) => value.trim() !== '')).toString();
}
