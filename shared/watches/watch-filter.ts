import { facetNames, type FacetName } from '../reports/report-view';

/**
 * Any search of published reports, exact: it holds after words were mended. Values of one facet
 * are alternatives, facets add up.
 */
export interface WatchFilter extends Readonly<Partial<Record<FacetName, readonly string[]>>> {
  readonly text?: string;
  /** Years presented, inclusive. */
  readonly yearFrom?: number;
  readonly yearTo?: number;
}

export const watchFilterFormat = 1;

/** The filter as it stands in an address: `text=…&metal=silver&metal=gold&yearTo=1900`. */
export function filterToQuery(filter: WatchFilter): Record<string, string | readonly string[]> {
  const query: Record<string, string | readonly string[]> = {};
  if (filter.text) query['text'] = filter.text;
  for (const name of facetNames) {
    const values = filter[name];
    if (values?.length) query[name] = values;
  }
  if (filter.yearFrom !== undefined) query['yearFrom'] = String(filter.yearFrom);
  if (filter.yearTo !== undefined) query['yearTo'] = String(filter.yearTo);
  return query;
}

export const cadences = ['at_once', 'daily', 'weekly'] as const;
export type Cadence = (typeof cadences)[number];

export interface WatchView {
  readonly id: string;
  readonly name: string;
  readonly filter: WatchFilter;
  readonly cadence: Cadence;
  readonly createdAt: string;
  readonly pausedUntil: string | null;
  /** When the next mail may leave, in UTC; null for `at_once` or paused. */
  readonly nextDigestAt: string | null;
}

/** `PUT /api/watches/:id` (id made by the client: safe to repeat). */
export interface WatchSave {
  readonly name: string;
  readonly filter: WatchFilter;
  readonly cadence: Cadence;
  readonly pausedUntil?: string | null;
}

/** Why a report was matched: each is one facet, word or year of the filter that it fits. */
export interface MatchReason {
  readonly kind: FacetName | 'text' | 'year' | 'all';
  readonly value: string;
}
