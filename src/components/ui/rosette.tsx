/**
 * A guilloche figure drawn from the first eight bytes of the chain head's hash: two copies of the same book show the
 * same rosette. An aid to the eye; the hash printed below it decides. Formula: DESIGN-LOOK section 6.
 */
import { rosettePaths } from '../../lib/rosette-paths.ts';

export function Rosette({ hash, size = 200 }: { readonly hash: string; readonly size?: number }) {
  return (
    <svg width={size} height={size} viewBox="-100 -100 200 200" aria-hidden="true">
      {rosettePaths(hash, 98).map((path) => (
        <path key={path} d={path} fill="none" stroke="var(--ink-2)" strokeWidth="0.35" />
      ))}
    </svg>
  );
}
