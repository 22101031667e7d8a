import type { Knex } from 'knex';
import { migrateOptions } from './migrations';

/** For the owner role only: the application signs in by DATABASE_URL and owns nothing. */
const configuration: Knex.Config = {
  client: 'pg',
  connection: process.env['DATABASE_OWNER_URL'] ?? '',
  pool: { min: 0, max: 4 },
  migrations: migrateOptions,
};

export default configuration;
