import type { ReportSearchAnswer } from '#shared/reports/report-view';
import { parseReportNumber } from '#shared/reports/report-number';
import type { WatchFilter } from '#shared/watches/watch-filter';
import type { Transaction } from '../db/database';
import { InvalidInput } from '../errors';
import { findCard, listCards, listFoundCards, type FacetCounts } from './report-search-queries';
import { filterOf, readCursor, writeCursor, type SearchQuery } from './report-search-schemas';
import { mendText } from './search-words-queries';
import type { KeptTotals } from './search-totals';

/** Hits are counted up to here; the screen says "10,000+" above. */
export const countedAtMost = 10_000;

const noFacets = (): FacetCounts => ({ coinType: [], metal: [], kind: [], tell: [], channel: [],
  country: [], confidence: [] });

const nothing: ReportSearchAnswer = {
  items: [], next: null, total: { count: 0, more: false }, facets: noFacets(), mended: null,
  number: null, numberMistyped: false,
};

export type ReportSearchService = ReturnType<typeof createReportSearchService>;

export function createReportSearchService(kept: KeptTotals) {
  return {
    /** Numbers first, then words and filters; a slip of spelling is mended where nothing fits. */
    async search(trx: Transaction, query: SearchQuery): Promise<ReportSearchAnswer> {
      const { number, problem } = parseReportNumber(query.text ?? '');
      if (number !== undefined) return byNumber(trx, number);
      if (problem !== 'not_a_number') return { ...nothing, numberMistyped: true };
      const filter = filterOf(query);
      const found = await searchPage(trx, filter, query);
      if (found.items.length || query.after || query.exact || !filter.text) return found;
      const to = await mendText(trx, filter.text);
      if (to === undefined) return found;
      const mended = await searchPage(trx, { ...filter, text: to }, query);
      return { ...mended, mended: { from: filter.text, to } };
    },
  };

  async function searchPage(
    trx: Transaction, filter: WatchFilter, query: SearchQuery,
  ): Promise<ReportSearchAnswer> {
    const after = query.after === undefined ? undefined : readCursor(query.after);
    if (query.after !== undefined && !after) {
      throw new InvalidInput([{ field: 'after', code: 'invalid' }]);
    }
    const limit = query.limit + 1;
    const totals = after ? undefined : await kept.get(trx, filter, limit);
    const found = totals?.firstPage ? await listFoundCards(trx, totals.firstPage)
      : await listCards(trx, filter, { after, limit });
    const page = found.slice(0, query.limit);
    const last = page.at(-1);
    const count = after?.count ?? totals?.count ?? 0;
    return {
      ...nothing,
      items: page.map(({ card }) => card),
      next: found.length > query.limit && last ? writeCursor({ ...last.cursor, count })
        : null,
      total: { count: Math.min(count, countedAtMost), more: count > countedAtMost },
      facets: totals?.facets ?? null,
    };
  }
}

/** A whole number: its card, and where to go. A retracted report has a page but no card. */
async function byNumber(trx: Transaction, number: string): Promise<ReportSearchAnswer> {
  const card = await findCard(trx, number);
  const readable = await trx('report').select('number').where({ number })
    .whereNotNull('published_version').first();
  return {
    ...nothing, items: card ? [card] : [], total: { count: card ? 1 : 0, more: false },
    number: readable ? number : null,
  };
}
