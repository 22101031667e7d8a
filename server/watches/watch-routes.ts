import express from 'express';
import type { Config } from '../config';
import { system, type Database, type Transaction } from '../db/database';
import { NotFound } from '../errors';
import { noContent, ok, publicRoute, requireRole, route, signedIn,
  type Route } from '../http/route';
import { readUnsubscribeToken } from './unsubscribe-token';
import { oneClickBody, unsubscribeParams, unsubscribeView, watchList, watchParams, watchPreview,
  watchPreviewRequest, watchSave, watchView } from './watch-schemas';
import type { WatchService } from './watch-service';

const subscribers = requireRole('subscriber');

export function watchRoutes(database: Database, service: WatchService, config: Config): Route[] {
  return [
    route({
      method: 'get', path: '/api/watches', operationId: 'listWatches', limit: 'read',
      summary: 'Own watches', access: subscribers, answers: { 200: watchList },
      handle: async (call) => ok({ items: await database.asActor(call.actor,
        (trx) => service.list(trx, signedIn(call).id)) }),
    }),
    route({
      method: 'put', path: '/api/watches/:id', operationId: 'saveWatch', limit: 'write',
      summary: 'Add or change a watch; safe to repeat', access: subscribers,
      params: watchParams, body: watchSave, answers: { 200: watchView }, refusals: [404, 409],
      handle: async (call) => ok(await database.asActor(call.actor,
        (trx) => service.save(trx, signedIn(call).id, call.params.id, call.body))),
    }),
    route({
      method: 'delete', path: '/api/watches/:id', operationId: 'removeWatch', limit: 'write',
      summary: 'Remove a watch; saving it again brings it back', access: subscribers,
      params: watchParams, answers: { 204: null }, refusals: [404],
      handle: async (call) => {
        await database.asActor(call.actor,
          (trx) => service.remove(trx, signedIn(call).id, call.params.id));
        return noContent();
      },
    }),
    route({
      method: 'post', path: '/api/watches/preview', operationId: 'previewWatch', limit: 'read',
      summary: 'How many published reports fit a filter now', access: subscribers,
      body: watchPreviewRequest, answers: { 200: watchPreview },
      handle: async ({ actor, body }) =>
        ok(await database.asActor(actor, (trx) => service.preview(trx, body.filter))),
    }),
    route({
      method: 'get', path: '/api/unsubscribe/:token', operationId: 'describeUnsubscribe',
      summary: 'What the link of a mail would stop; stops nothing', access: publicRoute,
      limit: 'credentials', params: unsubscribeParams, answers: { 200: unsubscribeView },
      refusals: [404],
      handle: async ({ params }) => ok(await asOwner(params.token,
        (trx, personId) => service.describeAll(trx, personId))),
    }),
    route({
      method: 'post', path: '/api/unsubscribe/:token', operationId: 'unsubscribe',
      summary: 'Stop every digest of the person the link names', access: publicRoute,
      limit: 'credentials', params: unsubscribeParams, answers: { 200: unsubscribeView },
      refusals: [404],
      handle: async ({ params }) => ok(await asOwner(params.token, async (trx, personId) => {
        await service.pauseAll(trx, personId);
        return service.describeAll(trx, personId);
      })),
    }),
    route({
      method: 'post', path: '/unsubscribe/:token', operationId: 'unsubscribeOneClick',
      summary: 'One-click unsubscription of mail readers (RFC 8058)', access: publicRoute,
      limit: 'read', params: unsubscribeParams, body: oneClickBody, withoutCsrf: true,
      bodyType: 'application/x-www-form-urlencoded',
      before: [express.urlencoded({ extended: false, limit: '1kb' })],
      answers: { 200: null }, refusals: [404],
      handle: async ({ params }) => {
        await asOwner(params.token, (trx, personId) => service.pauseAll(trx, personId));
        return { status: 200 };
      },
    }),
  ];

  function asOwner<Result>(
    token: string, work: (trx: Transaction, personId: string) => Promise<Result>,
  ): Promise<Result> {
    const personId = readUnsubscribeToken(token, config.mailTokenKey);
    if (!personId) throw new NotFound();
    return database.asActor(system, (trx) => work(trx, personId));
  }
}
