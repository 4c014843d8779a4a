/** Who holds what: place, person, lots, since when, gross and fine, how the handover stands, the value. */
import { Link } from 'react-router-dom';
import type { TodayJson } from '../../../shared/schemas/today.ts';
import { METALS, ZERO_MASS, addMass, massFromJson, massToJson } from '../../../shared/mass/vector.ts';
import { paths } from '../../app/paths.ts';
import { FineCell } from '../../components/domain/fine-cell.tsx';
import { LotChip } from '../../components/domain/lot-chip.tsx';
import { Grams } from '../../components/ui/figure.tsx';
import type { IconName } from '../../components/ui/icon.tsx';
import { Icon } from '../../components/ui/icon.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import { dayText, moneyText } from '../../lib/formats.ts';

type Holder = TodayJson['holders'][number];

export const placeIcon = (kind: string): IconName =>
  kind === 'safe' ||
  kind === 'bench' ||
  kind === 'station' ||
  kind === 'bin' ||
  kind === 'courier' ||
  kind === 'refiner'
    ? kind
    : 'user';

const SHOWN_LOTS = 4;

export function Holders({ day }: { readonly day: TodayJson }) {
  const waiting = (row: Holder) => day.handovers.find((handover) => handover.place_id === row.account_id);
  const columns: readonly Column<Holder>[] = [
    {
      id: 'holder',
      head: 'Holder',
      value: (row) => row.name,
      cell: (row) => <HolderName row={row} />,
    },
    {
      id: 'lots',
      head: 'Lots held',
      repeats: true,
      cell: (row) => (
        <span className="flex flex-col items-start gap-1">
          {row.lots.slice(0, SHOWN_LOTS).map((lot) => (
            <LotChip key={lot.id} {...lot} />
          ))}
          {row.lots.length > SHOWN_LOTS ? (
            <Link
              to={`${paths.lots}?place_id=${row.account_id}`}
            >{`and ${row.lots.length - SHOWN_LOTS} more`}</Link>
          ) : null}
        </span>
      ),
    },
    { id: 'since', head: 'Out since', value: (row) => row.since, cell: (row) => dayText(row.since) },
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
    {
      id: 'handover',
      head: 'Handover',
      value: (row) => waiting(row)?.state ?? 'acknowledged',
      cell: (row) => {
        const handover = waiting(row);
        if (handover === undefined)
          return <StatusWord status={row.custodian_name === null ? 'In own charge' : 'Acknowledged'} />;
        return (
          <StatusWord
            status={handover.state === 'disputed' ? 'Disputed' : 'Waiting'}
            after={dayText(handover.recorded_at.slice(0, 10))}
          />
        );
      },
    },
    {
      id: 'value',
      head: 'Value',
      figure: 'plain',
      value: (row) => row.value ?? '',
      cell: (row) =>
        row.value === null ? <span className="none">not priced</span> : moneyText(row.value, day.currency),
    },
  ];
  const sum = massToJson(day.holders.reduce((total, row) => addMass(total, massFromJson(row)), ZERO_MASS));
  const any = METALS.some((metal) => sum[`${metal}_g`] !== '0.000000');
  return (
    <RegisterTable
      caption="Holders of metal out of the safe"
      columns={columns}
      rows={day.holders}
      rowKey={(row) => row.account_id}
      rowTone={(row) => (waiting(row)?.state === 'waiting' ? 'waiting' : '')}
      empty="Nothing is out of the safe. What you issue shows here with its holder and since when."
      {...(any
        ? {
            total: [
              'All holders',
              '',
              '',
              <Grams key="gross" grams={sum.gross_g} />,
              <FineCell key="fine" masses={sum} />,
              '',
              day.value_out === null ? '' : moneyText(day.value_out, day.currency),
            ],
          }
        : {})}
    />
  );
}

function HolderName({ row }: { readonly row: Holder }) {
  return (
    <span className="flex items-center gap-3">
      <Icon name={placeIcon(row.kind)} size={20} />
      <span>
        <Link className="plain" to={`${paths.vouchers}?account_id=${row.account_id}`}>
          <b>{row.name}</b>
        </Link>
        <br />
        <small className="text-ink-2">{row.custodian_name ?? 'nobody in particular'}</small>
      </span>
    </span>
  );
}
