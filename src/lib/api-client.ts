import type { z } from 'zod';
import { Problem } from '../../shared/schemas/problem.ts';
import { ApiError, unexpectedAnswer, unreachable } from './api-error.ts';

/** The only file that fetches. Every answer is read by its shared schema; every failure is an `ApiError`. */

type QueryValue = string | number | boolean | null | undefined;
export type Query = Readonly<Record<string, QueryValue>>;

interface Call {
  method?: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
  query?: Query;
  body?: unknown;
  form?: FormData;
  /** The tag of what is changed, `"<id>-v<version>"`. */
  ifMatch?: string;
  signal?: AbortSignal;
}

export const urlOf = (path: string, query: Query = {}): string => {
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query))
    if (value !== undefined && value !== null && value !== '') search.set(name, String(value));
  return search.size > 0 ? `${path}?${search.toString()}` : path;
};

/** Strong tag of anything that carries `id` and `version`. */
export const tagOf = (thing: { id: string; version: number }): string =>
  `"${thing.id}-v${thing.version}"`;

async function send(path: string, call: Call): Promise<Response> {
  const headers: Record<string, string> = { Accept: 'application/json' };
  if (call.body !== undefined) headers['Content-Type'] = 'application/json';
  if (call.ifMatch) headers['If-Match'] = call.ifMatch;
  try {
    return await fetch(urlOf(path, call.query), {
      method: call.method ?? 'GET',
      headers,
      body: call.form ?? (call.body === undefined ? undefined : JSON.stringify(call.body)),
      signal: call.signal,
      credentials: 'same-origin',
    });
  } catch (error) {
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw unreachable();
  }
}

const onLost = new Set<() => void>();
/** Told when the server no longer knows the session (401). */
export const whenSessionLost = (listener: () => void): (() => void) => {
  onLost.add(listener);
  return () => onLost.delete(listener);
};

async function failure(response: Response): Promise<ApiError> {
  const requestId = response.headers.get('x-request-id') ?? undefined;
  const problem = Problem.safeParse(await response.json().catch(() => null));
  if (!problem.success) return unexpectedAnswer(response.status, requestId);
  if (response.status === 401 && problem.data.code !== 'wrong-credentials')
    for (const listener of onLost) listener();
  return new ApiError({ requestId, ...problem.data });
}

/** Calls the API and reads the answer by its schema. */
export async function callApi<T extends z.ZodType>(
  path: string,
  answer: T,
  call: Call = {},
): Promise<z.output<T>> {
  const response = await send(path, call);
  if (!response.ok) throw await failure(response);
  const json: unknown = await response.json().catch(() => undefined);
  const parsed = answer.safeParse(json);
  if (parsed.success) return parsed.data;
  if (import.meta.env.DEV) console.error(path, parsed.error.issues);
  throw unexpectedAnswer(response.status, response.headers.get('x-request-id') ?? undefined);
}

/** Calls the API where the answer has no body that matters. */
export async function callApiForNothing(path: string, call: Call): Promise<void> {
  const response = await send(path, call);
  if (!response.ok) throw await failure(response);
}

const MOST_PAGES = 20;

/** All pages of a list, for the short lists that name things (fleet, missions, channels, the passes of a day). */
export async function callApiForAll<T>(
  path: string,
  page: z.ZodType<{ items: T[]; nextCursor: string | null }>,
  call: Call = {},
): Promise<T[]> {
  const items: T[] = [];
  let cursor: string | null = null;
  for (let turn = 0; turn < MOST_PAGES; turn++) {
    const query: Query = { limit: 500, ...call.query, cursor };
    const answer: { items: T[]; nextCursor: string | null } = await callApi(path, page, {
      ...call,
      query,
    });
    items.push(...answer.items);
    cursor = answer.nextCursor;
    if (cursor === null) break;
  }
  return items;
}
