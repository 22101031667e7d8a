const codes = /^(08|57P0|ECONNREFUSED$|ECONNRESET$|EPIPE$|ETIMEDOUT$)/;

/** pg gives errors of its own no code; what a client says after its connection broke, too. */
const messages = new RegExp('Connection terminated|Connection ended unexpectedly|not queryable'
  + '|timeout exceeded when trying to connect');

/**
 * PostgreSQL is away or going down, by its own word (SQLSTATE classes 08 and 57P0) or by that of
 * the socket, pg or knex: the same may be tried again.
 */
export function isConnectionLost(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  const { code } = error as { code?: unknown };
  return (typeof code === 'string' && codes.test(code)) || error.name === 'KnexTimeoutError'
    || messages.test(error.message);
}
