import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { Knex } from 'knex';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { migrateOptions, migrationSource } from '#database/migrations';
import { createBlankDatabase, type TestDatabase } from '#tests/support/test-database';

const names = await migrationSource.getMigrations([]);

let database: TestDatabase;
beforeAll(async () => { database = await createBlankDatabase(); });
afterAll(() => database.drop());

type Columns = ReadonlyMap<string, readonly string[]>;

/** Tables with their columns, but for the record of the migrations itself. */
async function readColumns(owner: Knex): Promise<Columns> {
  const { rows } = await owner.raw(
    `select table_schema || '.' || table_name as name,
       array_agg(quote_ident(column_name) order by ordinal_position) as columns
       from information_schema.columns join information_schema.tables
         using (table_schema, table_name)
      where table_schema in ('public', 'pgboss') and table_type = 'BASE TABLE'
        and table_name not in ('migration', 'migration_lock') group by 1 order by 1`);
  return new Map(rows.map((row: { name: string; columns: string[] }) => [row.name, row.columns]));
}

/** Every row of these columns, as text in order. */
async function readRows(owner: Knex, columns: Columns): Promise<Record<string, string[]>> {
  const all: Record<string, string[]> = {};
  for (const [table, names] of columns) {
    const { rows } = await owner.raw(`select row(${names.join(', ')})::text as row from ${table}
      order by 1`);
    all[table] = rows.map(({ row }: { row: string }) => row);
  }
  return all;
}

/** Rows written by hand for the schema as it stands right after a migration. */
function insertRows(owner: Knex, name: string): Promise<unknown> {
  return readFile(join(import.meta.dirname, 'rows', `${name}.sql`), 'utf8')
    .then((sql) => owner.transaction((trx) => trx.raw(sql)));
}

describe.sequential('each migration', () => {
  it.each(names)('%s: up keeps the rows, down gives them back, up again', async (name) => {
    const { owner } = database;
    const before = await readColumns(owner);
    const rows = await readRows(owner, before);
    const up = (): Promise<unknown> => owner.migrate.up(migrateOptions);

    const [, done] = await owner.migrate.up(migrateOptions);
    expect(done).toEqual([name]);
    expect(await readRows(owner, before)).toEqual(rows);
    await insertRows(owner, name);

    await owner.migrate.down(migrateOptions);
    expect([...await readColumns(owner)]).toEqual([...before]);
    expect(await readRows(owner, before)).toEqual(rows);

    await up();
    expect(await readRows(owner, before)).toEqual(rows);
    await insertRows(owner, name);
    const after = await readColumns(owner);
    const added = [...after.keys()].filter((table) => !before.has(table));
    const written = await readRows(owner, new Map([...after]
      .filter(([table]) => added.includes(table) && !table.startsWith('pgboss.'))));
    for (const [table, each] of Object.entries(written)) {
      if (table === 'public.report_search_public') continue;
      expect(each.length, `${name} has no row by hand for ${table}`).toBeGreaterThan(0);
    }
  });

  it('leaves nothing to do at the end', async () => {
    const [, names] = await database.owner.migrate.latest(migrateOptions);
    expect(names).toEqual([]);
  });
});
