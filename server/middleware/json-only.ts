/** Bodies are JSON, but for uploads: anything else is refused before it is read, and so is JSON in many layers. */
import type { RequestHandler } from 'express';
import { ProblemError } from '../problem.ts';

export function jsonOnly(): RequestHandler {
  return (request, _response, next) => {
    const length = request.get('content-length');
    const isJson = request.is('application/json') !== false;
    const hasBody =
      request.get('transfer-encoding') !== undefined || (length !== undefined && length !== '0');
    if (hasBody && !(isJson && isUtf8(request.get('content-type'))) && !request.is('multipart/form-data'))
      throw new ProblemError('wrong_content_type', 'The request has to be JSON in UTF-8.');
    if (length === '0' && request.get('content-type')?.startsWith('application/json') === true)
      throw new ProblemError('malformed', 'The request says that it is JSON and carries nothing.');
    next();
  };
}

const isUtf8 = (type = ''): boolean => {
  const charset = /charset\s*=\s*"?([^\s;"]+)/i.exec(type)?.[1];
  return charset === undefined || charset.toLowerCase() === 'utf-8';
};

/** Deeper than any form of ours by far; what walks a body later may then do so by recursion. */
const MOST_LAYERS = 20;

/** Refuses a parsed body that is nested deeper than any of ours. */
export function shallowOnly(): RequestHandler {
  return (request, _response, next) => {
    let layer: unknown[] = [request.body];
    for (let depth = 0; layer.length > 0; depth += 1) {
      if (depth > MOST_LAYERS)
        throw new ProblemError(
          'malformed',
          'The request is nested deeper than anything that is asked for here.',
        );
      layer = layer.flatMap(within);
    }
    next();
  };
}

function within(value: unknown): unknown[] {
  if (typeof value !== 'object' || value === null) return [];
  const values: unknown[] = Object.values(value);
  return values;
}
