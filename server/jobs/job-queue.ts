import { setTimeout as delay } from 'node:timers/promises';
import pg from 'pg';
import PgBoss from 'pg-boss';
import type { Logger } from 'pino';
import type { Transaction } from '../db/database';
import { isConnectionLost } from '../db/lost-connection';

export type JobName = 'match-watches' | 'clean-up';

/** Enqueues within the transaction of what causes the job: both commit, or neither. */
export interface JobQueue {
  enqueue(
    trx: Transaction, name: JobName, data: object, options?: { readonly startAfter?: Date },
  ): Promise<void>;
}

export interface RunningJobs extends JobQueue {
  readonly boss: PgBoss;
  stop(): Promise<void>;
}

const attemptsOnLostConnection = 30;

/**
 * pg-boss over a pool of its own that waits out a restart of PostgreSQL: without it pg-boss ends
 * the process when a connection breaks.
 */
export async function startJobQueue(
  connectionString: string, logger: Logger, role: 'enqueue' | 'work',
): Promise<RunningJobs> {
  const pool = new pg.Pool({ connectionString, max: role === 'work' ? 4 : 2,
    connectionTimeoutMillis: 5_000, application_name: 'touchneedle-jobs' });
  pool.on('error', (error) => logger.warn({ err: error }, 'idle job connection lost'));
  const boss = new PgBoss({
    db: { executeSql: (text, values) => queryPatiently(pool, text, values, logger) },
    migrate: false,
    supervise: role === 'work',
    schedule: role === 'work',
    archiveCompletedAfterSeconds: 3600,
    deleteAfterDays: 7,
  });
  boss.on('error', (error) => logger.error({ err: error }, 'job queue'));
  await boss.start();
  return {
    boss,
    async enqueue(trx, name, data, options) {
      await boss.send(name, data, {
        ...(options?.startAfter ? { startAfter: options.startAfter } : {}),
        db: { executeSql: async (text, values) =>
          (await trx.client.acquireConnection()).query(text, values) },
      });
    },
    async stop() {
      await boss.stop({ graceful: true, timeout: 5_000, wait: true });
      await pool.end();
    },
  };
}

async function queryPatiently(
  pool: pg.Pool, text: string, values: unknown[], logger: Logger,
): Promise<pg.QueryResult> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await pool.query(text, values);
    } catch (error) {
      if (!isConnectionLost(error) || attempt === attemptsOnLostConnection) throw error;
      logger.warn({ err: error, attempt }, 'database away, the job queue waits');
      await delay(Math.min(5_000, 100 * 2 ** Math.min(attempt, 6)));
    }
  }
}
