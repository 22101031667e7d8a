import type { Transaction } from '../db/database';
import { countFacets, type SearchTotals } from './report-search-queries';

/** Embargoes end without an event, so totals are never older than this. */
const longestMilliseconds = 60_000;
const audiencesKept = 500;

interface Kept {
  readonly changedAt: string;
  readonly madeAt: number;
  readonly totals: Promise<SearchTotals>;
}

export interface UnfilteredTotals {
  /** Totals of everything that the actor may read. */
  get(trx: Transaction): Promise<SearchTotals>;
}

/**
 * Counting everything costs the same for each reader of one audience, so it is done once, and
 * anew when a publication has changed what there is to count.
 */
export function createUnfilteredTotals(now: () => number): UnfilteredTotals {
  const kept = new Map<string, Kept>();
  return {
    async get(trx) {
      const { rows: [{ audience, changed_at: changedAt }] } = await trx.raw(
        'select audience, changed_at from search_audience()');
      const known = kept.get(audience);
      if (known && known.changedAt === changedAt && now() - known.madeAt < longestMilliseconds) {
        return known.totals;
      }
      const totals = countFacets(trx, {});
      kept.delete(audience);
      kept.set(audience, { changedAt, madeAt: now(), totals });
      totals.catch(() => kept.delete(audience));
      const oldest = kept.keys().next().value;
      if (kept.size > audiencesKept && oldest !== undefined) kept.delete(oldest);
      return totals;
    },
  };
}
