import { execFile } from 'node:child_process';
import { readdirSync } from 'node:fs';
import { readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { migrateOptions } from '#database/migrations';
import { createBlankDatabase, type TestDatabase } from '#tests/support/test-database';

const file = join(import.meta.dirname, '../../database/schema.sql');

let database: TestDatabase;
beforeAll(async () => {
  database = await createBlankDatabase();
  await database.owner.migrate.latest(migrateOptions);
});
afterAll(() => database.drop());

/** Where the cluster under test has its programs: the server's own version dumps it. */
function programs(): string {
  const given = process.env['TEST_POSTGRES_PROGRAMS'];
  if (given) return given;
  const [newest = ''] = readdirSync('/usr/lib/postgresql')
    .sort((one, other) => Number(other) - Number(one));
  return `/usr/lib/postgresql/${newest}/bin`;
}

/** The schema without what differs from one machine or release of the dump to the next. */
async function dumpSchema(): Promise<string> {
  const { stdout } = await promisify(execFile)(join(programs(), 'pg_dump'),
    ['--schema-only', '--no-owner', database.ownerUrl], { maxBuffer: 64 * 1024 * 1024 });
  return stdout.split('\n').filter((line) => !/^(--|SET |\\(un)?restrict |SELECT pg_catalog)/
    .test(line)).join('\n').replace(/\n{3,}/g, '\n\n').trim().concat('\n');
}

// `npm run schema` writes it; then the difference is read with the migration that made it.
it('is what database/schema.sql says', async () => {
  const schema = await dumpSchema();
  if (process.env['UPDATE_SCHEMA']) await writeFile(file, schema);
  expect(schema).toBe(await readFile(file, 'utf8'));
});
