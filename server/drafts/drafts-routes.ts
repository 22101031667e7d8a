import type { Database } from '../db/database';
import { noContent, ok, requireRole, route, signedIn, type Route } from '../http/route';
import { z } from '../http/openapi-zod';
import { draftSave, draftView } from '../reports/report-content-schemas';
import type { DraftsService } from './drafts-service';

const draftParams = z.object({ id: z.uuid() });
const draftList = z.strictObject({ items: z.array(draftView), next: z.string().nullable() });

export function draftsRoutes(database: Database, service: DraftsService): Route[] {
  const member = requireRole('member');
  return [
    route({
      method: 'get', path: '/api/drafts', operationId: 'listDrafts', limit: 'read',
      summary: 'One\'s own drafts, the last changed first', access: member,
      answers: { 200: draftList },
      handle: async (call) => ok(await database.asActor(call.actor,
        (trx) => service.list(trx, signedIn(call).id))),
    }),
    route({
      method: 'get', path: '/api/drafts/:id', operationId: 'getDraft', limit: 'read',
      summary: 'A draft of one\'s own', access: member, params: draftParams,
      answers: { 200: draftView }, refusals: [404],
      handle: async (call) => ok(await database.asActor(call.actor,
        (trx) => service.view(trx, signedIn(call).id, call.params.id))),
    }),
    route({
      method: 'put', path: '/api/drafts/:id', operationId: 'saveDraft', limit: 'write',
      summary: 'Save a draft; 409 with the stored revision where it has moved on',
      access: member, params: draftParams, body: draftSave, answers: { 200: draftView },
      refusals: [409],
      handle: async (call) => ok(await database.asActor(call.actor,
        (trx) => service.save(trx, signedIn(call).id, call.params.id, call.body))),
    }),
    route({
      method: 'delete', path: '/api/drafts/:id', operationId: 'removeDraft', limit: 'write',
      summary: 'Remove a draft; one that is not there is no error', access: member,
      params: draftParams, answers: { 204: null },
      handle: async (call) => {
        await database.asActor(call.actor,
          (trx) => service.remove(trx, signedIn(call).id, call.params.id));
        return noContent();
      },
    }),
  ];
}
