/** Metals side by side by fineness, with their patterns; names and figures under it. */
import { METALS } from '../../../shared/mass/vector.ts';
import { gramsFigure, isNothing } from '../../lib/formats.ts';
import { gramsText } from '../../../shared/mass/grams-text.ts';
import type { Drawn } from './metal-key.tsx';
import { MetalPattern, Swatch, metalName } from './metal-key.tsx';

export interface Masses {
  readonly gross_g: string;
  readonly gold_g: string;
  readonly silver_g: string;
  readonly platinum_g: string;
  readonly palladium_g: string;
}

const WIDTH = 1000;

export function CompositionBar({ masses }: { readonly masses: Masses }) {
  const gross = gramsText(masses.gross_g);
  if (gross <= 0n) return null;
  const fine = METALS.map((metal) => ({ metal, ug: gramsText(masses[`${metal}_g`]) }));
  const base = gross - fine.reduce((sum, part) => sum + part.ug, 0n);
  const all: readonly { readonly metal: Drawn; readonly ug: bigint }[] = [
    ...fine,
    { metal: 'base', ug: base },
  ];
  const parts = all.filter((part) => part.ug > 0n);
  const shares = parts.map(({ metal, ug }) => ({ metal, ug, permille: ((ug * 10_000n) / gross).toString() }));
  return (
    <div>
      <svg
        className="chart"
        viewBox={`0 0 ${WIDTH} 36`}
        preserveAspectRatio="none"
        height="36"
        role="img"
        aria-label={shares
          .map(({ metal, permille }) => `${metalName(metal)} ${perThousand(permille)}`)
          .join(', ')}
      >
        {shares.map(({ metal, permille }, index) => {
          const before = shares
            .slice(0, index)
            .reduce((sum, share) => sum + Number.parseInt(share.permille, 10), 0);
          const width = Number.parseInt(permille, 10) / 10;
          return (
            <g key={metal} transform={`translate(${before / 10} 0)`}>
              <MetalPattern metal={metal} width={width} height={36} />
            </g>
          );
        })}
      </svg>
      <div className="composition-names">
        {shares.map(({ metal, permille }) => (
          <span key={metal}>
            <Swatch metal={metal} /> <b>{`${metalName(metal)} ${perThousand(permille)}`}</b>{' '}
            {metal === 'base' || isNothing(masses[`${metal}_g`])
              ? null
              : `${gramsFigure(masses[`${metal}_g`])} g`}
          </span>
        ))}
      </div>
    </div>
  );
}

/** Tenths of a per mille as it is written: "750.4", "750". */
function perThousand(tenths: string): string {
  const padded = tenths.padStart(2, '0');
  const decimal = padded.slice(-1);
  return decimal === '0' ? padded.slice(0, -1) : `${padded.slice(0, -1)}.${decimal}`;
}
