import type { Request, RequestHandler } from 'express';
import type { Role } from '#shared/access/audience';
import type { Database } from '../db/database';
import type { SignedIn } from './route';

declare module 'express-session' {
  interface SessionData {
    /** Set at sign-in only: a mere visitor has no session row. */
    personId: string;
    /** The person's epoch at sign-in; signing out everywhere raises it. */
    epoch: number;
  }
}

const callers = new WeakMap<Request, SignedIn>();

/** The person signed in, or undefined for a visitor. */
export function callerOf(request: Request): SignedIn | undefined {
  return callers.get(request);
}

/** Reads who asks, with the roles held at this moment. */
export function authenticate(database: Database): RequestHandler {
  return async (request, _response, next) => {
    const personId = request.session?.personId;
    if (personId) {
      const row = await database.findSignedIn(personId);
      if (row && row.session_epoch === request.session.epoch) {
        callers.set(request, { id: personId, roles: rolesOf(row.roles, row.is_registrar) });
      }
    }
    next();
  };
}

/** Anyone signed in counts as a subscriber; a member can do what a subscriber can. */
function rolesOf(held: readonly Role[], isRegistrar: boolean): readonly Role[] {
  return [...new Set<Role>(['subscriber', ...held,
    ...(isRegistrar ? ['registrar' as const] : [])])];
}
