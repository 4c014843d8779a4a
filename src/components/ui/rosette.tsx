/**
 * A guilloche figure drawn from the first eight bytes of the chain head's hash: two copies of the same book show the
 * same rosette. An aid to the eye; the hash printed below it decides. Formula: DESIGN-LOOK section 6.
 */
import { useMemo } from 'react';
import { rosettePaths } from '../../lib/rosette-paths.ts';

interface RosetteProps {
  readonly hash: string;
  readonly size?: number;
  /** Ornament (sign-in, empty lists) has no name; the chain head's own has one. */
  readonly name?: string;
  readonly className?: string;
}

export function Rosette({ hash, size = 200, name, className = 'rosette' }: RosetteProps) {
  const paths = useMemo(() => rosettePaths(hash, 98), [hash]);
  return (
    <svg
      className={className}
      width={size}
      height={size}
      viewBox="-100 -100 200 200"
      role={name === undefined ? undefined : 'img'}
      aria-label={name}
      aria-hidden={name === undefined ? true : undefined}
    >
      {paths.map((path) => (
        <path
          key={path}
          d={path}
          fill="none"
          stroke="currentColor"
          strokeWidth="0.6"
          vectorEffect="non-scaling-stroke"
        />
      ))}
    </svg>
  );
}
