export const mailStates = ['reserved', 'ready', 'sending', 'sent', 'refused', 'uncertain',
  'dropped', 'settled_sent', 'settled_lost'] as const;
export type MailState = (typeof mailStates)[number];

/** `GET /api/registry/mail?state=&after=`: the ledger as the registrar sees it. */
export interface MailLedgerRow {
  readonly id: string;
  readonly kind: string;
  readonly address: string;
  readonly state: MailState;
  readonly messageId: string | null;
  readonly attempts: number;
  readonly notBefore: string;
  readonly createdAt: string;
  readonly answer: string | null;
  readonly items: number;
}

/** `POST /api/registry/mail/:id/settlement`: for uncertain rows. `lost` sends it anew. */
export interface MailSettlement {
  readonly outcome: 'arrived' | 'lost' | 'drop';
}
