import { readdir } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import type { Knex } from 'knex';

const directory = join(dirname(fileURLToPath(import.meta.url)), 'migrations');

/**
 * Migrations by their name without extension, so that the record in the database is the same
 * whether they run as TypeScript or compiled.
 */
export const migrationSource: Knex.MigrationSource<string> = {
  getMigrations: async () => (await readdir(directory))
    .filter((file) => /^\d{14}_\w+\.(ts|js)$/.test(file))
    .map((file) => file.replace(/\.(ts|js)$/, '')).sort(),
  getMigrationName: (name) => name,
  getMigration: async (name) => {
    const file = (await readdir(directory)).find((each) => each.replace(/\.\w+$/, '') === name);
    if (!file) throw new Error(`there is no migration ${name}`);
    return import(pathToFileURL(join(directory, file)).href) as Promise<Knex.Migration>;
  },
};

/** Options for `knex.migrate.*` used by every caller. */
export const migrateOptions: Knex.MigratorConfig = { migrationSource, tableName: 'migration' };
