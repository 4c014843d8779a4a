/** A notice: severity edge, mark, a bold first sentence that says what is so, then what to do. */
import type { ReactNode } from 'react';
import type { IconName } from './icon.tsx';
import { Icon } from './icon.tsx';

export type Severity = 'fault' | 'near' | 'waiting' | 'agreed';

const MARKS: Readonly<Record<Severity, IconName>> = {
  fault: 'bad',
  near: 'near',
  waiting: 'wait',
  agreed: 'ok',
};

export function Notice({
  severity,
  what,
  children,
  action,
}: {
  readonly severity: Severity;
  readonly what: string;
  readonly children?: ReactNode;
  readonly action?: ReactNode;
}) {
  return (
    <div className={`notice ${severity}`} role={severity === 'fault' ? 'alert' : 'status'}>
      <Icon name={MARKS[severity]} size={20} />
      <span className="words">
        <strong>{what}</strong> {children}
      </span>
      {action}
    </div>
  );
}
