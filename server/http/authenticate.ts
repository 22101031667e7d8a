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

/** Reads who asks, with the roles held at this moment, in one statement. */
export function authenticate(database: Database): RequestHandler {
  return async (request, _response, next) => {
    const personId = request.session?.personId;
    if (personId) {
      const row = await database.asActor({ kind: 'person', id: personId }, (trx) => trx
        .select('person.is_registrar', 'person.session_epoch',
          trx.raw(`array(select distinct m.role from membership m
             left join club c on c.id = m.club_id
            where m.person_id = person.id and m.during @> now()
              and (m.club_id is null or c.closed_at is null)) as roles`))
        .from('person').where({ 'person.id': personId }).whereNull('person.closed_at').first());
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
