import type { Database } from '../db/database';
import { created, noContent, ok, requireRole, route, signedIn, type Route } from '../http/route';
import { clubChange, clubList, clubParams, clubView, invitationParams, invitationRequest,
  memberParams, newClub, rolesRequest } from './clubs-schemas';
import type { ClubsService } from './clubs-service';

/** Routes that manage a club: the service asks whether it is the caller's own. */
const managers = requireRole('secretary', 'registrar');

export function clubsRoutes(database: Database, service: ClubsService): Route[] {
  return [
    route({
      method: 'get', path: '/api/clubs', operationId: 'listClubs', limit: 'read',
      summary: 'Clubs of the registry', access: requireRole('subscriber'),
      answers: { 200: clubList },
      handle: async ({ actor }) =>
        ok({ items: await database.asActor(actor, (trx) => service.list(trx)) }),
    }),
    route({
      method: 'post', path: '/api/clubs', operationId: 'addClub', limit: 'write',
      summary: 'Add a club and invite its secretary', access: requireRole('registrar'),
      body: newClub, answers: { 201: clubView },
      handle: async (call) => {
        const club = await database.asActor(call.actor,
          (trx) => service.add(trx, signedIn(call), call.body));
        return created(`/api/clubs/${club.slug}`, club);
      },
    }),
    route({
      method: 'get', path: '/api/clubs/:slug', operationId: 'getClub', limit: 'read',
      summary: 'A club; members and invitations for those who run it',
      access: requireRole('subscriber'), params: clubParams, answers: { 200: clubView },
      refusals: [404],
      handle: async ({ actor, params }) =>
        ok(await database.asActor(actor, (trx) => service.view(trx, params.slug))),
    }),
    route({
      method: 'patch', path: '/api/clubs/:slug', operationId: 'changeClub', limit: 'write',
      summary: 'Change name, address or time zone of a club', access: managers,
      params: clubParams, body: clubChange, answers: { 200: clubView }, refusals: [404],
      handle: async (call) => ok(await database.asActor(call.actor, (trx) =>
        service.change(trx, signedIn(call), call.params.slug, call.body))),
    }),
    route({
      method: 'post', path: '/api/clubs/:slug/invitations', operationId: 'invite',
      summary: 'Invite somebody by mail', access: managers, limit: 'write', params: clubParams,
      body: invitationRequest, answers: { 201: clubView }, refusals: [404],
      handle: async (call) => {
        const club = await database.asActor(call.actor, (trx) => service.invite(trx,
          signedIn(call), call.params.slug, call.body.email, call.body.roles));
        return created(`/api/clubs/${club.slug}`, club);
      },
    }),
    route({
      method: 'delete', path: '/api/clubs/:slug/invitations/:id', limit: 'write',
      operationId: 'withdrawInvitation', summary: 'Withdraw an invitation', access: managers,
      params: invitationParams, answers: { 204: null }, refusals: [404],
      handle: async (call) => {
        await database.asActor(call.actor, (trx) => service.withdrawInvitation(trx,
          signedIn(call), call.params.slug, call.params.id));
        return noContent();
      },
    }),
    route({
      method: 'put', path: '/api/clubs/:slug/members/:personId/roles', limit: 'write',
      operationId: 'setRoles', summary: 'Set the roles of a member; an empty list ends them',
      access: managers, params: memberParams, body: rolesRequest, answers: { 200: clubView },
      refusals: [404, 409],
      handle: async (call) => ok(await database.asActor(call.actor, (trx) => service.setRoles(trx,
        signedIn(call), call.params.slug, call.params.personId, call.body.roles))),
    }),
  ];
}
