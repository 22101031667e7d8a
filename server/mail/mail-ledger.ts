import { randomUUID } from 'node:crypto';
import type { Transaction } from '../db/database';

/** A claim is good for longer than any SMTP exchange with the time-outs of the transport. */
const leaseSeconds = 30;
const attemptsAtMost = 12;
/** How many mails one run claims and hands to SMTP side by side. */
export const mailsAtOnce = 10;

export interface ClaimableMail {
  readonly id: string;
  readonly kind: string;
  readonly person_id: string | null;
  readonly address: string;
  readonly message_id: string;
  readonly parameters: Readonly<Record<string, unknown>>;
  readonly attempts: number;
}

/** What SMTP said of one try; see the transport for how they are told apart. */
export type DeliveryOutcome =
  | { readonly kind: 'sent'; readonly answer: string }
  | { readonly kind: 'refused'; readonly answer: string }
  | { readonly kind: 'retry'; readonly answer: string }
  | { readonly kind: 'uncertain'; readonly answer: string };

/**
 * Step 2 for what is reserved: gives each its Message-ID, which never changes again. Digests are
 * reserved and frozen with their items in one transaction, so those found here have theirs.
 */
export async function freezeReserved(trx: Transaction, domain: string): Promise<void> {
  await trx('mail').where({ state: 'reserved' }).update({
    state: 'ready', frozen_at: trx.fn.now(),
    message_id: trx.raw(`'<' || id || '@' || ? || '>'`, [domain]),
  });
}

/** A claim that ran out: the body may have left, so nobody sends it again by themselves. */
export async function markAbandoned(trx: Transaction): Promise<number> {
  return trx('mail').where({ state: 'sending' }).where('claimed_until', '<', trx.fn.now()).update({
    state: 'uncertain', claim_token: null, claimed_until: null,
    answer: 'the sender stopped before the answer came',
  });
}

/** Due mails, locked for this transaction; other senders pass them by. */
export function lockDue(trx: Transaction): Promise<ClaimableMail[]> {
  return trx('mail').select('id', 'kind', 'person_id', 'address', 'message_id', 'parameters',
    'attempts').where({ state: 'ready' }).where('not_before', '<=', trx.fn.now())
    .orderBy(['not_before', 'id']).limit(mailsAtOnce).forUpdate().skipLocked();
}

/** Step 3: from here on the body may leave. */
export async function markSending(trx: Transaction, id: string): Promise<string> {
  const token = randomUUID();
  await trx('mail').where({ id, state: 'ready' }).update({
    state: 'sending', claim_token: token, attempts: trx.raw('attempts + 1'),
    claimed_until: trx.raw(`now() + ? * interval '1 second'`, [leaseSeconds]),
  });
  return token;
}

/** Nothing is left in it that the recipient may see, or wants. */
export async function markDropped(trx: Transaction, id: string, why: string): Promise<void> {
  await trx('mail').where({ id, state: 'ready' }).update({ state: 'dropped', answer: why });
}

/** Step 5. A late answer still settles a row that ran out meanwhile: it is the only try made. */
export async function recordOutcome(
  trx: Transaction, mail: ClaimableMail, token: string, outcome: DeliveryOutcome,
): Promise<void> {
  const isLastTry = mail.attempts + 1 >= attemptsAtMost;
  const state = outcome.kind === 'retry' ? (isLastTry ? 'refused' : 'ready') : outcome.kind;
  const backOffSeconds = Math.min(3600, 5 * 2 ** mail.attempts);
  await trx('mail').where({ id: mail.id })
    .where((which) => which.where({ claim_token: token }).orWhere({ state: 'uncertain' }))
    .update({
      state, answer: outcome.answer.slice(0, 1000), claim_token: null, claimed_until: null,
      ...(state === 'ready'
        ? { not_before: trx.raw(`now() + ? * interval '1 second'`, [backOffSeconds]) } : {}),
      ...(state === 'sent' ? { settled_at: trx.fn.now() } : {}),
    });
}
