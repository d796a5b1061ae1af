import { OptimisticLockError } from '@mikro-orm/core';
import type { NextFunction, Request, Response } from 'express';
import multer from 'multer';
import type { Logger } from 'pino';
import type { Problem } from '../../shared/schemas/problem.ts';
import { AppError, stale } from '../errors.ts';

const STATUS_TITLES: Record<number, string> = {
  400: 'The request cannot be read',
  401: 'Not signed in',
  403: 'Not allowed',
  404: 'Not found',
  409: 'In conflict with the present state',
  412: 'Changed by somebody else',
  413: 'Too large',
  415: 'Wrong type of content',
  422: 'Not usable as it is',
  428: 'A tag is required',
  429: 'Too many tries',
  500: 'Something failed here',
  503: 'Not available now',
};

interface BodyParserError extends Error {
  status: number;
  type: string;
}
const isBodyParserError = (error: unknown): error is BodyParserError =>
  error instanceof Error && 'type' in error && 'status' in error;

const UNAVAILABLE = /SQLITE_(FULL|BUSY|IOERR|READONLY|CANTOPEN)|database or disk is full/i;

/** What the caller may know of an error. */
const toAppError = (error: unknown): AppError | null => {
  if (error instanceof AppError) return error;
  if (error instanceof OptimisticLockError) return stale('It');
  if (error instanceof multer.MulterError)
    return error.code === 'LIMIT_FILE_SIZE'
      ? new AppError(413, 'FILE_TOO_LARGE', 'The file is larger than 2 MiB.')
      : new AppError(400, 'bad-upload', 'Send one file in the field named file.');
  if (isBodyParserError(error) && error.status < 500)
    return new AppError(error.status, 'bad-body', 'The body cannot be read as JSON.');
  if (error instanceof Error && UNAVAILABLE.test(error.message))
    return new AppError(
      503,
      'storage-unavailable',
      'The database cannot be written now (disk full or locked). Nothing was changed.',
    );
  return null;
};

export const toProblem = (error: AppError, requestId: string): Problem => ({
  type: 'about:blank',
  title: STATUS_TITLES[error.status] ?? 'It did not work',
  status: error.status,
  detail: error.message,
  code: error.code,
  requestId,
  ...error.extra,
});

export const errorHandler =
  (log: Logger) =>
  (error: unknown, request: Request, response: Response, next: NextFunction): void => {
    if (response.headersSent) {
      next(error);
      return;
    }
    const known = toAppError(error);
    if (!known || known.status >= 500) log.error({ err: error, requestId: request.requestId });
    const shown =
      known ??
      new AppError(500, 'internal', 'Something failed here. The request id helps to find it.');
    if (shown.status === 429 || shown.status === 503) response.setHeader('Retry-After', '10');
    response
      .status(shown.status)
      .type('application/problem+json')
      .send(JSON.stringify(toProblem(shown, request.requestId)));
  };
