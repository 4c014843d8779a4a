/** A list with nothing in it: what is so, what will show here, and one action. */
import type { ReactNode } from 'react';
import { Rosette } from './rosette.tsx';

/** The ornament behind empty lists: any eight bytes, always the same. */
const ORNAMENT = '2f6b0e9d4177c031';

interface EmptyProps {
  readonly what: string;
  readonly words?: string;
  readonly action?: ReactNode;
}

export function Empty({ what, words, action }: EmptyProps) {
  return (
    <div className="empty">
      <Rosette hash={ORNAMENT} size={112} />
      <div>
        <p className="empty-what">{what}</p>
        {words === undefined ? null : <p>{words}</p>}
        {action}
      </div>
    </div>
  );
}
