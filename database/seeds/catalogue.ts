import { createHash } from 'node:crypto';
import type { Knex } from 'knex';
import { issueRows, readCoinTypes, readTells, type CatalogueCoinType,
  type CatalogueTells } from './catalogue-files';
import { searchWords } from './search-words';

export interface SeededCatalogue {
  readonly coinTypes: number;
  /** Revisions added by this run: none where nothing changed. */
  readonly newRevisions: number;
  readonly tells: number;
  readonly searchWords: number;
}

export interface CatalogueFiles {
  readonly types: readonly CatalogueCoinType[];
  readonly tells: CatalogueTells;
}

const rowsPerStatement = 500;

/** What the data files say; throws with the file's name where one is wrong. */
export async function readCatalogue(): Promise<CatalogueFiles> {
  const [types, tells] = await Promise.all([readCoinTypes(), readTells()]);
  return { types, tells };
}

/**
 * Brings the catalogue in the database to what the data files say, as the owner of the tables.
 * Safe to run again. A changed standard becomes a new revision, since reports point at the one
 * they were filed under; a type or tell that a file no longer has stays for the same reason.
 */
export async function seedCatalogue(knex: Knex,
  files?: CatalogueFiles): Promise<SeededCatalogue> {
  const { types, tells } = files ?? await readCatalogue();
  return knex.transaction(async (trx) => {
    // Two starts at once would race for the same revision number.
    await trx.raw('select pg_advisory_xact_lock(hashtext(?))', ['touchneedle.catalogue']);
    const { ids, newRevisions } = await writeCoinTypes(trx, types);
    await writeIssues(trx, types, ids);
    await writeLegalStatus(trx, types, ids);
    await writeTells(trx, tells);
    const words = searchWords(types, tells);
    await trx('search_word').whereNotIn('word', [...words.keys()]).delete();
    await upsert(trx, 'search_word', ['word'],
      [...words].map(([word, weight]) => ({ word, weight })));
    return { coinTypes: types.length, newRevisions, tells: tells.tells.length,
      searchWords: words.size };
  });
}

async function writeCoinTypes(trx: Knex.Transaction, types: readonly CatalogueCoinType[]) {
  await upsert(trx, 'coin_type', ['slug'], types.map((type, position) => ({
    slug: type.slug, kind: type.kind, name: type.name, issuer: type.issuer,
    issuer_country: type.issuerCountry, metal: type.metal,
    is_demonstration: type.isDemonstration, position })));
  const stored: { id: string; slug: string; current_revision: number;
    content_hash: string | null }[] = await trx('coin_type')
    .leftJoin('coin_type_revision', (join) => join
      .on('coin_type_revision.coin_type_id', 'coin_type.id')
      .andOn('coin_type_revision.revision', 'coin_type.current_revision'))
    .select('coin_type.id', 'coin_type.slug', 'coin_type.current_revision',
      'coin_type_revision.content_hash');
  const bySlug = new Map(stored.map((row) => [row.slug, row]));
  let newRevisions = 0;
  for (const type of types) {
    const row = bySlug.get(type.slug);
    if (!row) throw new Error(`coin type ${type.slug} was not stored`);
    const hash = contentHash(type.standard);
    if (row.content_hash === hash) continue;
    const revision = row.content_hash === null ? row.current_revision : row.current_revision + 1;
    await trx('coin_type_revision').insert({ coin_type_id: row.id, revision,
      standard: JSON.stringify(type.standard), content_hash: hash });
    await trx('coin_type').where({ id: row.id }).update({ current_revision: revision });
    newRevisions += 1;
  }
  return { ids: new Map(stored.map(({ slug, id }) => [slug, id])), newRevisions };
}

async function writeIssues(trx: Knex.Transaction, types: readonly CatalogueCoinType[],
  ids: ReadonlyMap<string, string>) {
  const rows = types.flatMap((type) => issueRows(type).map((issue) => ({
    coin_type_id: ids.get(type.slug), year: issue.year, mint_mark: issue.mintMark,
    state: issue.state, known_count: issue.knownCount, note: issue.note,
    source: issue.source })));
  await deleteOthers(trx, 'coin_type_issue', ['coin_type_id', 'year', 'mint_mark', 'state'],
    types.map(({ slug }) => ids.get(slug)), rows);
  await upsert(trx, 'coin_type_issue', ['coin_type_id', 'year', 'mint_mark', 'state'], rows);
}

async function writeLegalStatus(trx: Knex.Transaction, types: readonly CatalogueCoinType[],
  ids: ReadonlyMap<string, string>) {
  const rows = types.flatMap((type) => type.legalStatus.map((each) => ({
    coin_type_id: ids.get(type.slug), country: each.country, status: each.status,
    source: each.source, source_kind: each.sourceKind })));
  await deleteOthers(trx, 'coin_type_legal_status', ['coin_type_id', 'country'],
    types.map(({ slug }) => ids.get(slug)), rows);
  await upsert(trx, 'coin_type_legal_status', ['coin_type_id', 'country'], rows);
}

async function writeTells(trx: Knex.Transaction, tells: CatalogueTells) {
  await upsert(trx, 'production_method', ['id'],
    tells.methods.map((method, position) => ({ ...method, position })));
  await upsert(trx, 'tell', ['id'], tells.tells.map((tell, position) => ({
    id: tell.id, name: tell.name, seen: tell.seen, place: tell.place, form: tell.form,
    methods: tell.methods, confused_with: tell.confusedWith, disclosure: tell.disclosure,
    position })));
  await upsert(trx, 'genuine_feature', ['id'],
    tells.genuineFeatures.map((feature, position) => ({ ...feature, position })));
}

/** Rows that are equal already are left alone, so that a second run writes nothing. */
async function upsert(trx: Knex.Transaction, table: string, keys: readonly string[],
  rows: readonly Record<string, unknown>[]) {
  for (let start = 0; start < rows.length; start += rowsPerStatement) {
    const part = rows.slice(start, start + rowsPerStatement);
    const others = Object.keys(part[0] ?? {}).filter((column) => !keys.includes(column));
    const differs = others.map(() => '??.?? is distinct from excluded.??').join(' or ');
    await trx(table).insert(part).onConflict([...keys]).merge(others)
      .whereRaw(differs, others.flatMap((column) => [table, column, column]));
  }
}

/** Deletes rows of the given types whose key the files no longer have. */
async function deleteOthers(trx: Knex.Transaction, table: string, keys: readonly string[],
  typeIds: readonly (string | undefined)[], rows: readonly Record<string, unknown>[]) {
  const wanted = new Set(rows.map((row) => JSON.stringify(keys.map((key) => row[key]))));
  const stored: Record<string, unknown>[] = await trx(table).select([...keys])
    .whereIn('coin_type_id', typeIds.filter((id) => id !== undefined));
  for (const row of stored) {
    const key = Object.fromEntries(keys.map((each) => [each, row[each]]));
    if (!wanted.has(JSON.stringify(Object.values(key)))) await trx(table).where(key).delete();
  }
}

/** SHA-256 over the JSON with sorted keys, so that reordering a file makes no revision. */
export function contentHash(content: unknown): string {
  const sorted = JSON.stringify(content, (_, value: unknown) =>
    value !== null && typeof value === 'object' && !Array.isArray(value)
      ? Object.fromEntries(Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1)))
      : value);
  return createHash('sha256').update(sorted).digest('hex');
}
