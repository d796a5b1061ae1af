import {
  OpenApiGeneratorV31,
  OpenAPIRegistry,
  type RouteConfig,
} from '@asteasolutions/zod-to-openapi';
import type { ZodObject } from 'zod';
import { Problem } from '../shared/schemas/problem.ts';
import type { RouteSpec } from './middleware/route.ts';

const problem = (description: string) => ({
  description,
  content: { 'application/problem+json': { schema: Problem } },
});

const requestOf = (spec: RouteSpec): RouteConfig['request'] => ({
  ...(spec.params && { params: spec.params as ZodObject }),
  ...(spec.query && { query: spec.query as ZodObject }),
  ...(spec.body && { body: { content: { 'application/json': { schema: spec.body } } } }),
});

const responsesOf = (spec: RouteSpec): RouteConfig['responses'] => ({
  [String(spec.status ?? (spec.answer ? 200 : 204))]: spec.answer
    ? { description: 'Done', content: { 'application/json': { schema: spec.answer } } }
    : { description: 'Done' },
  400: problem('The request cannot be read'),
  ...(spec.access === 'session' && { 401: problem('Not signed in'), 403: problem('Not allowed') }),
  ...(spec.params && { 404: problem('Not found') }),
  ...(spec.tagged && { 412: problem('Stale tag'), 428: problem('If-Match is missing') }),
  ...(spec.body && { 422: problem('Not usable as it is') }),
});

/** The document of the API, made from the same routes and schemas that answer. */
export const openApiDocument = (specs: readonly RouteSpec[]) => {
  const registry = new OpenAPIRegistry();
  for (const spec of specs)
    registry.registerPath({
      method: spec.method,
      path: `/api${spec.path.replace(/:(\w+)/g, '{$1}')}`,
      summary: spec.summary,
      request: requestOf(spec) ?? {},
      responses: responsesOf(spec),
    });
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: { title: 'Skysheaf', version: '1' },
  });
};
