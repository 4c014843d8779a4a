/** Metals, drawn as engravers draw them in one colour: by line. The name or symbol always stands beside the swatch. */
import type { Metal } from '../../../shared/mass/vector.ts';

export type Drawn = Metal | 'base';

const LOOK: Readonly<
  Record<
    Drawn,
    { readonly ground: string; readonly line: string; readonly name: string; readonly symbol: string }
  >
> = {
  gold: { ground: 'var(--au)', line: 'var(--au-line)', name: 'Gold', symbol: 'Au' },
  silver: { ground: 'var(--ag)', line: 'var(--ag-line)', name: 'Silver', symbol: 'Ag' },
  platinum: { ground: 'var(--pt)', line: 'var(--pt-line)', name: 'Platinum', symbol: 'Pt' },
  palladium: { ground: 'var(--pd)', line: 'var(--pd-line)', name: 'Palladium', symbol: 'Pd' },
  base: { ground: 'var(--base)', line: 'var(--base-line)', name: 'Base metal', symbol: 'base' },
};

export const metalName = (metal: Drawn): string => LOOK[metal].name;
export const metalSymbol = (metal: Drawn): string => LOOK[metal].symbol;

/** The pattern's lines inside a box. */
export function MetalPattern({
  metal,
  width,
  height,
}: {
  readonly metal: Drawn;
  readonly width: number;
  readonly height: number;
}) {
  const { ground, line } = LOOK[metal];
  const id = `metal-${metal}`;
  return (
    <>
      <defs>
        <pattern
          id={id}
          width={metal === 'platinum' ? 4 : 5}
          height={metal === 'platinum' ? 4 : 5}
          patternUnits="userSpaceOnUse"
        >
          {metal === 'gold' ? (
            <>
              <circle cx="1.2" cy="1.2" r="0.85" fill={line} />
              <circle cx="3.7" cy="3.7" r="0.85" fill={line} />
            </>
          ) : null}
          {metal === 'platinum' ? <path d="M0 2h4" stroke={line} strokeWidth="0.9" /> : null}
          {metal === 'palladium' || metal === 'base' ? (
            <path d="M0 5L5 0" stroke={line} strokeWidth={metal === 'base' ? 0.7 : 0.9} />
          ) : null}
          {metal === 'base' ? <path d="M0 0L5 5" stroke={line} strokeWidth="0.7" /> : null}
        </pattern>
      </defs>
      <rect width={width} height={height} fill={ground} />
      <rect width={width} height={height} fill={`url(#${id})`} stroke={line} strokeWidth="1.5" />
    </>
  );
}

export function Swatch({ metal }: { readonly metal: Drawn }) {
  return (
    <svg className="swatch" width="18" height="14" viewBox="0 0 18 14" aria-hidden="true">
      <MetalPattern metal={metal} width={18} height={14} />
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
