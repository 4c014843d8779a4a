/** What waits at the counter: handovers, requests, lots on hold, consignments, losses to explain, signatures. */
import type { ReactNode } from 'react';
import type { TodayJson } from '../../../shared/schemas/today.ts';
import { paths } from '../../app/paths.ts';
import { LotChip } from '../../components/domain/lot-chip.tsx';
import { LinkButton } from '../../components/ui/button.tsx';
import type { IconName } from '../../components/ui/icon.tsx';
import { Icon } from '../../components/ui/icon.tsx';
import { dayText, gramsFigure, numberText } from '../../lib/formats.ts';

interface QueueItem {
  readonly key: string;
  readonly icon: IconName;
  readonly words: ReactNode;
  readonly since: string;
  readonly to: string;
  readonly action: string;
}

export function CounterQueue({ day }: { readonly day: TodayJson }) {
  const items = queueOf(day);
  if (items.length === 0) return <p className="none">Nothing waits.</p>;
  return (
    <ul className="m-0 list-none p-0">
      {items.map((item) => (
        <li key={item.key} className="flex flex-wrap items-center gap-4 border-b border-rule py-3">
          <Icon name={item.icon} size={20} />
          <span className="min-w-[240px] flex-1">{item.words}</span>
          <span className="text-ink-2">{item.since}</span>
          <LinkButton to={item.to}>{item.action}</LinkButton>
        </li>
      ))}
    </ul>
  );
}

function queueOf(day: TodayJson): readonly QueueItem[] {
  return [
    ...(day.signatures === 0
      ? []
      : [
          {
            key: 'signatures',
            icon: 'sign' as const,
            words: (
              <b>{`${day.signatures} ${day.signatures === 1 ? 'act waits' : 'acts wait'} for a second signature.`}</b>
            ),
            since: '',
            to: paths.signatures,
            action: 'Open the queue',
          },
        ]),
    ...day.handovers.map((row): QueueItem => ({
      key: row.id,
      icon: row.state === 'disputed' ? 'bad' : 'wait',
      words: (
        <>
          <b>
            {row.state === 'disputed'
              ? `${row.to_name} disputes the weight.`
              : `${row.to_name} has not acknowledged`}
          </b>{' '}
          {gramsFigure(row.gross_g)} g at {row.place_name}
          {row.job_code === null ? '.' : `, job ${row.job_code}.`}
        </>
      ),
      since: dayText(row.recorded_at.slice(0, 10)),
      to: `/counter/handover/${row.voucher_id}`,
      action: row.state === 'disputed' ? 'Settle it' : 'Take the PIN',
    })),
    ...day.requests.map((row): QueueItem => ({
      key: row.id,
      icon: 'out',
      words: (
        <>
          <b>{row.person_name} asks</b> for {gramsFigure(row.mass_g)} g of {row.alloy ?? 'metal'}{' '}
          {row.form ?? ''}
          {row.job_code === null ? '.' : `, job ${row.job_code}.`}
        </>
      ),
      since: dayText(row.made_at.slice(0, 10)),
      to: `${paths.issue}?request=${row.id}`,
      action: 'Issue',
    })),
    ...day.holds.map((row): QueueItem => ({
      key: row.id,
      icon: 'hold',
      words: (
        <>
          <b>Lot on hold.</b> <LotChip {...row} /> {row.hold_reason}
        </>
      ),
      since: row.hold_until === null ? '' : `until ${dayText(row.hold_until)}`,
      to: paths.lot(row.id),
      action: 'Open the lot',
    })),
    ...day.to_explain.map((row): QueueItem => ({
      key: row.id,
      icon: 'bad',
      words: (
        <>
          <b>A loss is to be explained.</b> {row.bench_name}, {row.operation?.replaceAll('_', ' ')}, voucher{' '}
          {numberText(row.sequence)}.
        </>
      ),
      since: dayText(row.business_date),
      to: `/counter/explain/${row.id}`,
      action: 'Explain it',
    })),
    ...day.consignments.map((row): QueueItem => ({
      key: row.id,
      icon: 'courier',
      words: (
        <>
          <b>Consignment {row.code}</b>{' '}
          {row.state === 'on_the_way'
            ? `is on the way to ${row.destination_name}. Arrival is not confirmed.`
            : `lies at ${row.destination_name} and is not settled.`}
        </>
      ),
      since: dayText(row.business_date),
      to: paths.consignment(row.id),
      action: 'Open',
    })),
  ];
}
