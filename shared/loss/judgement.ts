/** The one word that judges a loss against its allowance and the limit of error of its weighings. */
import type { Micrograms } from '../mass/micrograms.ts';

export const FINDINGS = [
  'within_weighing_error',
  'within_allowance',
  'over_within_error',
  'over_allowance',
  'no_allowance',
  'more_back',
] as const;
export type Finding = (typeof FINDINGS)[number];

/** The words of a finding, as on screen and in print. */
export const FINDING_WORDS = {
  within_weighing_error: 'Within weighing error',
  within_allowance: 'Within allowance',
  over_within_error: 'Over, within error',
  over_allowance: 'Over allowance',
  no_allowance: 'No allowance set',
  more_back: 'More back than out',
} as const satisfies Record<Finding, string>;

/**
 * Judges a loss, all in micrograms of fine metal. "Over, within error" means that it passes its allowance by less than
 * its limit of error. Where no allowance is set, only the weighing error can be judged.
 */
export function judgeLoss(loss: Micrograms, allowed: Micrograms | null, limit_of_error: Micrograms): Finding {
  const size = loss < 0n ? -loss : loss;
  if (size <= limit_of_error) return 'within_weighing_error';
  if (loss < 0n) return 'more_back';
  if (allowed === null) return 'no_allowance';
  if (loss <= allowed) return 'within_allowance';
  return loss - allowed <= limit_of_error ? 'over_within_error' : 'over_allowance';
}
