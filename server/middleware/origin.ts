import type { NextFunction, Request, Response } from 'express';
import { forbidden } from '../errors.ts';

const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/** Unsafe requests come from our own pages: Origin equals PUBLIC_URL or the request's own host (OWASP, CSRF). */
export const sameOrigin =
  (publicUrl: string | undefined) =>
  (request: Request, _response: Response, next: NextFunction): void => {
    if (SAFE.has(request.method)) return next();
    const site = request.get('sec-fetch-site');
    if (site && site !== 'same-origin' && site !== 'none')
      throw forbidden('The request comes from another site.');
    const origin = request.get('origin');
    if (origin) {
      const allowed = [publicUrl ? new URL(publicUrl).origin : null];
      allowed.push(`http://${request.get('host')}`, `https://${request.get('host')}`);
      if (!allowed.includes(origin)) throw forbidden('The request comes from another site.');
    }
    next();
  };
