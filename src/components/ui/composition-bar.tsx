/**
 * Metals side by side by fineness, with their patterns; names and figures under their parts. Parts too thin for their
 * names, and on a phone all of them, are named in a line beneath instead.
 */
import { gramsText } from '../../../shared/mass/grams-text.ts';
import { METALS } from '../../../shared/mass/vector.ts';
import { ugFigure } from '../../lib/formats.ts';
import type { Drawn } from './metal-key.tsx';
import { Swatch, metalName } from './metal-key.tsx';

export interface Masses {
  readonly gross_g: string;
  readonly gold_g: string;
  readonly silver_g: string;
  readonly platinum_g: string;
  readonly palladium_g: string;
}

interface Part {
  readonly metal: Drawn;
  readonly ug: bigint;
  /** Tenths of a per mille of gross, rounded to the nearest. */
  readonly tenths: bigint;
}

const THIN = 400n;

export function CompositionBar({ masses }: { readonly masses: Masses }) {
  const gross = gramsText(masses.gross_g);
  if (gross <= 0n) return null;
  const parts = partsOf(masses, gross);
  const words = parts.map(({ metal, tenths }) => `${metalName(metal)} ${perThousand(tenths)}`).join(', ');
  return (
    <div className="composition" role="group" aria-label={`Per thousand: ${words}`}>
      <div className="composition-bar">
        {parts.map((part) => (
          <div key={part.metal} className="composition-part" style={{ flexGrow: part.tenths.toString() }}>
            <div className={`composition-ground ${part.metal}`} />
            {part.tenths < THIN ? null : <Named part={part} />}
          </div>
        ))}
      </div>
      <div className="composition-names">
        {parts.map((part) => (
          <span key={part.metal} className={part.tenths < THIN ? '' : 'wide'}>
            <Swatch metal={part.metal} /> <Named part={part} />
          </span>
        ))}
      </div>
    </div>
  );
}

function Named({ part }: { readonly part: Part }) {
  return (
    <>
      <b>{`${metalName(part.metal)} ${perThousand(part.tenths)}`}</b>{' '}
      <span className="composition-mass">{`${ugFigure(part.ug)} g`}</span>
    </>
  );
}

function partsOf(masses: Masses, gross: bigint): readonly Part[] {
  const fine = METALS.map((metal) => ({ metal, ug: gramsText(masses[`${metal}_g`]) }));
  const base = gross - fine.reduce((sum, part) => sum + part.ug, 0n);
  const all: readonly { readonly metal: Drawn; readonly ug: bigint }[] = [
    ...fine,
    { metal: 'base', ug: base },
  ];
  return all
    .filter((part) => part.ug > 0n)
    .map((part) => ({ ...part, tenths: (part.ug * 20_000n + gross) / (gross * 2n) }));
}

/** Tenths of a per mille as it is written: "750.4", "750". */
function perThousand(tenths: bigint): string {
  return tenths % 10n === 0n ? `${tenths / 10n}` : `${tenths / 10n}.${tenths % 10n}`;
}
