/** The mark of each kind of record, for histories and registers. */
import type { RecordKind } from '../../../shared/book/kinds.ts';
import type { IconName } from '../ui/icon.tsx';

const MARKS: Partial<Record<RecordKind, IconName>> = {
  opening: 'balance',
  weigh_in: 'in',
  transfer: 'next',
  issue: 'out',
  weigh_back: 'back',
  melt: 'melt',
  rework: 'sheet',
  delivery: 'work',
  sweep_up: 'sweeps',
  consign: 'courier',
  arrive: 'refiner',
  outturn: 'refiner',
  settle: 'seal',
  count: 'balance',
  reassay: 'ok',
  ownership: 'user',
  return_to_owner: 'out',
  write_off: 'bad',
  correction: 'sign',
  reversal: 'undo',
  lot_held: 'hold',
  lot_released: 'check',
  handover_acknowledged: 'check',
  handover_disputed: 'bad',
};

/** The mark of a kind; the book's own where it has none. */
export const kindIcon = (kind: RecordKind): IconName => MARKS[kind] ?? 'book';
