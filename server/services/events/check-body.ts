/** Parses a request body by its schema; what does not fit is told by field, in sentences. */
import type { z } from 'zod';
import { ProblemError } from '../../problem.ts';

/** The checked input. Throws ProblemError `malformed` for what is no object, `invalid` with one sentence per field. */
export function checkBody<T>(schema: z.ZodType<T>, body: unknown): T {
  if (typeof body !== 'object' || body === null || Array.isArray(body))
    throw new ProblemError('malformed', 'The request has to carry a JSON object.');
  const read = schema.safeParse(body);
  if (read.success) return read.data;
  const errors = read.error.issues.map((issue) => ({
    field: issue.path.join('.') || null,
    sentence: issue.code === 'unrecognized_keys' ? unknownField(issue.keys) : issue.message,
  }));
  throw new ProblemError('invalid', 'Some entries are not right. Nothing was posted.', { errors });
}

/** The checked query of a list. Throws ProblemError `malformed`: a filter that is not offered is no filter. */
export function checkQuery<T>(schema: z.ZodType<T>, query: unknown): T {
  const read = schema.safeParse(query);
  if (read.success) return read.data;
  throw new ProblemError(
    'malformed',
    'A filter of this list is not one that it knows. Choose it from the list.',
  );
}

function unknownField(keys: readonly string[]): string {
  return `${keys.join(', ')} is not asked for here. Leave it out.`;
}
