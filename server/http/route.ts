import type { Request, RequestHandler, Response } from 'express';
import type { z } from 'zod';
import type { Role } from '#shared/access/audience';
import type { Actor } from '../db/database';

/** Who may call a route. There is no default: every route says it. */
export type Access =
  | { readonly kind: 'public' }
  | { readonly kind: 'roles'; readonly roles: readonly Role[] };

export const publicRoute: Access = { kind: 'public' };

/** Anyone who holds one of the roles, in any club; `subscriber` is anyone signed in. */
export function requireRole(...roles: readonly [Role, ...Role[]]): Access {
  return { kind: 'roles', roles };
}

export interface SignedIn {
  readonly id: string;
  readonly roles: readonly Role[];
}

/** What a handler is given: input already checked, and who asks. */
export interface Call<Params, Query, Body> {
  readonly params: Params;
  readonly query: Query;
  readonly body: Body;
  readonly actor: Actor;
  /** Undefined for a visitor. On routes with `requireRole` it is always there. */
  readonly person: SignedIn | undefined;
  readonly request: Request;
  readonly response: Response;
}

/** What a handler answers; `undefined` as body sends none. */
export interface Answer {
  readonly status: number;
  readonly body?: unknown;
  readonly headers?: Readonly<Record<string, string>>;
  /** True where the handler wrote the response itself (files, streams). */
  readonly written?: true;
}

/** `heavy`: uploads and filing; `credentials`: sign-in, resets, links. */
export type RateLimit = 'read' | 'write' | 'heavy' | 'credentials';

export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

export interface Route {
  readonly method: Method;
  /** As Express writes it: `/api/reports/:number`. */
  readonly path: string;
  readonly operationId: string;
  readonly summary: string;
  readonly access: Access;
  readonly limit: RateLimit;
  readonly params?: z.ZodObject;
  readonly query?: z.ZodObject;
  readonly body?: z.ZodType;
  /** Media type of the body where it is not JSON; such a route reads the body itself. */
  readonly bodyType?: 'multipart/form-data' | 'application/x-www-form-urlencoded';
  /** Successful answers by status; null where there is no body. Strict objects only. */
  readonly answers: Readonly<Record<number, z.ZodType | null>>;
  /** Media type of a successful answer that is not JSON. */
  readonly answerType?: string;
  /** Statuses of problem details it may answer besides 400, 401, 403, 422, 429. */
  readonly refusals?: readonly number[];
  /** For callers without a cookie, such as one-click unsubscription. */
  readonly withoutCsrf?: true;
  /** Express middleware before validation, such as the reader of an upload. */
  readonly before?: readonly RequestHandler[];
  readonly handle: (call: Call<unknown, unknown, unknown>) => Promise<Answer>;
}

type Output<Schema> = Schema extends z.ZodType ? z.output<Schema> : undefined;

/** Declares a route; the handler's input has the types of its schemas. */
export function route<
  Params extends z.ZodObject | undefined = undefined,
  Query extends z.ZodObject | undefined = undefined,
  Body extends z.ZodType | undefined = undefined,
>(definition: Omit<Route, 'params' | 'query' | 'body' | 'handle'> & {
  readonly params?: Params;
  readonly query?: Query;
  readonly body?: Body;
  readonly handle: (call: Call<Output<Params>, Output<Query>, Output<Body>>) => Promise<Answer>;
}): Route {
  // The mounted route hands its handler nothing but what its own schemas parsed.
  return definition as Route;
}

export const ok = (body: unknown): Answer => ({ status: 200, body });
export const created = (location: string, body: unknown): Answer =>
  ({ status: 201, body, headers: { Location: location } });
export const accepted = (): Answer => ({ status: 202 });
export const noContent = (): Answer => ({ status: 204 });

/** The person on a route that requires a role. */
export function signedIn(call: Pick<Call<unknown, unknown, unknown>, 'person'>): SignedIn {
  if (!call.person) throw new Error('signedIn() is for routes that require a role');
  return call.person;
}
