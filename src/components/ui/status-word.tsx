/** Status words: mark, word and colour together, from a closed set. */
import type { IconName } from './icon.tsx';
import { Icon } from './icon.tsx';

export type Tone = 'verd' | 'brass' | 'rouge' | 'pickle' | 'ink';

const MARKS: Readonly<Record<Tone, IconName>> = {
  verd: 'ok',
  brass: 'near',
  rouge: 'bad',
  pickle: 'wait',
  ink: 'hold',
};

/** Every status word and its tone; a new one takes its place in one of these rows. */
export const STATUS_TONES = {
  Released: 'verd',
  Acknowledged: 'verd',
  'Within weighing error': 'verd',
  'Within allowance': 'verd',
  'Within tolerance': 'verd',
  Kept: 'verd',
  'Book balanced': 'verd',
  Holds: 'verd',
  Done: 'verd',
  Active: 'verd',
  'Near limit': 'brass',
  'Must come back': 'brass',
  'Over, within error': 'brass',
  'Out of date': 'brass',
  'Cannot be shown': 'brass',
  Unexplained: 'rouge',
  'Over allowance': 'rouge',
  'Outside tolerance': 'rouge',
  'Beyond limit': 'rouge',
  Disputed: 'rouge',
  'Book does not balance': 'rouge',
  Fails: 'rouge',
  'More back than out': 'rouge',
  Reversed: 'rouge',
  Failed: 'rouge',
  'To be explained': 'rouge',
  'Not acknowledged': 'pickle',
  'Take over this metal': 'pickle',
  Waiting: 'pickle',
  'Being put together': 'pickle',
  'On the way': 'pickle',
  'On hold': 'ink',
  'In own charge': 'ink',
  Estimate: 'ink',
  Closed: 'ink',
  Spent: 'ink',
  'No allowance set': 'ink',
  Ended: 'ink',
} as const satisfies Record<string, Tone>;
export type Status = keyof typeof STATUS_TONES;

export function StatusWord({ status, after }: { readonly status: Status; readonly after?: string }) {
  const tone = STATUS_TONES[status];
  return (
    <span className={`status ${tone}`}>
      <Icon name={MARKS[tone]} size={18} />
      {status}
      {after === undefined ? null : ` ${after}`}
    </span>
  );
}
