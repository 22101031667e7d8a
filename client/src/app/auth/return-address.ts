/** Screens that lead to a session: nobody wants to be back on one with it. */
const ways = /^\/(sign-in|register|forgotten-password|password|setup)\b/;

/**
 * The way back after signing in. Only a path of this app is followed: `//host` and the like
 * would lead a freshly signed-in reader away.
 */
export function safeReturnAddress(returnTo: string | null | undefined): string {
  const inside = !!returnTo && /^\/(?![/\\])/.test(returnTo);
  return inside && !ways.test(returnTo) ? returnTo : '/';
}
