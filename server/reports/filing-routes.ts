import type { Database } from '../db/database';
import { created, ok, requireRole, route, signedIn, type Route } from '../http/route';
import { z } from '../http/openapi-zod';
import type { FilingService } from './filing-service';
import { changeRequest, filedReport, fileRequest, myReportContent,
  withdrawalRequest } from './report-content-schemas';
import { myReports, reportView } from './report-schemas';
import { numberParams } from './reports-routes';
import type { ReportsService } from './reports-service';

const pageQuery = z.strictObject({
  after: z.string().max(300).optional(),
  limit: z.coerce.number().int().min(1).max(50).default(24),
});

/** What a reporter does: file, look after what was filed, change it, take it back. */
export function filingRoutes(
  database: Database, filing: FilingService, reports: ReportsService,
): Route[] {
  const member = requireRole('member');
  // Who left their club still looks after what they filed there.
  const anyone = requireRole('subscriber');
  return [
    route({
      method: 'post', path: '/api/reports', operationId: 'fileReport', limit: 'heavy',
      summary: 'File a report; safe to repeat with the same id', access: member,
      body: fileRequest, answers: { 200: filedReport, 201: filedReport }, refusals: [409],
      handle: async (call) => {
        const { isNew, ...report } = await database.asActor(call.actor, (trx) =>
          filing.file(trx, signedIn(call).id, call.body.id, call.body.content));
        return isNew ? created(`/api/my/reports/${report.number}`, report) : ok(report);
      },
    }),
    route({
      method: 'get', path: '/api/my/reports', operationId: 'listMyReports', limit: 'read',
      summary: 'One\'s own reports, the last filed first', access: anyone, query: pageQuery,
      answers: { 200: myReports },
      handle: async (call) => ok(await database.asActor(call.actor, (trx) => reports.listMine(
        trx, signedIn(call).id, call.query.limit, call.query.after))),
    }),
    route({
      method: 'get', path: '/api/my/reports/:number', operationId: 'getMyReport', limit: 'read',
      summary: 'The newest version of one\'s own report', access: anyone, params: numberParams,
      answers: { 200: reportView }, refusals: [404],
      handle: async ({ actor, params }) => ok(await database.asActor(actor,
        (trx) => reports.viewMine(trx, params.number))),
    }),
    route({
      method: 'get', path: '/api/my/reports/:number/content', operationId: 'getMyReportContent',
      summary: 'What was filed, as the form takes it', access: anyone, limit: 'read',
      params: numberParams, answers: { 200: myReportContent }, refusals: [404],
      handle: async (call) => ok(await database.asActor(call.actor, (trx) =>
        reports.contentOfMine(trx, signedIn(call).id, call.params.number))),
    }),
    route({
      method: 'put', path: '/api/my/reports/:number/content', operationId: 'changeMyReport',
      summary: 'File a returned report again with its changes', access: member, limit: 'heavy',
      params: numberParams, body: changeRequest, answers: { 200: filedReport },
      refusals: [404, 409],
      handle: async (call) => ok(await database.asActor(call.actor, (trx) => filing.change(trx,
        signedIn(call).id, call.params.number, call.body.rowVersion, call.body.content))),
    }),
    route({
      method: 'post', path: '/api/my/reports/:number/withdrawal', limit: 'write',
      operationId: 'withdrawMyReport', summary: 'Take back a report that is not decided',
      access: anyone, params: numberParams, body: withdrawalRequest,
      answers: { 200: filedReport }, refusals: [404, 409],
      handle: async (call) => ok(await database.asActor(call.actor, (trx) => filing.withdraw(trx,
        signedIn(call).id, call.params.number, call.body.rowVersion))),
    }),
  ];
}
