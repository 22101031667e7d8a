import { OpenAPIRegistry, OpenApiGeneratorV31, type ResponseConfig,
  type RouteConfig } from '@asteasolutions/zod-to-openapi';
import { problemCodes } from '#shared/api-problem';
import { z } from './openapi-zod';
import { publicRoute, route, type Route } from './route';

const fieldProblem = z.strictObject({
  field: z.string(),
  code: z.string(),
  parameters: z.record(z.string(), z.union([z.string(), z.number()])).optional(),
}).openapi('FieldProblem');

const problem = z.strictObject({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  code: z.enum(problemCodes),
  parameters: z.record(z.string(), z.union([z.string(), z.number()])).optional(),
  fields: z.array(fieldProblem).optional(),
  requestId: z.string().optional(),
}).openapi('Problem');

/** The interface document, made from the very schemas that validate. */
export function openApiDocument(routes: readonly Route[], baseUrl: string): object {
  const registry = new OpenAPIRegistry();
  registry.registerComponent('securitySchemes', 'session', {
    type: 'apiKey', in: 'cookie', name: 'touchneedle.session',
    description: 'Signed-in session. Writes also send the XSRF-TOKEN cookie as X-XSRF-TOKEN.',
  });
  for (const each of routes) registry.registerPath(pathOf(each));
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: { title: 'Touchneedle', version: '1',
      description: 'Counterfeit-report registry shared among coin clubs.' },
    servers: [{ url: baseUrl }],
  });
}

function pathOf(each: Route): RouteConfig {
  return {
    method: each.method,
    path: each.path.replace(/:(\w+)/g, '{$1}'),
    operationId: each.operationId,
    summary: each.summary,
    security: each.access.kind === 'public' ? [] : [{ session: [] }],
    ...(each.access.kind === 'roles' ? { 'x-roles': each.access.roles } : {}),
    request: {
      ...(each.params ? { params: each.params } : {}),
      ...(each.query ? { query: each.query } : {}),
      ...(each.body ? { body: { required: true,
        content: { [each.bodyType ?? 'application/json']: { schema: each.body } } } } : {}),
    },
    responses: responsesOf(each),
  };
}

function responsesOf(each: Route): Record<string, ResponseConfig> {
  const responses: Record<string, ResponseConfig> = {};
  for (const [status, schema] of Object.entries(each.answers)) {
    responses[status] = { description: `Answer ${status}`,
      ...(schema ? { content: { [each.answerType ?? 'application/json']: { schema } } } : {}) };
  }
  const refusals = new Set([400, 422, 429, 500, 503, ...(each.refusals ?? []),
    ...(each.access.kind === 'roles' ? [401, 403] : []),
    ...(each.method === 'get' ? [] : [403])]);
  for (const status of refusals) {
    responses[String(status)] = { description: `Refusal ${status}`,
      content: { 'application/problem+json': { schema: problem } } };
  }
  return responses;
}

/** Serves the document. Made once, since the routes do not change while the server runs. */
export function openApiRoute(document: () => object): Route {
  let made: object | undefined;
  return route({
    method: 'get', path: '/api/openapi.json', operationId: 'getInterfaceDocument',
    summary: 'This document', access: publicRoute, limit: 'read',
    answers: { 200: z.looseObject({ openapi: z.string() }) },
    handle: async () => ({ status: 200, body: (made ??= document()) }),
  });
}
