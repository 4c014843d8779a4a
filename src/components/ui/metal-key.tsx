/** Metals, drawn as engravers draw them in one colour: by line. The name or symbol always stands beside the swatch. */
import type { Metal } from '../../../shared/mass/vector.ts';
import { ground } from './patterns.tsx';

export type Drawn = Metal | 'base';

interface Look {
  readonly line: string;
  readonly name: string;
  readonly symbol: string;
}

const LOOK: Readonly<Record<Drawn, Look>> = {
  gold: { line: 'var(--au-line)', name: 'Gold', symbol: 'Au' },
  silver: { line: 'var(--ag-line)', name: 'Silver', symbol: 'Ag' },
  platinum: { line: 'var(--pt-line)', name: 'Platinum', symbol: 'Pt' },
  palladium: { line: 'var(--pd-line)', name: 'Palladium', symbol: 'Pd' },
  base: { line: 'var(--base-line)', name: 'Base metal', symbol: 'base' },
};

export const metalName = (metal: Drawn): string => LOOK[metal].name;
export const metalSymbol = (metal: Drawn): string => LOOK[metal].symbol;

interface MetalPatternProps {
  readonly metal: Drawn;
  readonly width: number;
  readonly height: number;
}

/** A box filled with the metal's ground, with an edge in its line colour. */
export function MetalPattern({ metal, width, height }: MetalPatternProps) {
  const inside = { width: Math.max(0, width - 1.5), height: Math.max(0, height - 1.5) };
  return (
    <rect x="0.75" y="0.75" {...inside} fill={ground(metal)} stroke={LOOK[metal].line} strokeWidth="1.5" />
  );
}

export function Swatch({ metal }: { readonly metal: Drawn }) {
  return (
    <svg className="swatch" width="16" height="13" viewBox="0 0 16 13" aria-hidden="true">
      <MetalPattern metal={metal} width={16} height={13} />
    </svg>
  );
}

export function MetalKey({ metal }: { readonly metal: Drawn }) {
  return (
    <span className="fig">
      <Swatch metal={metal} /> {metalName(metal)}
    </span>
  );
}
