/**
 * Which mark a fineness may bear, and whether a wanted mark may be struck. A mark is a promise of at least so much, so
 * it is the next lower one of the list and never the nearest: 584 is marked 375, not 585. The assay office or the
 * local authority decides; every answer says so. The published lists are in `marking-standards.ts`.
 */
import { Decimal } from '../decimal.ts';
import type { Micrograms } from '../mass/micrograms.ts';
import type { Metal } from '../mass/vector.ts';
import { printPermille } from './fineness.ts';
import type { Mark, MarkingPlace, MarkingStandard } from './marking-standards.ts';
import { MARKING_PLACES, markingStandard } from './marking-standards.ts';
import type { PublishedSource } from './published-source.ts';

/**
 * A thousandth of a per mille: masses are whole micrograms, so a fineness reckoned from a gram may be this much under
 * what was weighed in. No assay tells so little.
 */
const RECKONING_ERROR = new Decimal('0.001');

const isUnder = (permille: Decimal, least: Decimal): boolean => least.minus(permille).gte(RECKONING_ERROR);

/** The highest mark that metal of so many parts per thousand reaches, or null where it reaches none. */
export function chooseMark(permille: Decimal, marks: readonly Mark[]): Mark | null {
  const reached = marks.filter((mark) => !isUnder(permille, mark.permille));
  return reached.reduce<Mark | null>(
    (best, mark) => (best === null || mark.permille.gt(best.permille) ? mark : best),
    null,
  );
}

export interface MarkingQuestion {
  readonly place: MarkingPlace;
  readonly metal: Metal;
  /** Parts per thousand of the metal, as found or reckoned. */
  readonly permille: Decimal;
  /** The mark that is wanted, as it is struck: "585", "14K", "sterling". */
  readonly mark: string;
  /** Whether the piece is assayed with its solder, for which some places allow more. */
  readonly with_solder: boolean;
}

export interface MarkingAnswer {
  readonly verdict: 'meets' | 'within_tolerance' | 'under' | 'no_such_mark' | 'no_standard';
  /** The highest mark that the metal reaches without any tolerance. */
  readonly reaches: string | null;
  /** What is so, and who decides. */
  readonly sentence: string;
  /** What the answer rests on. */
  readonly sources: readonly PublishedSource[];
}

/** Judges a wanted mark by the published standard of a place. Never throws; where nothing is published it says so. */
export function checkMarking(question: MarkingQuestion): MarkingAnswer {
  const { place, metal, permille } = question;
  const { name, decides } = MARKING_PLACES[place];
  const standard = markingStandard(place, metal);
  if (standard === null) {
    const sentence = `No published standard for ${metal} in ${name} is kept here. ${decides}`;
    return { verdict: 'no_standard', reaches: null, sentence, sources: [] };
  }
  const wanted = standard.marks.find(({ mark }) => mark === question.mark);
  const reaches = chooseMark(permille, standard.marks)?.mark ?? null;
  if (wanted === undefined) {
    const list = standard.marks.map(({ mark }) => mark).join(', ');
    const sentence = `${question.mark} is no mark for ${metal} in ${name}. The marks are ${list}. ${decides}`;
    return { verdict: 'no_such_mark', reaches, sentence, sources: [standard.source] };
  }
  const judged = judge(question, wanted, standard);
  const advice = judged.verdict === 'under' ? ` ${adviceFor(metal, reaches)}` : '';
  return { ...judged, reaches, sentence: `${judged.sentence}${advice} ${decides}` };
}

/** The verdict on a mark that the place knows, and what is so in words. */
function judge(
  { place, metal, permille, with_solder }: MarkingQuestion,
  wanted: Mark,
  { source, tolerance }: MarkingStandard,
): Pick<MarkingAnswer, 'verdict' | 'sentence' | 'sources'> {
  const { name } = MARKING_PLACES[place];
  const found = `${printPermille(permille, 3)} ${metal}`;
  const sources = [source, tolerance.source];
  if (!isUnder(permille, wanted.permille)) {
    return { verdict: 'meets', sentence: `${found} reaches the mark ${wanted.mark} of ${name}.`, sources };
  }
  const allowed = with_solder ? tolerance.with_solder : tolerance.free_of_solder;
  const short = `${found} is ${printPermille(wanted.permille.minus(permille), 3)} under the mark ${wanted.mark}`;
  if (allowed.isZero()) {
    return { verdict: 'under', sentence: `${short}, and ${name} allows nothing under it.`, sources };
  }
  const least = wanted.permille.minus(allowed);
  const limit = `${name} allows ${printPermille(allowed, 3)} ${with_solder ? 'with solder' : 'free of solder'}`;
  return isUnder(permille, least)
    ? { verdict: 'under', sentence: `${short}; ${limit}.`, sources }
    : { verdict: 'within_tolerance', sentence: `${short}; ${limit}, so it may pass.`, sources };
}

const adviceFor = (metal: Metal, reaches: string | null): string =>
  reaches === null
    ? `It reaches no mark for ${metal} there.`
    : `Mark it ${reaches}, or bring the fineness up and have it tested again.`;

/**
 * Whether an article of so many micrograms must be marked at all, or null where no standard is kept here. What needs
 * no mark must still be as good as the least one.
 */
export function needsMark(place: MarkingPlace, metal: Metal, gross: Micrograms): boolean | null {
  const standard = markingStandard(place, metal);
  return standard === null ? null : standard.unmarked_below === null || gross >= standard.unmarked_below;
}
