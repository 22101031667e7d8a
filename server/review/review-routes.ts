import type { Database } from '../db/database';
import { noContent, ok, requireRole, route, signedIn, type Route } from '../http/route';
import { conflictRequest, decisionRequest, leaseView, numberParams, queueAnswer, queueQuery,
  reviewView } from './review-schemas';
import type { ReviewService } from './review-service';

const moderators = requireRole('moderator');

export function reviewRoutes(database: Database, service: ReviewService): Route[] {
  return [
    route({
      method: 'get', path: '/api/review/queue', operationId: 'listReviewQueue', limit: 'read',
      summary: 'Reports that wait for a decision, the oldest first', access: moderators,
      query: queueQuery, answers: { 200: queueAnswer },
      handle: async ({ actor, query }) =>
        ok(await database.asActor(actor, (trx) => service.queue(trx, query))),
    }),
    route({
      method: 'get', path: '/api/review/reports/:number', operationId: 'getReview',
      summary: 'A report with all its evidence', access: moderators, limit: 'read',
      params: numberParams, answers: { 200: reviewView }, refusals: [404],
      handle: async (call) => ok(await database.asActor(call.actor,
        (trx) => service.view(trx, signedIn(call), call.params.number))),
    }),
    route({
      method: 'post', path: '/api/review/reports/:number/lease', operationId: 'takeReviewLease',
      summary: 'Claim a report for a quarter of an hour, or extend', access: moderators,
      limit: 'write', params: numberParams, answers: { 200: leaseView }, refusals: [404, 409],
      handle: async (call) => ok(await database.asActor(call.actor,
        (trx) => service.takeLease(trx, signedIn(call), call.params.number))),
    }),
    route({
      method: 'delete', path: '/api/review/reports/:number/lease', limit: 'write',
      operationId: 'dropReviewLease', summary: 'Let go of a report', access: moderators,
      params: numberParams, answers: { 204: null }, refusals: [404],
      handle: async ({ actor, params }) => {
        await database.asActor(actor, (trx) => service.dropLease(trx, params.number));
        return noContent();
      },
    }),
    route({
      method: 'post', path: '/api/review/reports/:number/decisions', limit: 'write',
      operationId: 'decide', summary: 'Decide on the version looked at, with a reason',
      access: moderators, params: numberParams, body: decisionRequest,
      answers: { 200: reviewView }, refusals: [404, 409],
      handle: async (call) => ok(await database.asActor(call.actor, async (trx) => {
        await service.decide(trx, signedIn(call), call.params.number, call.body);
        return service.view(trx, signedIn(call), call.params.number);
      })),
    }),
    route({
      method: 'post', path: '/api/review/reports/:number/conflict', limit: 'write',
      operationId: 'declareConflict', summary: 'Declare a conflict of interest',
      access: moderators, params: numberParams, body: conflictRequest, answers: { 204: null },
      refusals: [404],
      handle: async (call) => {
        await database.asActor(call.actor, (trx) => service.declareConflict(trx,
          signedIn(call), call.params.number, call.body.note));
        return noContent();
      },
    }),
  ];
}
