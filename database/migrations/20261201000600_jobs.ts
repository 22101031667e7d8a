import type { Knex } from 'knex';
import PgBoss from 'pg-boss';

const schema = 'pgboss';

/**
 * The job queue's own schema, made by the owner, with its queues: the application role may use them
 * but creates nothing.
 */
export async function up(knex: Knex): Promise<void> {
  // Its plan comes wrapped in a transaction of its own; this one is Knex's.
  const plan = PgBoss.getConstructionPlans(schema)
    .replace(/^\s*BEGIN;/m, '').replace(/COMMIT;\s*$/m, '');
  await knex.raw(plan.replace(/\?/g, '\\?'));
  const queues = [
    { name: 'match-watches', retryLimit: 20 },
    { name: 'clean-up', retryLimit: 2 },
    { name: '__pgboss__send-it', retryLimit: 2 },
  ];
  for (const { name, retryLimit } of queues) {
    await knex.raw(`select ${schema}.create_queue(?, ?)`, [name, JSON.stringify({
      policy: 'standard', retryLimit, retryDelay: 5, retryBackoff: true, expireInSeconds: 300,
    })]);
  }
  await knex.raw(`
grant usage on schema ${schema} to touchneedle_app;
grant select, insert, update, delete on all tables in schema ${schema} to touchneedle_app;
grant execute on all functions in schema ${schema} to touchneedle_app;
`);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`drop schema ${schema} cascade`);
}
