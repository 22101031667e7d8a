import knex, { type Knex } from 'knex';
import pg from 'pg';
import type { Role } from '#shared/access/audience';

/** On whose behalf a transaction reads and writes; row-level security goes by it. */
export type Actor =
  | { readonly kind: 'visitor' }
  | { readonly kind: 'person'; readonly id: string }
  | { readonly kind: 'system' };

export const visitor: Actor = { kind: 'visitor' };
export const system: Actor = { kind: 'system' };

export type Transaction = Knex.Transaction;

export interface SignedInRow {
  readonly is_registrar: boolean;
  readonly session_epoch: number;
  readonly roles: readonly Role[];
}

export interface Database {
  /**
   * Runs `work` in one transaction as `actor`. Every access goes through here, reads too, and it
   * is never nested: a nested one waits for a second connection and can lock up a small pool.
   */
  asActor<Result>(actor: Actor, work: (trx: Transaction) => Promise<Result>): Promise<Result>;
  /**
   * Who a session belongs to, with the roles held at this moment; undefined once the account is
   * closed. Asked before there is an actor, in one statement of its own.
   */
  findSignedIn(personId: string): Promise<SignedInRow | undefined>;
  /** For the session store alone, which knows no actor. */
  readonly sessionPool: pg.Pool;
  close(): Promise<void>;
}

// `numeric` and `bigint` as numbers: every such column here stays far below 2^53.
pg.types.setTypeParser(pg.types.builtins.NUMERIC, Number);
pg.types.setTypeParser(pg.types.builtins.INT8, Number);
pg.types.setTypeParser(pg.types.builtins.DATE, (text) => text);

/** Opens the pools. Errors of idle connections go to `onError`; the pools replace them. */
export function openDatabase(
  connectionString: string,
  poolSize: number,
  onError: (error: Error) => void,
): Database {
  const pool = knex({
    client: 'pg',
    connection: { connectionString, application_name: 'touchneedle' },
    pool: { min: 0, max: poolSize },
    acquireConnectionTimeout: 10_000,
    // Else knex writes of broken connections past the log, to standard output.
    log: { warn: (message: unknown) => onError(new Error(String(message))) },
  });
  const sessionPool = new pg.Pool({
    connectionString, max: 4, connectionTimeoutMillis: 5_000,
    application_name: 'touchneedle-session',
  });
  sessionPool.on('error', onError);
  return {
    sessionPool,
    asActor: (actor, work) => pool.transaction(async (trx) => {
      await continueAs(trx, actor);
      return work(trx);
    }),
    findSignedIn: async (personId) => {
      const { rows: [row] } = await sessionPool.query<SignedInRow>({ name: 'signed-in-person',
        text: 'select * from signed_in_person($1)', values: [personId] });
      return row;
    },
    close: async () => {
      await pool.destroy();
      await sessionPool.end();
    },
  };
}

/**
 * Goes on with an open transaction as someone else: for the mail sender, which reads as the
 * recipient in the transaction that claims the mail.
 */
export async function continueAs(trx: Transaction, actor: Actor): Promise<void> {
  const setting = actor.kind === 'person' ? actor.id : actor.kind === 'system' ? 'system' : '';
  await trx.raw('select become_actor(?)', [setting]);
}
