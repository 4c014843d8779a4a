/** Reversals as exact mirrors used once, no voucher in a closed period, time that never runs back. */
import { isVoucherKind } from '../../book/kinds.ts';
import type { ChainEntry, ChainRecord } from '../../chain/record-line.ts';
import type { Finding } from '../finding.ts';
import { leafOf } from '../replay.ts';

/** Reversals that mirror nothing, mirror wrongly, or mirror what was mirrored before. */
export function reversals(records: readonly ChainRecord[]): readonly Finding[] {
  const seen = new Map<string, ChainRecord>();
  const used = new Set<string>();
  const findings: Finding[] = [];
  for (const record of records) {
    seen.set(record.id, record);
    if (record.kind !== 'reversal') continue;
    const at = record.sequence;
    const first = seen.get(record.reverses ?? '');
    if (first === undefined || !isVoucherKind(first.kind) || first.kind === 'reversal') {
      findings.push({ at, sentence: `Voucher ${at} reverses nothing that stands before it.` });
      continue;
    }
    if (used.has(first.id))
      findings.push({
        at,
        sentence: `Voucher ${at} reverses voucher ${first.sequence}, which was reversed already.`,
      });
    used.add(first.id);
    if (!isMirror(first.entries, record.entries))
      findings.push({ at, sentence: `Voucher ${at} is not the exact mirror of voucher ${first.sequence}.` });
  }
  return findings;
}

const MASSES = ['gross_g', 'gold_g', 'silver_g', 'platinum_g', 'palladium_g'] as const;
const negated = (text: string): string =>
  /^-?0(\.0+)?$/.test(text) ? text.replace('-', '') : text.startsWith('-') ? text.slice(1) : `-${text}`;

function isMirror(a: readonly ChainEntry[], b: readonly ChainEntry[]): boolean {
  const row = (entry: ChainEntry, turn: (text: string) => string) =>
    [
      entry.account_id,
      entry.lot_id,
      ...MASSES.map((key) => turn(entry[key])),
      entry.pieces === null ? '' : turn(entry.pieces),
    ].join(' ');
  const first = a.map((entry) => row(entry, negated)).sort();
  const second = b.map((entry) => row(entry, (text) => text)).sort();
  return first.length === second.length && first.every((text, index) => text === second[index]);
}

/** Vouchers whose business date lay in a period that was closed when they were recorded. */
export function closedPeriods(records: readonly ChainRecord[]): readonly Finding[] {
  const closed = new Map<string, { from: string; to: string }>();
  const findings: Finding[] = [];
  for (const record of records) {
    const id = leafOf(record, 'period_id') ?? '';
    if (record.kind === 'period_reopened') closed.delete(id);
    const hit = [...closed.values()].find(
      ({ from, to }) => record.business_date >= from && record.business_date <= to,
    );
    if (hit !== undefined)
      findings.push({
        at: record.sequence,
        sentence: `Record ${record.sequence} enters ${record.business_date}, which was closed.`,
      });
    if (record.kind === 'period_closed')
      closed.set(id, { from: leafOf(record, 'from') ?? '', to: leafOf(record, 'to') ?? '' });
  }
  return findings;
}

/** Records whose time lies before the one they follow. */
export function timeRunsOn(records: readonly ChainRecord[]): readonly Finding[] {
  return records.flatMap((record, index) => {
    const before = records[index - 1];
    return before === undefined || before.recorded_at <= record.recorded_at
      ? []
      : [
          {
            at: record.sequence,
            sentence: `Record ${record.sequence} was recorded before the one it follows.`,
          },
        ];
  });
}
