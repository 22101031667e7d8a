import type { Transaction } from '../db/database';

export interface MailReservation {
  /** Unique: a second reservation for one cause is the same mail. */
  readonly cause: string;
  readonly kind: 'reset' | 'invitation' | 'registration' | 'notice' | 'digest' | 'erratum';
  readonly personId: string | null;
  readonly address: string;
  readonly parameters: Readonly<Record<string, unknown>>;
}

/** Reserves a mail in the ledger, in the transaction of what causes it; the worker sends it. */
export async function reserveMail(trx: Transaction, mail: MailReservation): Promise<void> {
  await trx.raw('select reserve_mail(?, ?, ?, ?, ?)',
    [mail.cause, mail.kind, mail.personId, mail.address, JSON.stringify(mail.parameters)]);
}
