import { createHash, createHmac } from 'node:crypto';

/**
 * Secret of a mailed link, derived from its id: the ledger holds the id alone, so that neither it
 * nor whoever reads it can use the link.
 */
export function accountLinkToken(linkId: string, mailTokenKey: string): string {
  return createHmac('sha256', mailTokenKey).update(`account-link|${linkId}`).digest('base64url');
}

/** What the table keeps of a token. */
export function accountLinkHash(token: string): Buffer {
  return createHash('sha256').update(token).digest();
}
