import { facetNames } from '#shared/reports/report-view';
import { filterToQuery, type WatchFilter } from '#shared/watches/watch-filter';
import type { Transaction } from '../db/database';
import { countFacets, narrows, type SearchTotals } from './report-search-queries';

/** Embargoes end without an event, so totals are never older than this. */
const longestMilliseconds = 60_000;
const totalsKept = 1_000;

interface Kept {
  readonly changedAt: string;
  readonly madeAt: number;
  readonly totals: Promise<SearchTotals>;
}

export interface KeptTotals {
  /** The total and the counts of each facet for what the filter finds for the actor. */
  get(trx: Transaction, filter: WatchFilter): Promise<SearchTotals>;
}

/**
 * Counting is the dear part of a search and comes out the same for each reader of one audience. So
 * it is done once for an audience and a filter, and anew when a publication has changed what there
 * is to count.
 */
export function createKeptTotals(now: () => number): KeptTotals {
  const kept = new Map<string, Kept>();

  return {
    async get(trx, filter) {
      const { rows: [{ audience, changed_at: changedAt }] } = await trx.raw(
        'select audience, changed_at from search_audience()');
      const find = (wanted: WatchFilter, count: () => Promise<SearchTotals>) => {
        const key = `${audience}|${JSON.stringify(filterToQuery(wanted))}`;
        const known = kept.get(key);
        return known && known.changedAt === changedAt
          && now() - known.madeAt < longestMilliseconds
          ? known.totals : keep(key, changedAt, count());
      };
      const countAll = (): Promise<SearchTotals> => find({}, () => countFacets(trx, {}));
      if (!narrows(filter)) return countAll();
      const isAlone = facetNames.some((name) => filter[name]?.length && !narrows(filter, name));
      return find(filter, async () =>
        countFacets(trx, filter, isAlone ? await countAll() : undefined));
    },
  };

  function keep(
    key: string, changedAt: string, totals: Promise<SearchTotals>,
  ): Promise<SearchTotals> {
    kept.delete(key);
    kept.set(key, { changedAt, madeAt: now(), totals });
    totals.catch(() => kept.delete(key));
    const oldest = kept.keys().next().value;
    if (kept.size > totalsKept && oldest !== undefined) kept.delete(oldest);
    return totals;
  }
}
