import type { Problem, Violation } from '../../shared/schemas/problem.ts';

/** Every failed call of the API, by its stable code. `status` 0: the server could not be reached. */
export class ApiError extends Error {
  readonly status: number;
  readonly code: string;
  readonly requestId: string | null;
  readonly violations: readonly Violation[];
  readonly fieldErrors: NonNullable<Problem['errors']>;

  constructor(problem: Problem) {
    super(problem.detail || problem.title);
    this.name = 'ApiError';
    this.status = problem.status;
    this.code = problem.code;
    this.requestId = problem.requestId ?? null;
    this.violations = problem.violations ?? [];
    this.fieldErrors = problem.errors ?? [];
  }
}

const own = (status: number, code: string, detail: string, requestId?: string): ApiError =>
  new ApiError({ type: 'about:blank', title: detail, status, detail, code, requestId });

export const unreachable = (): ApiError =>
  own(0, 'unreachable', 'The server does not answer. Check the connection, then try again.');

export const unexpectedAnswer = (status: number, requestId?: string): ApiError =>
  own(
    status,
    'unexpected-answer',
    'The server answered in a form that this page does not know. Reload the page.',
    requestId,
  );

export const isStale = (error: unknown): boolean =>
  error instanceof ApiError && error.status === 412;
export const isForbidden = (error: unknown): boolean =>
  error instanceof ApiError && error.status === 403;
export const isNotFound = (error: unknown): boolean =>
  error instanceof ApiError && error.status === 404;
/** What to say of any error. */
export const wordsOf = (error: unknown): string =>
  error instanceof Error ? error.message : 'Something failed that has no name.';
