import type { NoticeView } from '#shared/accounts/session';
import type { Database, Transaction } from '../db/database';
import { NotFound } from '../errors';
import { z } from '../http/openapi-zod';
import { noContent, ok, requireRole, route, signedIn, type Route } from '../http/route';

export interface Notice {
  readonly kind: string;
  readonly reportId: string;
  readonly authorId: string;
  readonly cause: string;
  readonly parameters: Readonly<Record<string, string | number>>;
}

/** Tells a reporter on screen and by mail, in the transaction of what is told. */
export async function tellReporter(trx: Transaction, notice: Notice): Promise<void> {
  await trx('notice').insert({
    person_id: notice.authorId, kind: notice.kind, report_id: notice.reportId,
    parameters: JSON.stringify(notice.parameters),
  });
  await trx.raw(`select reserve_notice_mail(?, ?, ?, ?)`, [notice.cause, notice.authorId,
    notice.reportId, JSON.stringify({ ...notice.parameters, notice: notice.kind })]);
}

const noticeView = z.strictObject({
  id: z.uuid(),
  kind: z.string(),
  report: z.strictObject({ number: z.string(), title: z.string() }).nullable(),
  parameters: z.record(z.string(), z.union([z.string(), z.number()])),
  createdAt: z.string(),
  readAt: z.string().nullable(),
}).openapi('Notice') satisfies z.ZodType<NoticeView>;
const noticeList = z.strictObject({ items: z.array(noticeView) });
const noticesShown = 100;

export function noticesRoutes(database: Database): Route[] {
  return [
    route({
      method: 'get', path: '/api/notices', operationId: 'listNotices', limit: 'read',
      summary: 'Own notices, the newest first', access: requireRole('subscriber'),
      answers: { 200: noticeList },
      handle: async (call) => ok({ items: await database.asActor(call.actor,
        (trx) => listNotices(trx, signedIn(call).id)) }),
    }),
    route({
      method: 'put', path: '/api/notices/:id/read', operationId: 'markNoticeRead',
      summary: 'Mark a notice as read; safe to repeat', access: requireRole('subscriber'),
      limit: 'write', params: z.object({ id: z.uuid() }), answers: { 204: null },
      refusals: [404],
      handle: async (call) => {
        const read = await database.asActor(call.actor, (trx) => trx('notice')
          .where({ id: call.params.id, person_id: signedIn(call).id })
          .update({ read_at: trx.raw('coalesce(read_at, now())') }));
        if (!read) throw new NotFound();
        return noContent();
      },
    }),
  ];
}

async function listNotices(trx: Transaction, personId: string): Promise<NoticeView[]> {
  const rows = await trx('notice').leftJoin('report', 'report.id', 'notice.report_id')
    .leftJoin('report_version as v', (join) => join.on('v.report_id', 'report.id')
      .andOn('v.version', 'report.current_version'))
    .leftJoin('coin_type', 'coin_type.id', 'v.coin_type_id')
    .select('notice.id', 'notice.kind', 'notice.parameters', 'notice.created_at',
      'notice.read_at', 'report.number',
      trx.raw(`coalesce(v.piece ->> 'title', coin_type.name, '') as title`))
    .where({ 'notice.person_id': personId })
    .orderBy([{ column: 'notice.created_at', order: 'desc' }, 'notice.id']).limit(noticesShown);
  return rows.map((row) => ({
    id: row.id, kind: row.kind, parameters: row.parameters,
    report: row.number ? { number: row.number, title: row.title } : null,
    createdAt: row.created_at.toISOString(), readAt: row.read_at?.toISOString() ?? null,
  }));
}

