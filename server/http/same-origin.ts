import type { RequestHandler } from 'express';
import { AppError } from './app-error.ts';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Refuses unsafe requests that another site could have sent with our cookie: they must carry a header that
 * a foreign form cannot set, and a browser's own word on the origin must not contradict it.
 */
export const sameOrigin: RequestHandler = (request, _response, next) => {
  if (SAFE.has(request.method)) return next();
  const site = request.get('sec-fetch-site');
  const isForeign = site !== undefined && site !== 'same-origin' && site !== 'none';
  if (isForeign || request.get('x-requested-with') !== 'exagium') {
    throw new AppError('foreign-origin', 'Unsafe requests carry the header X-Requested-With: exagium.');
  }
  next();
};
