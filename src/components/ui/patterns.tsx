/**
 * The drawn grounds that charts, bars and swatches fill with, put into the page once beside the marks: metals as
 * engravers draw them by line, what is beyond a limit, and the kinds of return. They follow the theme by themselves.
 */
import type { ReactNode } from 'react';

/** Names of the grounds, for `fill={ground('beyond')}`. */
export type GroundName =
  'gold' | 'silver' | 'platinum' | 'palladium' | 'base' | 'beyond' | 'error' | 'chevrons' | 'grain';

/** The fill of a ground. */
export const ground = (name: GroundName): string => `url(#ground-${name})`;

interface GroundProps {
  readonly name: GroundName;
  readonly size: number;
  readonly fill?: string;
  readonly children?: ReactNode;
}

function Ground({ name, size, fill = 'none', children }: GroundProps) {
  return (
    <pattern id={`ground-${name}`} width={size} height={size} patternUnits="userSpaceOnUse">
      <rect width={size} height={size} fill={fill} />
      {children}
    </pattern>
  );
}

export function Patterns() {
  return (
    <svg className="patterns" width="0" height="0" aria-hidden="true">
      <defs>
        <Ground name="gold" size={5} fill="var(--au)">
          <circle cx="1.25" cy="1.25" r="0.85" fill="var(--au-line)" />
          <circle cx="3.75" cy="3.75" r="0.85" fill="var(--au-line)" />
        </Ground>
        <Ground name="silver" size={5} fill="var(--ag)" />
        <Ground name="platinum" size={4} fill="var(--pt)">
          <path d="M0 2H4" stroke="var(--pt-line)" strokeWidth="0.9" />
        </Ground>
        <Ground name="palladium" size={5} fill="var(--pd)">
          <path d="M-1 1L1-1M0 5L5 0M4 6L6 4" stroke="var(--pd-line)" strokeWidth="0.9" />
        </Ground>
        <Ground name="base" size={5} fill="var(--base)">
          <path
            d="M-1 1L1-1M0 5L5 0M4 6L6 4M-1 4L1 6M0 0L5 5M4-1L6 1"
            stroke="var(--base-line)"
            strokeWidth="0.7"
          />
        </Ground>
        <Ground name="beyond" size={5}>
          <path d="M-1 1L1-1M0 5L5 0M4 6L6 4" stroke="var(--rouge)" strokeWidth="1.1" strokeOpacity="0.75" />
        </Ground>
        <Ground name="error" size={3}>
          <path d="M0 1H3" stroke="var(--verd)" strokeWidth="1" />
        </Ground>
        <Ground name="chevrons" size={12} fill="var(--field)">
          <path
            d="M1 5L4 2L7 5L10 2L12 4M-5 11L-2 8L1 11L4 8L7 11L10 8L13 11"
            fill="none"
            stroke="var(--ink-2)"
          />
        </Ground>
        <Ground name="grain" size={4} fill="var(--field)">
          <circle cx="1" cy="1" r="0.6" fill="var(--ink-2)" />
          <circle cx="3" cy="3" r="0.6" fill="var(--ink-2)" />
        </Ground>
      </defs>
    </svg>
  );
}
