import knex from 'knex';
import configuration from './knexfile';

/** `tsx database/migrate.ts [latest|down]`: brings the database of DATABASE_OWNER_URL up. */
const database = knex(configuration);
try {
  const [, names] = await (process.argv[2] === 'down' ? database.migrate.down()
    : database.migrate.latest());
  process.stdout.write(names.length ? `Migrated: ${names.join(', ')}\n`
    : 'Schema is up to date.\n');
} finally {
  await database.destroy();
}
