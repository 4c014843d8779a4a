/** Parses a request body by its schema; what does not fit is told by field, in sentences. */
import type { z } from 'zod';
import { ProblemError } from '../../problem.ts';

/** The checked input. Throws ProblemError `invalid` with one sentence per field. */
export function checkBody<T>(schema: z.ZodType<T>, body: unknown): T {
  const read = schema.safeParse(body);
  if (read.success) return read.data;
  const errors = read.error.issues.map((issue) => ({
    field: issue.path.join('.') || null,
    sentence: issue.code === 'unrecognized_keys' ? unknownField(issue.keys) : issue.message,
  }));
  throw new ProblemError('invalid', 'Some entries are not right. Nothing was posted.', { errors });
}

function unknownField(keys: readonly string[]): string {
  return `${keys.join(', ')} is not asked for here. Leave it out.`;
}
