/** Bodies are JSON, but for uploads: anything else is refused before it is read. */
import type { RequestHandler } from 'express';
import { ProblemError } from '../problem.ts';

export function jsonOnly(): RequestHandler {
  return (request, _response, next) => {
    const length = request.get('content-length');
    const hasBody =
      request.get('transfer-encoding') !== undefined || (length !== undefined && length !== '0');
    if (hasBody && !request.is('application/json') && !request.is('multipart/form-data')) {
      throw new ProblemError('wrong_content_type', 'The request has to be JSON.');
    }
    next();
  };
}
