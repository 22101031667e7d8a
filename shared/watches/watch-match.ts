import { facetNames, type FacetName } from '../reports/report-view';
import type { MatchReason, WatchFilter } from './watch-filter';

/** What a filter is held against: a published report as one reader may know it. */
export interface ReportFacts extends Readonly<Record<FacetName, readonly string[]>> {
  readonly year: number | null;
}

/**
 * Why the report fits the filter, or undefined where it does not. Values of one facet are
 * alternatives, facets add up; an empty filter fits every report. Whether the words fit is asked
 * of the database, whose search this filter was.
 */
export function matchReasons(
  filter: WatchFilter, facts: ReportFacts, wordsFit: boolean,
): readonly MatchReason[] | undefined {
  const reasons: MatchReason[] = [];
  if (filter.text) {
    if (!wordsFit) return undefined;
    reasons.push({ kind: 'text', value: filter.text });
  }
  for (const name of facetNames) {
    const wanted = filter[name];
    if (!wanted?.length) continue;
    const met = wanted.filter((value) => facts[name].includes(value));
    if (!met.length) return undefined;
    reasons.push(...met.map((value) => ({ kind: name, value })));
  }
  if (filter.yearFrom !== undefined || filter.yearTo !== undefined) {
    if (facts.year === null || facts.year < (filter.yearFrom ?? -Infinity)
        || facts.year > (filter.yearTo ?? Infinity)) return undefined;
    reasons.push({ kind: 'year', value: String(facts.year) });
  }
  return reasons.length ? reasons : [{ kind: 'all', value: '' }];
}
