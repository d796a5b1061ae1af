import { randomUUID } from 'node:crypto';
import type { NextFunction, Request, Response } from 'express';
import type { Person } from '../deps.ts';

declare module 'express-serve-static-core' {
  interface Request {
    requestId: string;
    person?: Person;
    sessionExpiresMs?: number;
  }
}

export const requestId = (request: Request, response: Response, next: NextFunction): void => {
  request.requestId = randomUUID();
  response.setHeader('X-Request-Id', request.requestId);
  next();
};
