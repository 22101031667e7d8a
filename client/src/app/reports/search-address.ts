import { ParamMap, Params } from '@angular/router';
import { FacetName, facetNames } from '#shared/reports/report-view';
import { WatchFilter, filterToQuery } from '#shared/watches/watch-filter';

/** A search of reports as the address of the list holds it. */
export interface SearchAddress {
  readonly filter: WatchFilter;
  readonly exact: boolean;
  readonly after: string | null;
}

const earliestYear = -1000;
const latestYear = 3000;

/** Reads the address; a year that is none is left out, since addresses are typed by hand too. */
export function searchOfAddress(params: ParamMap): SearchAddress {
  const text = params.get('text')?.trim();
  const yearFrom = yearOf(params.get('yearFrom'));
  const yearTo = yearOf(params.get('yearTo'));
  const facets: Partial<Record<FacetName, readonly string[]>> = {};
  for (const name of facetNames) {
    const values = [...new Set(params.getAll(name).filter((value) => value !== ''))];
    if (values.length) facets[name] = values;
  }
  return {
    filter: {
      ...facets,
      ...(text ? { text } : {}),
      ...(yearFrom === null ? {} : { yearFrom }),
      ...(yearTo === null ? {} : { yearTo }),
    },
    exact: params.get('exact') === '1',
    after: params.get('after'),
  };
}

/** The address of a search from its first page on. */
export function addressOfSearch(filter: WatchFilter, exact = false): Params {
  return { ...filterToQuery(filter), ...(exact ? { exact: '1' } : {}) };
}

/** The same search with one value of a facet chosen, or no longer. */
export function withFacet(
  filter: WatchFilter,
  name: FacetName,
  value: string,
  chosen: boolean,
): WatchFilter {
  const others = (filter[name] ?? []).filter((each) => each !== value);
  return { ...filter, [name]: chosen ? [...others, value] : others };
}

/** The same search without its words or its years. */
export function without(filter: WatchFilter, part: 'text' | 'yearFrom' | 'yearTo'): WatchFilter {
  return { ...filter, [part]: undefined };
}

export function isUnfiltered(filter: WatchFilter): boolean {
  return Object.keys(filterToQuery(filter)).length === 0;
}

function yearOf(text: string | null): number | null {
  if (text === null || !/^-?\d{1,4}$/.test(text)) return null;
  const year = Number(text);
  return year >= earliestYear && year <= latestYear ? year : null;
}
