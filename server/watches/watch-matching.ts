import type { WatchFilter } from '#shared/watches/watch-filter';
import { matchReasons, type ReportFacts } from '#shared/watches/watch-match';
import type { Transaction } from '../db/database';
import { hasWords } from '../reports/report-search-queries';

const batch = 2000;

interface WatchRow {
  readonly id: string;
  readonly person_id: string;
  readonly filter: WatchFilter;
  /** Whether the owner reads what the clubs read: of a club, or the registrar. */
  readonly reads_as_club: boolean;
}

/**
 * Makes the alerts of one publication, as the system: each watch is held against the report as its
 * owner may know it, and only readers of the report are alerted. Safe to repeat. Resolves to the
 * number of new alerts.
 */
export async function matchPublication(
  trx: Transaction, reportId: string, publicationId: string,
): Promise<number> {
  const tiers = await readFacts(trx, reportId, publicationId);
  if (!tiers.size) return 0;
  let made = 0;
  let after = '00000000-0000-0000-0000-000000000000';
  for (;;) {
    const watches = await readWatches(trx, reportId, after);
    if (!watches.length) return made;
    made += await alertBatch(trx, reportId, publicationId, watches, tiers);
    after = watches.at(-1)?.id ?? after;
  }
}

async function alertBatch(
  trx: Transaction, reportId: string, publicationId: string, watches: readonly WatchRow[],
  tiers: ReadonlyMap<string, ReportFacts>,
): Promise<number> {
  const fittingWords = await readFittingWords(trx, reportId, watches);
  const matched = watches.flatMap((watch) => {
    const tier = watch.reads_as_club ? 'clubs' : 'public';
    const facts = tiers.get(tier);
    const reasons = facts && matchReasons(watch.filter, facts,
      fittingWords.has(`${tier} ${watch.filter.text ?? ''}`));
    return reasons ? [{ watch, reasons }] : [];
  });
  if (!matched.length) return 0;
  const { rows: readers } = await trx.raw('select readers_of_report(?, ?) as id',
    [reportId, [...new Set(matched.map(({ watch }) => watch.person_id))]]);
  const may = new Set(readers.map((row: { id: string }) => row.id));
  const alerts = matched.filter(({ watch }) => may.has(watch.person_id));
  if (!alerts.length) return 0;
  const inserted = await trx('alert').insert(alerts.map(({ watch, reasons }) => ({
    watch_id: watch.id, person_id: watch.person_id, report_id: reportId,
    publication_id: publicationId, reasons: JSON.stringify(reasons),
  }))).onConflict(['watch_id', 'report_id']).ignore().returning('id');
  return inserted.length;
}

/** The report by tier; empty where this publication no longer stands. */
async function readFacts(
  trx: Transaction, reportId: string, publicationId: string,
): Promise<Map<string, ReportFacts>> {
  const rows = await trx('visible_report_search').select('tier', 'coin_type_slug', 'metal', 'kind',
    'tells', 'channel', 'country', 'confidence', 'year')
    .where({ report_id: reportId, publication_id: publicationId });
  return new Map(rows.map((row) => [row.tier, {
    coinType: row.coin_type_slug ? [row.coin_type_slug] : [],
    metal: row.metal ? [row.metal] : [], kind: [row.kind], tell: row.tells,
    channel: [row.channel], country: [row.country], confidence: [row.confidence],
    year: row.year,
  }]));
}

/** Live watches, in order of id; the reporter is not told of their own report. */
function readWatches(trx: Transaction, reportId: string, after: string): Promise<WatchRow[]> {
  return trx('watch').join('person', 'person.id', 'watch.person_id')
    .select('watch.id', 'watch.person_id', 'watch.filter',
      trx.raw(`person.is_registrar or exists (select from membership m
        join club c on c.id = m.club_id and c.closed_at is null
        where m.person_id = watch.person_id and m.during @> now()) as reads_as_club`))
    .whereNull('watch.deleted_at').where('watch.id', '>', after)
    .whereRaw('(watch.paused_until is null or watch.paused_until <= now())')
    .whereRaw('watch.person_id <> (select r.author_id from report r where r.id = ?)', [reportId])
    .orderBy('watch.id').limit(batch);
}

async function readFittingWords(
  trx: Transaction, reportId: string, watches: readonly WatchRow[],
): Promise<Set<string>> {
  const texts = [...new Set(watches.flatMap(({ filter }) => filter.text ? [filter.text] : []))];
  if (!texts.length) return new Set();
  // What has no words narrows no search, so it narrows no watch.
  const wordless = texts.filter((text) => !hasWords(text));
  const { rows } = await trx.raw(
    `select s.tier || ' ' || asked.text as fitting
       from unnest(?::text[]) as asked (text)
       join visible_report_search s on s.report_id = ? and s.words @@ search_query(asked.text)`,
    [texts, reportId]);
  return new Set([...rows.map((row: { fitting: string }) => row.fitting),
    ...wordless.flatMap((text) => [`clubs ${text}`, `public ${text}`])]);
}
