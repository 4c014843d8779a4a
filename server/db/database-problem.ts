/**
 * What PostgreSQL refuses, in words that a keeper understands. The rules of the book have states of their own
 * (GW001 and on, see the migrations); a lost or full database is "for now not possible", never our own fault.
 */
import { BaseError, ConnectionError, ConnectionAcquireTimeoutError } from 'sequelize';
import { z } from '../../shared/schemas/zod.ts';
import { ProblemError } from '../problem.ts';

const databaseFault = z.object({
  code: z.string(),
  constraint: z.string().nullish(),
  detail: z.string().nullish(),
});

/** The problem for an error that came from the database, or null where it is none that a user can act on. */
export function databaseProblem(error: unknown): ProblemError | null {
  if (error instanceof ConnectionError || error instanceof ConnectionAcquireTimeoutError || isLost(error))
    return unavailable();
  if (!(error instanceof BaseError)) return null;
  const read = databaseFault.safeParse('original' in error ? error.original : null);
  if (!read.success) return null;
  const { code, constraint, detail } = read.data;
  if (/^(08|53|57P|58)/.test(code) || ['ECONNREFUSED', 'ECONNRESET', 'EPIPE'].includes(code))
    return unavailable();
  if (code === '40001' || code === '40P01' || code === '55P03' || code === '57014') return busy();
  if (constraint === 'place_never_below_nothing' || constraint === 'place_fine_within_gross') {
    return new ProblemError(
      'not_enough',
      'There is not enough of that metal there. Look at what is left, and weigh again.',
    );
  }
  return ruleProblem(code, detail ?? null);
}

/** What the driver says of a connection that broke under a statement; it gives no code then. */
const LOST = /^connection terminated|connection error and is not queryable|^read ECONNRESET|^write EPIPE/i;

const isLost = (error: unknown): boolean => error instanceof Error && LOST.test(error.message);

function ruleProblem(code: string, detail: string | null): ProblemError | null {
  switch (code) {
    case 'GW003': {
      const { earliest } = z.object({ earliest: z.string().nullable() }).parse(JSON.parse(detail ?? '{}'));
      const when = earliest === null ? 'today' : earliest;
      return new ProblemError(
        'below_on_day',
        `On that day the metal was not there any more by closing time. ${when} is the earliest date that will do.`,
      );
    }
    case 'GW006':
      return new ProblemError(
        'conflict',
        'The place still holds metal. Move it first, then close the place.',
      );
    case 'GW008':
      return new ProblemError(
        'closed_period',
        'That day is in a closed period. Enter it with today’s date, or have the period opened by two people.',
      );
    case '23503':
      return new ProblemError(
        'not_found',
        'Something that this names is not in the book. Choose it from the list again.',
      );
    case '23505':
      return new ProblemError('conflict', 'There is one of that name or number already. Choose another.');
    default:
      return null;
  }
}

/** The book can't be reached for now. */
export function unavailable(): ProblemError {
  const sentence =
    'The book can’t be reached for the moment. Nothing was posted; try again in a few seconds.';
  return new ProblemError('unavailable', sentence, { retry_after_s: 5 });
}

function busy(): ProblemError {
  return new ProblemError('unavailable', 'The book is busy. Nothing was posted; try again.', {
    retry_after_s: 1,
  });
}
