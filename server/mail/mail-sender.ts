import { setTimeout as delay } from 'node:timers/promises';
import type { Logger } from 'pino';
import { continueAs, system, type Database, type Transaction } from '../db/database';
import { freezeReserved, lockDue, markAbandoned, markDropped, markSending, recordOutcome,
  type ClaimableMail, type DeliveryOutcome } from './mail-ledger';
import type { ComposedMail, MailTransport } from './mail-transport';

/** Some 13 s of waiting in all, after which the claim of 30 s has not run out. */
const attemptsToRecord = 8;

/**
 * Writes a mail as its recipient may read it at this moment, in the transaction that claims it;
 * undefined where nothing is left to say.
 */
export type MailComposer = (
  trx: Transaction, mail: ClaimableMail,
) => Promise<ComposedMail | undefined>;

export interface MailSender {
  /** Sends what is due; resolves to how many mails were handed to SMTP. */
  tick(): Promise<number>;
}

export function createMailSender(parts: {
  readonly database: Database;
  readonly transport: MailTransport;
  readonly composers: Readonly<Record<string, MailComposer>>;
  readonly messageIdDomain: string;
  readonly logger: Logger;
}): MailSender {
  const { database, transport, composers, logger } = parts;

  return {
    async tick() {
      const claimed = await database.asActor(system, async (trx) => {
        await markAbandoned(trx);
        await freezeReserved(trx, parts.messageIdDomain);
        const due = await lockDue(trx);
        const ready: { mail: ClaimableMail; token: string; composed: ComposedMail }[] = [];
        for (const mail of due) {
          const composed = await compose(trx, mail);
          if (!composed) {
            await markDropped(trx, mail.id, 'nothing left that the recipient may see or wants');
            continue;
          }
          ready.push({ mail, token: await markSending(trx, mail.id), composed });
        }
        return ready;
      });
      await Promise.all(claimed.map(async ({ mail, token, composed }) => {
        const outcome = await transport.deliver(composed, mail.message_id);
        if (outcome.kind !== 'sent') {
          logger.warn({ mailId: mail.id, kind: outcome.kind, answer: outcome.answer },
            'mail not sent');
        }
        await keepOutcome(mail, token, outcome);
      }));
      return claimed.length;
    },
  };

  /**
   * Tries through a restart of PostgreSQL: what stays unrecorded becomes uncertain, and each such
   * mail asks for a person's time.
   */
  async function keepOutcome(
    mail: ClaimableMail, token: string, outcome: DeliveryOutcome,
  ): Promise<void> {
    for (let attempt = 1; ; attempt++) {
      try {
        return await database.asActor(system, (trx) => recordOutcome(trx, mail, token, outcome));
      } catch (error) {
        if (attempt === attemptsToRecord) throw error;
        logger.warn({ err: error, mailId: mail.id, kind: outcome.kind }, 'outcome not recorded');
        await delay(50 * 2 ** attempt);
      }
    }
  }

  /** As the recipient, so that row-level security decides once more what may be said. */
  async function compose(
    trx: Transaction, mail: ClaimableMail,
  ): Promise<ComposedMail | undefined> {
    const composer = composers[mail.kind];
    if (!composer) throw new Error(`no composer for mails of kind ${mail.kind}`);
    try {
      return await composer(trx, mail);
    } finally {
      await continueAs(trx, system);
    }
  }
}
