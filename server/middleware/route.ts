import type { NextFunction, Request, Response, Router } from 'express';
import type { ZodType, z } from 'zod';
import { mayEver, type Action } from '../../shared/policy.ts';
import type { Person } from '../deps.ts';
import {
  AppError,
  badRequest,
  forbidden,
  tagRequired,
  unauthenticated,
  unprocessable,
} from '../errors.ts';

type Parsed<S> = S extends ZodType ? z.output<S> : undefined;

export interface UploadedFile {
  bytes: Uint8Array;
  fileName: string;
}

export interface Call<P, Q, B> {
  params: Parsed<P>;
  query: Parsed<Q>;
  body: Parsed<B>;
  /** Set unless the route is public. */
  person: Person;
  /** The tag of If-Match, without which a `tagged` route is not entered. */
  ifMatch: string;
  file: UploadedFile | null;
  request: Request;
  response: Response;
}

export interface Answer {
  status?: number;
  body?: unknown;
  etag?: string;
  /** The handler wrote the response itself (files, streams). */
  sent?: true;
}

/** One endpoint: the one place that says its address, rights, input and output; documented and tested from here. */
export interface RouteSpec<
  P extends ZodType | undefined = ZodType | undefined,
  Q extends ZodType | undefined = ZodType | undefined,
  B extends ZodType | undefined = ZodType | undefined,
> {
  method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  path: string;
  summary: string;
  access: 'public' | 'session';
  /** Answered 403 before anything is read when the person may never do it. */
  action?: Action;
  params?: P;
  query?: Q;
  body?: B;
  answer?: ZodType;
  /** The status of success; 200 unless said. */
  status?: number;
  /** Needs If-Match; a function where that depends on the query. */
  tagged?: boolean | ((request: Request) => boolean);
  upload?: boolean;
  handler(call: Call<P, Q, B>): Promise<Answer> | Answer;
}

/** Keeps the types of one route's schemas together. */
export const route = <
  P extends ZodType | undefined = undefined,
  Q extends ZodType | undefined = undefined,
  B extends ZodType | undefined = undefined,
>(
  spec: RouteSpec<P, Q, B>,
): RouteSpec => spec;

const pointer = (path: readonly PropertyKey[]): string =>
  path.map((part) => `/${String(part).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');

const parse = (
  schema: ZodType | undefined,
  value: unknown,
  fail: (errors: { pointer: string; detail: string }[]) => AppError,
): unknown => {
  if (!schema) return undefined;
  const result = schema.safeParse(value);
  if (result.success) return result.data;
  throw fail(
    result.error.issues.map((issue) => ({ pointer: pointer(issue.path), detail: issue.message })),
  );
};

const enter = (spec: RouteSpec, request: Request): Person => {
  const person = request.person;
  if (!person) throw unauthenticated();
  if (spec.action && !mayEver(person, spec.action))
    throw forbidden('Your role does not allow this.');
  return person;
};

const readCall = (spec: RouteSpec, request: Request, response: Response) => {
  // A public route never looks at the person.
  const person = spec.access === 'session' ? enter(spec, request) : (request.person as Person);
  const params = parse(spec.params, request.params, (errors) =>
    badRequest('The address is not well formed.', errors),
  );
  const query = parse(spec.query, request.query, (errors) =>
    badRequest('The query is not well formed.', errors),
  );
  const body = parse(spec.body, request.body ?? {}, (errors) =>
    unprocessable('invalid-body', 'The body does not say what is needed.', errors),
  );
  return { params, query, body, person, ifMatch: request.get('if-match') ?? '', request, response };
};

const needsTag = ({ tagged = false }: RouteSpec, request: Request): boolean =>
  typeof tagged === 'function' ? tagged(request) : tagged;

/** Puts the routes on a router and returns them for the document and the tests. */
export const mount = (
  router: Router,
  specs: RouteSpec[],
  upload: (request: Request, response: Response) => Promise<UploadedFile | null>,
  checkAnswers: boolean,
): void => {
  for (const spec of specs) {
    router[spec.method](
      spec.path,
      async (request: Request, response: Response, _next: NextFunction) => {
        if (spec.access === 'session') enter(spec, request);
        const file = spec.upload ? await upload(request, response) : null;
        const call = readCall(spec, request, response);
        if (needsTag(spec, request) && !call.ifMatch) await missingTag(spec, call, file);
        const answer = await spec.handler({ ...call, file });
        if (answer.sent) return;
        if (answer.etag) response.setHeader('ETag', answer.etag);
        const status = answer.status ?? spec.status ?? 200;
        if (checkAnswers && spec.answer && status < 300) spec.answer.parse(answer.body);
        if (answer.body === undefined) response.status(status === 200 ? 204 : status).end();
        else response.status(status).json(answer.body);
      },
    );
  }
};

/** Rights and existence are judged before the missing tag is: the handler runs with a tag that matches nothing. */
const missingTag = async (spec: RouteSpec, call: object, file: UploadedFile | null) => {
  try {
    await spec.handler({ ...call, ifMatch: '', file } as never);
  } catch (error) {
    if (error instanceof AppError && error.code === 'stale') throw tagRequired();
    throw error;
  }
  throw tagRequired();
};
