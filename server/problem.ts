/** A refusal on its way to the client: a code of the closed list, a sentence, and what is wrong field by field. */
import type { Refusal } from '../shared/book/draft.ts';
import type { ProblemCode } from '../shared/problems.ts';

export interface FieldError {
  readonly field: string | null;
  readonly sentence: string;
}

export interface ProblemExtras {
  readonly errors?: readonly FieldError[];
  readonly data?: Readonly<Record<string, string | null>>;
  readonly retry_after_s?: number;
}

export class ProblemError extends Error {
  readonly code: ProblemCode;
  readonly extras: ProblemExtras;

  constructor(code: ProblemCode, sentence: string, extras: ProblemExtras = {}) {
    super(sentence);
    this.code = code;
    this.extras = extras;
  }

  /** The refusals of an event: the first gives code and sentence, all of them stand beside their fields. */
  static ofRefusals(refusals: readonly Refusal[]): ProblemError {
    const [first] = refusals;
    if (first === undefined) throw new Error('a refused event names no reason');
    return new ProblemError(first.code, first.sentence, {
      errors: refusals.map(({ field, sentence }) => ({ field, sentence })),
    });
  }
}
