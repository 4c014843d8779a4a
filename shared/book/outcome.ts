/** Putting outcomes together, so that a form hears all that is wrong with its lines at once. */
import type { Outcome, Refusal } from './draft.ts';
import { accept } from './draft.ts';

/** Every refusal among outcomes, in their order. */
export function refusalsOf(outcomes: readonly Outcome<unknown>[]): readonly Refusal[] {
  return outcomes.flatMap((outcome) => (outcome.ok ? [] : outcome.refusals));
}

/** The values of all outcomes, or every refusal among them. */
export function allOf<T>(outcomes: readonly Outcome<T>[]): Outcome<readonly T[]> {
  const refusals = refusalsOf(outcomes);
  if (refusals.length > 0) return { ok: false, refusals };
  return accept(outcomes.flatMap((outcome) => (outcome.ok ? [outcome.value] : [])));
}
