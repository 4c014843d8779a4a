/**
 * Which marks of fineness a place knows, how far metal may be under them, and where that is published. Only what is
 * published is here; choosing and checking is in `marking.ts`. Law differs by place and changes: none of this is
 * advice, and each entry says how sure it is.
 */
import { Decimal } from '../decimal.ts';
import type { Micrograms } from '../mass/micrograms.ts';
import type { Metal } from '../mass/vector.ts';
import { karatToPermille } from './fineness.ts';
import type { PublishedSource } from './published-source.ts';
import { fromMemory, readIn } from './published-source.ts';

/** A mark as it is struck, and the parts per thousand of the metal that it promises. */
export interface Mark {
  readonly mark: string;
  readonly permille: Decimal;
}

/** By how many parts per thousand the metal may be under its mark, in a piece free of solder or with its solder. */
export interface Tolerance {
  readonly free_of_solder: Decimal;
  readonly with_solder: Decimal;
  readonly source: PublishedSource;
}

export interface MarkingStandard {
  readonly metal: Metal;
  readonly marks: readonly Mark[];
  readonly source: PublishedSource;
  readonly tolerance: Tolerance;
  /** Articles lighter than this need no mark, though the metal must still be good; null where nothing is so. */
  readonly unmarked_below: Micrograms | null;
}

/** Marks of figures only: the mark is its own per mille. */
const figures = (list: string): readonly Mark[] =>
  list.split(' ').map((mark) => ({ mark, permille: new Decimal(mark) }));

/** Marks such as "14K" that promise the exact 24th part. */
const karats = (list: string): readonly Mark[] =>
  list.split(' ').map((mark) => ({ mark: `${mark}K`, permille: karatToPermille(mark) }));

/** Marks such as "14K585": the figure behind the K is what counts. */
const karatsWithFigures = (list: string): readonly Mark[] =>
  list.split(' ').map((mark) => ({ mark, permille: new Decimal(mark.split('K')[1] ?? mark) }));

function standard(
  metal: Metal,
  marks: readonly Mark[],
  source: PublishedSource,
  more: { readonly tolerance: Tolerance; readonly unmarked_below?: Micrograms },
): MarkingStandard {
  return { metal, marks, source, unmarked_below: null, ...more };
}

const underBy = (free: string, withSolder: string, source: PublishedSource): Tolerance => ({
  free_of_solder: new Decimal(free),
  with_solder: new Decimal(withSolder),
  source,
});
const nothingUnder = (source: PublishedSource): Tolerance => underBy('0', '0', source);

const GB = readIn('Hallmarking Convention, country profile of the United Kingdom');
const GB_NONE = nothingUnder(readIn('Hallmarking Act 1973 s. 1(4) as enacted'));
const CONVENTION = fromMemory('Vienna Convention on hallmarks, Annex I');
const CONVENTION_NONE = nothingUnder(fromMemory('Vienna Convention on hallmarks, Annex I'));
const FI = readIn('Finnish Safety and Chemicals Agency, guidance on fineness requirements');
const IN = readIn('IS 1417:2016 and press reports of the grades from 1 January 2017');
const IN_LATER = fromMemory('IS 1417, later amendment');
const US_GOLD = underBy('3', '7', readIn('15 U.S.C. 295 as amended by Pub. L. 94-450 (1976)'));
const US_SILVER = underBy('4', '10', fromMemory('15 U.S.C. 296'));
const ISO = fromMemory('ISO 9202, the finenesses that all its editions have');
const ISO_NONE = nothingUnder(readIn('ISO 9202, abstract: only least values, no minus tolerance'));

/** Places in the order in which they are offered. `decides` is who has the last word there. */
export const MARKING_PLACES = {
  united_kingdom: {
    name: 'the United Kingdom',
    decides: 'The assay office decides.',
    standards: [
      standard('gold', figures('375 585 750 916 990 999'), GB, {
        tolerance: GB_NONE,
        unmarked_below: 1_000_000n,
      }),
      standard('silver', figures('800 925 958 999'), GB, { tolerance: GB_NONE, unmarked_below: 7_780_000n }),
      standard('platinum', figures('850 900 950 999'), GB, {
        tolerance: GB_NONE,
        unmarked_below: 500_000n,
      }),
      standard('palladium', figures('500 950 999'), GB, { tolerance: GB_NONE, unmarked_below: 1_000_000n }),
    ],
  },
  convention: {
    name: 'the Hallmarking Convention',
    decides: 'An authorised assay office decides.',
    standards: [
      standard('gold', figures('375 585 750 800 916 999'), CONVENTION, { tolerance: CONVENTION_NONE }),
      standard('silver', figures('800 830 925 999'), CONVENTION, { tolerance: CONVENTION_NONE }),
      standard('platinum', figures('850 900 950 999'), CONVENTION, { tolerance: CONVENTION_NONE }),
      standard('palladium', figures('500 950 999'), CONVENTION, { tolerance: CONVENTION_NONE }),
    ],
  },
  finland: {
    name: 'Finland',
    decides: 'The assay office decides.',
    standards: [standard('gold', figures('375 585 750 916 999'), FI, { tolerance: nothingUnder(FI) })],
  },
  united_states: {
    name: 'the United States',
    decides: 'The local authority decides.',
    standards: [
      standard(
        'gold',
        karats('10 14 18 22 24'),
        fromMemory('Usual karat marks; no closed list is published'),
        {
          tolerance: US_GOLD,
        },
      ),
      standard(
        'silver',
        [
          { mark: 'coin', permille: new Decimal(900) },
          { mark: 'sterling', permille: new Decimal(925) },
        ],
        fromMemory('15 U.S.C. 296'),
        { tolerance: US_SILVER },
      ),
      standard('platinum', figures('850 950'), fromMemory('16 CFR 23.6'), {
        tolerance: nothingUnder(fromMemory('16 CFR 23.6')),
      }),
    ],
  },
  india: {
    name: 'India',
    decides: 'The assaying centre decides.',
    standards: [
      standard('gold', karatsWithFigures('14K585 18K750 22K916'), IN, {
        tolerance: nothingUnder(fromMemory('IS 1417')),
      }),
    ],
  },
  india_later: {
    name: 'India with the later grades',
    decides: 'The assaying centre decides.',
    standards: [
      standard('gold', karatsWithFigures('14K585 18K750 20K833 22K916 23K958 24K995'), IN_LATER, {
        tolerance: nothingUnder(fromMemory('IS 1417')),
      }),
    ],
  },
  iso_9202: {
    name: 'ISO 9202',
    decides: 'The local authority decides.',
    standards: [
      standard('gold', figures('375 585 750 800 916 990 999'), ISO, { tolerance: ISO_NONE }),
      standard('silver', figures('800 925 999'), ISO, { tolerance: ISO_NONE }),
      standard('platinum', figures('850 900 950 999'), ISO, { tolerance: ISO_NONE }),
      standard('palladium', figures('500 950 999'), ISO, { tolerance: ISO_NONE }),
    ],
  },
} as const satisfies Readonly<
  Record<
    string,
    { readonly name: string; readonly decides: string; readonly standards: readonly MarkingStandard[] }
  >
>;

export type MarkingPlace = keyof typeof MARKING_PLACES;

/** The standard of a place for a metal, or null where none is kept here. */
export function markingStandard(place: MarkingPlace, metal: Metal): MarkingStandard | null {
  const standards: readonly MarkingStandard[] = MARKING_PLACES[place].standards;
  return standards.find((one) => one.metal === metal) ?? null;
}
