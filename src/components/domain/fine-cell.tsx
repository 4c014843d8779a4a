/** The fine masses of a row, one line per metal, each with its symbol and swatch. */
import { METALS } from '../../../shared/mass/vector.ts';
import { gramsFigure, isNothing } from '../../lib/formats.ts';
import type { Masses } from '../ui/composition-bar.tsx';
import { Swatch, metalSymbol } from '../ui/metal-key.tsx';

export function FineCell({ masses }: { readonly masses: Omit<Masses, 'gross_g'> }) {
  const there = METALS.filter((metal) => !isNothing(masses[`${metal}_g`]));
  if (there.length === 0) return <span className="none">none</span>;
  return (
    <>
      {there.map((metal) => (
        <div key={metal} className="fig">
          <b>{gramsFigure(masses[`${metal}_g`])}</b> <span className="symbol">{metalSymbol(metal)}</span>{' '}
          <Swatch metal={metal} />
        </div>
      ))}
    </>
  );
}
