/** The fine masses of a vector, one line per metal; below nothing with its minus. */
import { METALS, massToJson } from '../../../shared/mass/vector.ts';
import type { MassVector } from '../../../shared/mass/vector.ts';
import { FineCell } from '../../components/domain/fine-cell.tsx';

export const FineMasses = ({ mass }: { readonly mass: MassVector }) => <FineCell masses={massToJson(mass)} />;

/** The metal that a mass has most of, or null where it has none. */
export const chiefMetal = (mass: MassVector) =>
  METALS.filter((metal) => mass[metal] !== 0n).toSorted((a, b) => (mass[b] > mass[a] ? 1 : -1))[0] ?? null;
