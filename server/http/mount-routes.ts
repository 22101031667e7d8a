import type { Express, RequestHandler } from 'express';
import type { z } from 'zod';
import type { FieldProblem } from '#shared/api-problem';
import { InvalidInput, NotAllowed, ProblemError } from '../errors';
import { visitor } from '../db/database';
import { callerOf } from './authenticate';
import type { Access, Route } from './route';

export interface RouteGuards {
  /** Middleware of the rate limit of each kind. */
  readonly limits: Readonly<Record<Route['limit'], RequestHandler>>;
  readonly csrf: RequestHandler;
}

/** Mounts declared routes: limit, role, CSRF, its own middleware, validation, handler. */
export function mountRoutes(app: Express, routes: readonly Route[], guards: RouteGuards): void {
  for (const route of routes) {
    const steps: RequestHandler[] = [guards.limits[route.limit], requireAccess(route.access)];
    if (route.method !== 'get' && !route.withoutCsrf) steps.push(guards.csrf);
    steps.push(...(route.before ?? []), handler(route));
    app[route.method](route.path, ...steps);
  }
}

function requireAccess(access: Access): RequestHandler {
  return (request, _response, next) => {
    if (access.kind === 'public') return next();
    const caller = callerOf(request);
    if (!caller) throw new ProblemError(401, 'not_signed_in');
    if (!access.roles.some((role) => caller.roles.includes(role))) throw new NotAllowed();
    next();
  };
}

function handler(route: Route): RequestHandler {
  return async (request, response) => {
    const person = callerOf(request);
    const answer = await route.handle({
      params: parse(route.params, request.params, ''),
      query: parse(route.query, request.query, ''),
      body: parse(route.body, request.body, ''),
      actor: person ? { kind: 'person', id: person.id } : visitor,
      person,
      request,
      response,
    });
    if (answer.written) return;
    response.status(answer.status).set(answer.headers ?? {});
    if (answer.body === undefined) response.end();
    else response.json(answer.body);
  };
}

function parse(schema: z.ZodType | undefined, value: unknown, prefix: string): unknown {
  if (!schema) return undefined;
  const parsed = schema.safeParse(value ?? {});
  if (parsed.success) return parsed.data;
  throw new InvalidInput(parsed.error.issues.flatMap((issue) => toFieldProblems(issue, prefix)));
}

function toFieldProblems(issue: z.core.$ZodIssue, prefix: string): FieldProblem[] {
  const path = issue.path.map(String);
  const at = (more: readonly string[]): string => prefix + [...path, ...more].join('.');
  switch (issue.code) {
    case 'unrecognized_keys':
      return issue.keys.map((key) => ({ field: at([key]), code: 'unknown_field' }));
    case 'too_small':
      return [{ field: at([]), code: issue.origin === 'string' ? 'too_short' : 'too_small',
        parameters: { minimum: Number(issue.minimum) } }];
    case 'too_big':
      return [{ field: at([]), code: issue.origin === 'string' ? 'too_long' : 'too_big',
        parameters: { maximum: Number(issue.maximum) } }];
    case 'invalid_type':
      return [{ field: at([]), code: issue.input === undefined ? 'required' : 'wrong_type' }];
    case 'invalid_value':
      return [{ field: at([]), code: 'not_one_of' }];
    case 'invalid_format':
    case 'custom':
      return [{ field: at([]), code: codeOf(issue.message) }];
    default:
      return [{ field: at([]), code: 'invalid' }];
  }
}


/** Schemas of ours say what is wrong in a code; what zod itself says is a sentence. */
function codeOf(message: string): string {
  return /^[a-z][a-z_]*$/.test(message) ? message : 'invalid';
}
