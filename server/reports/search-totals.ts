import { facetNames, type FacetCount, type FacetName } from '#shared/reports/report-view';
import { filterToQuery, type WatchFilter } from '#shared/watches/watch-filter';
import type { Transaction } from '../db/database';
import { countFacet, countHits, narrows, type SearchTotals } from './report-search-queries';

/** Embargoes end without an event, so totals are never older than this. */
const longestMilliseconds = 60_000;
const countsKept = 2_000;
/** Values shown for one facet, the most frequent ones; one that is selected stays, however rare. */
const valuesPerFacet = 60;

export interface FoundTotals extends SearchTotals {
  readonly firstPage: readonly string[] | undefined;
}

export interface KeptTotals {
  /**
   * The total and the counts of each facet for what the filter finds for the actor. A facet's own
   * selection does not narrow its own counts. Where the hits had to be found for it, the first
   * of them come along, up to `pageLimit`.
   */
  get(trx: Transaction, filter: WatchFilter, pageLimit: number): Promise<FoundTotals>;
}

interface Kept {
  readonly changedAt: string;
  readonly madeAt: number;
  readonly counts: Promise<SearchTotals>;
}

/**
 * Counting is the dear part of a search and comes out the same for each reader of one audience. So
 * it is done once for an audience and a filter, and anew when a publication has changed what there
 * is to count.
 */
export function createKeptTotals(now: () => number): KeptTotals {
  const kept = new Map<string, Kept>();

  return {
    async get(trx, filter, pageLimit) {
      let firstPage: readonly string[] | undefined;
      const { rows: [{ audience, changed_at: changedAt }] } = await trx.raw(
        'select audience, changed_at from search_audience()');
      const find = (what: string, wanted: WatchFilter, count: () => Promise<SearchTotals>) => {
        const key = `${audience}|${what}|${JSON.stringify(filterToQuery(wanted))}`;
        const known = kept.get(key);
        return known && known.changedAt === changedAt
          && now() - known.madeAt < longestMilliseconds
          ? known.counts : keep(key, changedAt, count());
      };
      const countsOf = async (name: FacetName): Promise<readonly FacetCount[]> => {
        const others: WatchFilter = { ...filter, [name]: undefined };
        const { facets } = narrows(others)
          ? await find(name, others, async () => ({ count: 0, facets: { ...noCounts,
            [name]: await countFacet(trx, others, name) } }))
          : await find('hits', {}, () => countHits(trx, {}, 0));
        return facets[name];
      };
      const hits = await find('hits', filter, async () => {
        const { firstPage: found, ...totals } = await countHits(trx, filter, pageLimit);
        firstPage = found;
        return totals;
      });
      const facets: Record<FacetName, readonly FacetCount[]> = { ...hits.facets };
      // One after the other: a transaction has one connection.
      for (const name of facetNames) {
        const chosen = filter[name] ?? [];
        if (chosen.length) facets[name] = await countsOf(name);
        facets[name] = facets[name].filter((each, index) =>
          index < valuesPerFacet || chosen.includes(each.value));
      }
      return { count: hits.count, facets, firstPage };
    },
  };

  function keep(
    key: string, changedAt: string, counts: Promise<SearchTotals>,
  ): Promise<SearchTotals> {
    kept.delete(key);
    kept.set(key, { changedAt, madeAt: now(), counts });
    counts.catch(() => kept.delete(key));
    const oldest = kept.keys().next().value;
    if (kept.size > countsKept && oldest !== undefined) kept.delete(oldest);
    return counts;
  }
}

const noCounts: SearchTotals['facets'] = { coinType: [], metal: [], kind: [], tell: [],
  channel: [], country: [], confidence: [] };
