/**
 * The way back after signing in. Only a path of this app is followed: `//host` and the like
 * would lead a freshly signed-in reader away.
 */
export function safeReturnAddress(returnTo: string | null | undefined): string {
  const inside = !!returnTo && /^\/(?![/\\])/.test(returnTo);
  return inside && !returnTo.startsWith('/sign-in') ? returnTo : '/';
}
