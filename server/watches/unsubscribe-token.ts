import { createHmac, timingSafeEqual } from 'node:crypto';

/** Names the person whose digests it stops; nobody else can make one, and it needs no sign-in. */
export function unsubscribeToken(personId: string, mailTokenKey: string): string {
  const person = Buffer.from(personId.replaceAll('-', ''), 'hex').toString('base64url');
  return `${person}.${sign(personId, mailTokenKey)}`;
}

/** The person's id, or undefined where the token was not made here. */
export function readUnsubscribeToken(token: string, mailTokenKey: string): string | undefined {
  const [person = '', signature = ''] = token.split('.');
  const hex = Buffer.from(person, 'base64url').toString('hex');
  if (hex.length !== 32) return undefined;
  const personId = hex.replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, '$1-$2-$3-$4-$5');
  const expected = Buffer.from(sign(personId, mailTokenKey));
  const given = Buffer.from(signature);
  return given.length === expected.length && timingSafeEqual(given, expected)
    ? personId : undefined;
}

function sign(personId: string, mailTokenKey: string): string {
  return createHmac('sha256', mailTokenKey).update(`unsubscribe|${personId}`).digest('base64url');
}
