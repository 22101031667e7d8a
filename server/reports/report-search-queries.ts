import type { Knex } from 'knex';
import { facetNames, type FacetCount, type FacetName,
  type ReportCard } from '#shared/reports/report-view';
import type { WatchFilter } from '#shared/watches/watch-filter';
import type { Transaction } from '../db/database';
import { cardColumns, toCard, type CardRow } from './report-card-queries';
import type { SearchCursor } from './report-search-schemas';

export type FacetCounts = Readonly<Record<FacetName, readonly FacetCount[]>>;

export interface SearchTotals {
  readonly count: number;
  readonly facets: FacetCounts;
}

const columnOf: Readonly<Record<Exclude<FacetName, 'tell'>, string>> = {
  coinType: 's.coin_type_slug', metal: 's.metal', kind: 's.kind', channel: 's.channel',
  country: 's.country', confidence: 's.confidence',
};

/**
 * Narrows a query over `visible_report_search as s` to what the filter says. Search, counts and
 * the matching of watches all go through here, so that a saved search means what it showed.
 */
export function applyFilter(
  query: Knex.QueryBuilder, filter: WatchFilter, except?: FacetName,
): Knex.QueryBuilder {
  if (filter.text && hasWords(filter.text)) {
    void query.whereRaw('s.words @@ search_query(?)', [filter.text]);
  }
  for (const name of facetNames) {
    const values = filter[name];
    if (!values?.length || name === except) continue;
    if (name === 'tell') void query.whereRaw('s.tells && ?::text[]', [[...values]]);
    else void query.whereIn(columnOf[name], [...values]);
  }
  if (filter.yearFrom !== undefined) void query.where('s.year', '>=', filter.yearFrom);
  if (filter.yearTo !== undefined) void query.where('s.year', '<=', filter.yearTo);
  const decades = decadesOf(filter);
  if (decades) void query.whereRaw('array[s.year / 10] && ?::integer[]', [decades]);
  return query;
}

/** The decades of a bounded range of years, as the index names them: years over ten, cut off. */
function decadesOf({ yearFrom, yearTo }: WatchFilter): number[] | undefined {
  if (yearFrom === undefined || yearTo === undefined) return undefined;
  const first = Math.trunc(yearFrom / 10);
  const count = Math.trunc(yearTo / 10) - first + 1;
  // A range of many decades narrows little, and an index condition of many values costs more.
  return count <= 20 ? Array.from({ length: Math.max(count, 0) }, (_, at) => first + at)
    : undefined;
}

/** Which of the reports hold which of the words for the actor, as `report-id words`. */
export async function findFittingWords(
  trx: Transaction, reportIds: readonly string[], texts: readonly string[],
): Promise<Set<string>> {
  const asked = [...new Set(texts)];
  if (!asked.length || !reportIds.length) return new Set();
  const { rows } = await trx.raw(
    `select s.report_id || ' ' || asked.text as fitting
       from unnest(?::text[], ?::boolean[]) as asked (text, has_words)
       join visible_report_search s on s.report_id = any (?::uuid[])
        and (not asked.has_words or s.words @@ search_query(asked.text))`,
    [asked, asked.map(hasWords), [...reportIds]]);
  return new Set(rows.map((row: { fitting: string }) => row.fitting));
}

/** True where the filter narrows anything, other than by the facet `except`. */
export function narrows(filter: WatchFilter, except?: FacetName): boolean {
  return hasWords(filter.text ?? '') || filter.yearFrom !== undefined
    || filter.yearTo !== undefined
    || facetNames.some((name) => name !== except && (filter[name]?.length ?? 0) > 0);
}

/** Text of nothing but punctuation has no words and narrows nothing. */
export function hasWords(text: string): boolean {
  return /[\p{L}\p{N}]/u.test(text);
}

const newestFirst = [{ column: 's.published_at', order: 'desc' },
  { column: 's.report_id', order: 'desc' }];

function visibleReports(trx: Transaction): Knex.QueryBuilder {
  return trx.from({ s: 'visible_report_search' });
}

export interface PlacedCard {
  readonly card: ReportCard;
  /** The place of the card in the list, for paging by key. */
  readonly cursor: SearchCursor;
}

/** A page of cards, the newest publication first. */
export async function listCards(trx: Transaction, filter: WatchFilter, page: {
  readonly after?: SearchCursor | undefined; readonly limit: number;
}): Promise<PlacedCard[]> {
  const wanted = applyFilter(visibleReports(trx).select('s.report_id'), filter)
    .orderBy(newestFirst).limit(page.limit);
  if (page.after) {
    void wanted.whereRaw('(s.published_at, s.report_id) < (?::timestamptz, ?::uuid)',
      [page.after.publishedAt, page.after.reportId]);
  }
  // What a card shows is read for the page alone: joined to all the hits it took most of the time.
  return toPlacedCards(await selectCards(trx).withMaterialized('page', wanted)
    .join('page', 'page.report_id', 's.report_id').orderBy(newestFirst));
}

/** The cards of reports that have just been found, the newest publication first. */
export async function listFoundCards(
  trx: Transaction, reportIds: readonly string[],
): Promise<PlacedCard[]> {
  return toPlacedCards(await selectCards(trx).whereIn('s.report_id', reportIds)
    .orderBy(newestFirst));
}

function toPlacedCards(
  rows: readonly (CardRow & { readonly cursor_at: string })[],
): PlacedCard[] {
  return rows.map((row) => ({
    card: toCard(row), cursor: { publishedAt: row.cursor_at, reportId: row.report_id },
  }));
}

/** The card of one report that the actor may read, by its number. */
export async function findCard(trx: Transaction, number: string): Promise<ReportCard | undefined> {
  const row: CardRow | undefined = await selectCards(trx).where('s.number', number).first();
  return row && toCard(row);
}

function selectCards(trx: Transaction): Knex.QueryBuilder {
  return visibleReports(trx).select(...cardColumns,
    // With microseconds, which a Date would lose, and rows between them with it.
    trx.raw(`to_char(s.published_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"')
      as cursor_at`));
}

/** How many reports the filter finds for the actor. */
export async function countReports(trx: Transaction, filter: WatchFilter): Promise<number> {
  const row = await applyFilter(visibleReports(trx), filter).count({ count: '*' }).first();
  return Number(row?.['count'] ?? 0);
}

interface CountRow {
  readonly facet: FacetName | 'total' | 'page';
  readonly value: string | null;
  readonly count: number;
}

/**
 * The total, the counts of every facet among the hits and the first page of them, in one statement
 * that finds them once.
 */
export async function countHits(
  trx: Transaction, filter: WatchFilter, pageLimit: number,
): Promise<SearchTotals & { readonly firstPage: readonly string[] }> {
  const hits = applyFilter(visibleReports(trx).select('s.report_id', 's.published_at',
    's.coin_type_slug', 's.metal', 's.kind', 's.channel', 's.country', 's.confidence', 's.tells'),
  filter);
  const { rows }: { rows: CountRow[] } = await trx.raw(
    `with hit as materialized (?)
     select case when grouping(s.coin_type_slug) = 0 then 'coinType'
         when grouping(s.metal) = 0 then 'metal' when grouping(s.kind) = 0 then 'kind'
         when grouping(s.channel) = 0 then 'channel' when grouping(s.country) = 0 then 'country'
         when grouping(s.confidence) = 0 then 'confidence' else 'total' end as facet,
       coalesce(s.coin_type_slug, s.metal, s.kind, s.channel, s.country, s.confidence) as value,
       count(*) as count
     from hit s group by grouping sets ((s.coin_type_slug), (s.metal), (s.kind), (s.channel),
       (s.country), (s.confidence), ())
     union all
     select 'tell', t.tell, count(*) from hit s cross join unnest(s.tells) as t (tell)
      group by t.tell
     union all
     select 'page', p.report_id::text, 1 from (select report_id from hit
       order by published_at desc, report_id desc limit ?) p`, [hits, pageLimit]);
  const countsOf = (facet: FacetName): FacetCount[] =>
    byFrequency(rows.filter((row) => row.facet === facet));
  return {
    count: rows.find((row) => row.facet === 'total')?.count ?? 0,
    firstPage: rows.flatMap(({ facet, value }) => facet === 'page' && value ? [value] : []),
    facets: {
      coinType: countsOf('coinType'), metal: countsOf('metal'), kind: countsOf('kind'),
      tell: countsOf('tell'), channel: countsOf('channel'), country: countsOf('country'),
      confidence: countsOf('confidence'),
    },
  };
}

/** Counts of one facet among what the filter finds, its own selection left aside. */
export async function countFacet(
  trx: Transaction, filter: WatchFilter, name: FacetName,
): Promise<readonly FacetCount[]> {
  const value = name === 'tell' ? 't.tell' : columnOf[name];
  const query = applyFilter(visibleReports(trx), filter, name);
  if (name === 'tell') void query.joinRaw('cross join unnest(s.tells) as t (tell)');
  return byFrequency(await query.select(`${value} as value`).count({ count: '*' })
    .groupBy(value));
}

function byFrequency(
  rows: readonly { readonly value: string | null; readonly count: number }[],
): FacetCount[] {
  return rows.flatMap(({ value, count }) => value === null ? [] : [{ value, count }])
    .sort((a, b) => b.count - a.count || (a.value < b.value ? -1 : 1));
}
