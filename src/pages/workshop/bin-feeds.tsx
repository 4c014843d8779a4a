/** Which operations feed which bin, and the share of their loss that is expected back from it. */
import { z } from '../../../shared/schemas/zod.ts';
import { Section } from '../../components/ui/page.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import type { Option } from '../../components/ui/select-field.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { orNull, typedFigure } from '../../forms/typed.ts';
import { useAccounts, useSettings } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import { EventFields } from './event-fields.tsx';

const feed = z.object({
  what: z.literal('bin_feed'),
  name: z.string(),
  bin_id: z.string(),
  operation: z.string(),
  bench_id: z.string().nullable(),
  gold_percent: z.string(),
});
type Feed = z.output<typeof feed>;

export function BinFeeds({ operations }: { readonly operations: readonly Option[] }) {
  const session = useSession();
  const accounts = useAccounts();
  const settings = useSettings();
  const feeds = settings.flatMap((setting) => {
    const read = feed.safeParse(setting.detail);
    return read.success ? [read.data] : [];
  });
  const nameOf = (id: string | null) => accounts.find((account) => account.id === id)?.name ?? 'every bench';
  const columns: readonly Column<Feed>[] = [
    {
      id: 'bin',
      head: 'Bin',
      value: (row) => nameOf(row.bin_id),
      cell: (row) => <b>{nameOf(row.bin_id)}</b>,
    },
    {
      id: 'operation',
      head: 'Takes the loss of',
      value: (row) => row.operation,
      cell: (row) => operations.find((known) => known.value === row.operation)?.label ?? row.operation,
    },
    { id: 'bench', head: 'At', value: (row) => nameOf(row.bench_id), cell: (row) => nameOf(row.bench_id) },
    {
      id: 'gold_percent',
      head: 'Expected back, %',
      figure: 'plain',
      value: (row) => row.gold_percent,
      cell: (row) => row.gold_percent,
    },
  ];
  const bins = accounts
    .filter((account) => account.kind === 'bin' && !account.closed)
    .map(({ id, name }) => ({ value: id, label: name }));
  const benches = accounts
    .filter((account) => account.kind === 'bench' || account.kind === 'station')
    .map(({ id, name }) => ({ value: id, label: name }));
  return (
    <>
      <Section
        heading="Bins"
        notes={
          <p>
            The rates on one operation never add up to more than the whole. They are estimates until refiners
            have settled.
          </p>
        }
      >
        <RegisterTable
          caption="What feeds the bins"
          columns={columns}
          rows={feeds}
          rowKey={(row) => row.name}
          empty="No bin names what feeds it, so nothing can be swept up yet."
        />
      </Section>
      {session.can('settings.set') && bins.length > 0 ? (
        <SetRate bins={bins} benches={benches} operations={operations} />
      ) : null}
    </>
  );
}

interface SetRateProps {
  readonly bins: readonly Option[];
  readonly benches: readonly Option[];
  readonly operations: readonly Option[];
}

/** The share that a bin is expected to bring back of what an operation loses, the same for every metal. */
function SetRate({ bins, benches, operations }: SetRateProps) {
  return (
    <Section heading="Set a rate">
      <EventFields
        event="set-setting"
        name="bin-feed"
        act="Set the rate"
        initial={{ bin_id: bins[0]?.value ?? '', operation: 'sheet_work', bench_id: '', rate: '' }}
        toBody={({ bin_id, operation, bench_id, rate }) => {
          const percent = typedFigure(rate);
          return {
            what: 'bin_feed',
            bin_id,
            operation,
            bench_id: orNull(bench_id),
            gold_percent: percent,
            silver_percent: percent,
            platinum_percent: percent,
            palladium_percent: percent,
          };
        }}
      >
        {({ values, set, errorOf }) => (
          <>
            <SelectField
              label="Bin"
              value={values.bin_id}
              onChange={(bin_id) => set({ bin_id })}
              options={bins}
              error={errorOf('bin_id')}
            />
            <SelectField
              label="Operation"
              value={values.operation}
              onChange={(operation) => set({ operation })}
              options={operations}
              error={errorOf('operation')}
            />
            <SelectField
              label="At"
              none="Every bench"
              value={values.bench_id}
              onChange={(bench_id) => set({ bench_id })}
              options={benches}
              error={errorOf('bench_id')}
            />
            <WeightField
              label="Expected back"
              unit="%"
              value={values.rate}
              onChange={(rate) => set({ rate })}
              error={errorOf('gold_percent')}
            />
          </>
        )}
      </EventFields>
    </Section>
  );
}
