/**
 * The last of all: turns whatever was thrown into a problem document (RFC 9457). What is not a refusal of ours is
 * told in general words, with an id that also stands in the log.
 */
import { randomBytes } from 'node:crypto';
import type { ErrorRequestHandler, Response } from 'express';
import type { Logger } from 'pino';
import { PROBLEMS } from '../../shared/problems.ts';
import { databaseProblem } from '../db/database-problem.ts';
import { ProblemError } from '../problem.ts';
import { requestId } from '../security-log.ts';
import { parserProblem } from './parser-problem.ts';

/** An id that can be read out over the telephone: "7F3K-20Q1". */
export function errorId(): string {
  const text = randomBytes(5).toString('hex').toUpperCase();
  return `${text.slice(0, 4)}-${text.slice(4, 8)}`;
}

export function problemHandler(log: Logger): ErrorRequestHandler {
  return (error: unknown, request, response, next) => {
    if (response.headersSent) {
      next(error);
      return;
    }
    const error_id = errorId();
    const known = error instanceof ProblemError ? error : (parserProblem(error) ?? databaseProblem(error));
    const problem = known ?? new ProblemError('failed', ownFault(error_id));
    const line = {
      error_id,
      code: problem.code,
      method: request.method,
      path: request.path,
      request_id: requestId(request),
    };
    if (known === null) log.error({ ...line, err: error }, 'a request failed');
    else log.info(line, 'a request was refused');
    sendProblem(response, problem, error_id);
  };
}

export function sendProblem(response: Response, problem: ProblemError, error_id: string): void {
  const { status, title } = PROBLEMS[problem.code];
  const { errors = [], data = {}, retry_after_s } = problem.extras;
  if (retry_after_s !== undefined) response.setHeader('Retry-After', String(retry_after_s));
  response
    .status(status)
    .type('application/problem+json')
    .send(
      JSON.stringify({
        ...data,
        type: `/problems/${problem.code}`,
        title,
        status,
        detail: problem.message,
        errors,
        error_id,
      }),
    );
}

function ownFault(id: string): string {
  return `Something failed on our side and nothing was posted. Your entries are still here. Quote ${id} if it happens again.`;
}
