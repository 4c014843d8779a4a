/**
 * Writes come from our own pages only: they carry a header that another site's form can't send, and an Origin, where
 * the browser names one, that is ours (OWASP ASVS 5.0, 3.5).
 */
import type { RequestHandler } from 'express';
import { ProblemError } from '../problem.ts';

const READS = new Set(['GET', 'HEAD', 'OPTIONS']);

export function sameSiteOnly(publicUrl: () => string): RequestHandler {
  return (request, _response, next) => {
    if (READS.has(request.method)) {
      next();
      return;
    }
    const origin = request.get('origin');
    const ours =
      origin === undefined ||
      origin === publicUrl() ||
      origin === `${request.protocol}://${request.get('host')}`;
    if (!ours || request.get('x-grainward') !== '1') {
      throw new ProblemError(
        'cross_site',
        'This was sent from another site, so nothing was done. Open Grainward itself.',
      );
    }
    next();
  };
}
