import { mailStates, type MailLedgerRow, type MailSettlement } from '#shared/mail/mail-ledger';
import type { Database, Transaction } from '../db/database';
import { Conflict, NotFound } from '../errors';
import { recordAudit } from '../audit/audit';
import { z } from '../http/openapi-zod';
import { noContent, ok, requireRole, route, signedIn, type Route } from '../http/route';

const ledgerQuery = z.strictObject({
  state: z.enum(mailStates).optional(),
  after: z.uuid().optional(),
  limit: z.coerce.number().int().min(1).max(100).default(50),
});
const ledgerRow = z.strictObject({
  id: z.uuid(),
  kind: z.string(),
  address: z.string(),
  state: z.enum(mailStates),
  messageId: z.string().nullable(),
  attempts: z.int(),
  notBefore: z.string(),
  createdAt: z.string(),
  answer: z.string().nullable(),
  items: z.int(),
}).openapi('MailLedgerRow') satisfies z.ZodType<MailLedgerRow>;
const ledgerPage = z.strictObject({ items: z.array(ledgerRow), next: z.string().nullable() });
const settlement = z.strictObject({ outcome: z.enum(['arrived', 'lost', 'drop']) }) satisfies
  z.ZodType<MailSettlement>;

/** The registrar's view of the mail ledger, and the settling of what is uncertain. */
export function mailLedgerRoutes(database: Database): Route[] {
  return [
    route({
      method: 'get', path: '/api/registry/mail', operationId: 'listMailLedger', limit: 'read',
      summary: 'The mail ledger, the newest first', access: requireRole('registrar'),
      query: ledgerQuery, answers: { 200: ledgerPage },
      handle: async ({ actor, query }) =>
        ok(await database.asActor(actor, (trx) => listLedger(trx, query))),
    }),
    route({
      method: 'post', path: '/api/registry/mail/:id/settlement', operationId: 'settleMail',
      summary: 'Settle a mail of which nobody knows whether it left', limit: 'write',
      access: requireRole('registrar'), params: z.object({ id: z.uuid() }), body: settlement,
      answers: { 204: null }, refusals: [404, 409],
      handle: async (call) => {
        await database.asActor(call.actor,
          (trx) => settle(trx, signedIn(call).id, call.params.id, call.body.outcome));
        return noContent();
      },
    }),
  ];
}

interface LedgerRow {
  readonly id: string; readonly kind: string; readonly address: string;
  readonly state: MailLedgerRow['state']; readonly message_id: string | null;
  readonly attempts: number; readonly not_before: Date; readonly created_at: Date;
  readonly answer: string | null; readonly items: number;
}

async function listLedger(
  trx: Transaction, query: z.output<typeof ledgerQuery>,
): Promise<z.output<typeof ledgerPage>> {
  const rows: LedgerRow[] = await trx('mail').select('id', 'kind', 'address', 'state',
    'message_id', 'attempts', 'not_before', 'created_at', 'answer',
    trx.raw('(select count(*) from mail_item i where i.mail_id = mail.id) as items'))
    .modify((builder) => {
      if (query.state) builder.where({ state: query.state });
      if (query.after) {
        builder.whereRaw(`(created_at, id) < (select m.created_at, m.id from mail m
          where m.id = ?)`, [query.after]);
      }
    })
    .orderBy([{ column: 'created_at', order: 'desc' }, { column: 'id', order: 'desc' }])
    .limit(query.limit + 1);
  const page = rows.slice(0, query.limit);
  return {
    items: page.map((row) => ({
      id: row.id, kind: row.kind, address: row.address, state: row.state,
      messageId: row.message_id, attempts: row.attempts,
      notBefore: row.not_before.toISOString(), createdAt: row.created_at.toISOString(),
      answer: row.answer, items: row.items,
    })),
    next: rows.length > query.limit ? page.at(-1)?.id ?? null : null,
  };
}

/**
 * The stated policy: nothing uncertain is ever sent again by itself. The registrar finds out
 * whether it arrived; `lost` makes a new mail with a cause and Message-ID of its own.
 */
async function settle(
  trx: Transaction, registrarId: string, id: string, outcome: MailSettlement['outcome'],
): Promise<void> {
  const mail = await trx('mail').select('state').where({ id }).forUpdate().first();
  if (!mail) throw new NotFound();
  if (mail.state !== 'uncertain') throw new Conflict('already_decided');
  const state = { arrived: 'settled_sent', lost: 'settled_lost', drop: 'dropped' }[outcome];
  await trx('mail').where({ id })
    .update({ state, settled_at: trx.fn.now(), settled_by: registrarId });
  if (outcome === 'lost') await trx.raw('select send_mail_anew(?)', [id]);
  await recordAudit(trx, { act: 'mail_settled', actorId: registrarId, subjectKind: 'mail',
    subjectId: id, details: { outcome } });
}
