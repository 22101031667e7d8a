import { createHash, randomBytes } from 'node:crypto';
import { readdir, readFile } from 'node:fs/promises';
import { join } from 'node:path';
import knex, { type Knex } from 'knex';
import { migrateOptions } from '#database/migrations';
import { seedCatalogue } from '#database/seeds/catalogue';

export interface TestDatabase {
  readonly name: string;
  /** For the owner: looks past row-level security, for arranging and asserting. */
  readonly owner: Knex;
  readonly appUrl: string;
  readonly ownerUrl: string;
  drop(): Promise<void>;
}

/**
 * A database of its own for one spec file, cloned from a template that is migrated and seeded with
 * the catalogue once for each state of the migrations. Needs TEST_DATABASE_ADMIN_URL, a role that
 * may create databases and owns the schema.
 */
export async function createTestDatabase(): Promise<TestDatabase> {
  const adminUrl = adminAddress();
  const template = await prepareTemplate(adminUrl);
  const name = `test_${randomBytes(8).toString('hex')}`;
  await withAdmin(adminUrl, (admin) =>
    admin.raw(`create database ${name} template ${template}`));
  return openTestDatabase(adminUrl, name);
}

/** An empty one, for the specs of the migrations themselves. */
export async function createBlankDatabase(): Promise<TestDatabase> {
  const adminUrl = adminAddress();
  const name = `test_${randomBytes(8).toString('hex')}`;
  await withAdmin(adminUrl, (admin) => admin.raw(`create database ${name} template template0`));
  return openTestDatabase(adminUrl, name);
}

function openTestDatabase(adminUrl: string, name: string): TestDatabase {
  const ownerUrl = withDatabase(adminUrl, name);
  const owner = knex({ client: 'pg', connection: ownerUrl, pool: { min: 0, max: 3 } });
  return {
    name,
    owner,
    ownerUrl,
    appUrl: appAddress(ownerUrl),
    async drop() {
      await owner.destroy();
      await withAdmin(adminUrl, (admin) =>
        admin.raw(`drop database if exists ${name} with (force)`));
    },
  };
}

async function prepareTemplate(adminUrl: string): Promise<string> {
  const template = `template_${await hashOfSchema()}`;
  await withAdmin(adminUrl, async (admin) => {
    await admin.raw('select pg_advisory_lock(80042)');
    try {
      const { rows } = await admin.raw('select from pg_database where datname = ?', [template]);
      if (rows.length) return;
      const unfinished = `${template}_unfinished`;
      await admin.raw(`drop database if exists ${unfinished} with (force)`);
      await admin.raw(`create database ${unfinished} template template0`);
      const database = knex({ client: 'pg', connection: withDatabase(adminUrl, unfinished),
        pool: { min: 0, max: 2 } });
      try {
        await database.migrate.latest(migrateOptions);
        await seedCatalogue(database);
      } finally {
        await database.destroy();
      }
      await admin.raw(`alter database ${unfinished} rename to ${template}`);
    } finally {
      await admin.raw('select pg_advisory_unlock(80042)');
    }
  });
  return template;
}

/** So that a changed migration or catalogue makes a new template. */
async function hashOfSchema(): Promise<string> {
  const hash = createHash('sha256');
  for (const folder of ['migrations', 'catalogue', 'seeds']) {
    const directory = join(import.meta.dirname, '../../database', folder);
    for (const file of (await readdir(directory, { recursive: true })).sort()) {
      if (!/\.(ts|json)$/.test(file)) continue;
      hash.update(file).update(await readFile(join(directory, file)));
    }
  }
  return hash.digest('hex').slice(0, 16);
}

async function withAdmin<Result>(
  adminUrl: string, work: (admin: Knex) => PromiseLike<Result>,
): Promise<Result> {
  // One connection, so that an advisory lock is given back by the session that took it.
  const admin = knex({ client: 'pg', connection: adminUrl, pool: { min: 1, max: 1 } });
  try {
    return await work(admin);
  } finally {
    await admin.destroy();
  }
}

function adminAddress(): string {
  const address = process.env['TEST_DATABASE_ADMIN_URL'];
  if (!address) throw new Error('TEST_DATABASE_ADMIN_URL is not set: run the tests by npm test');
  return address;
}

function withDatabase(address: string, name: string): string {
  const url = new URL(address);
  url.pathname = `/${name}`;
  return url.href;
}

function appAddress(ownerUrl: string): string {
  const url = new URL(ownerUrl);
  url.username = 'touchneedle_app';
  url.password = process.env['TEST_DATABASE_APP_PASSWORD'] ?? '';
  return url.href;
}
