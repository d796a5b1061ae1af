import type { Problem, Violation } from '../shared/schemas/problem.ts';

/** What a caller did that cannot be done; becomes RFC 9457 problem details. `code` is stable. */
export class AppError extends Error {
  override name = 'AppError';
  readonly status: number;
  readonly code: string;
  readonly extra: Partial<Problem>;

  constructor(status: number, code: string, detail: string, extra: Partial<Problem> = {}) {
    super(detail);
    this.status = status;
    this.code = code;
    this.extra = extra;
  }
}

export const badRequest = (detail: string, errors?: Problem['errors']) =>
  new AppError(400, 'bad-request', detail, errors ? { errors } : {});
export const unauthenticated = (detail = 'Sign in first.') =>
  new AppError(401, 'unauthenticated', detail);
export const forbidden = (detail: string) => new AppError(403, 'forbidden', detail);
export const notFound = (what: string) =>
  new AppError(404, 'not-found', `${what} does not exist, or is not yours to see.`);
export const conflict = (code: string, detail: string, extra: Partial<Problem> = {}) =>
  new AppError(409, code, detail, extra);
export const stale = (what: string) =>
  new AppError(412, 'stale', `${what} was changed by somebody else since you read it.`);
export const tagRequired = () =>
  new AppError(428, 'tag-required', 'Send the tag you read as If-Match.');
export const unprocessable = (code: string, detail: string, errors?: Problem['errors']) =>
  new AppError(422, code, detail, errors ? { errors } : {});
export const ruleBroken = (violations: Violation[]) =>
  new AppError(
    409,
    'rule-broken',
    violations.length === 1
      ? (violations[0]?.message ?? '')
      : `${violations.length} rules would be broken.`,
    { violations },
  );
