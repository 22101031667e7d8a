import { ParamMap } from '@angular/router';
import { facetNames } from '#shared/reports/report-view';
import { WatchFilter } from '#shared/watches/watch-filter';

/**
 * The search that an address carries (`?text=…&metal=silver&metal=gold&yearTo=1900`), or null
 * where it carries none. What is no search (the page's key, a slip in a year) is left out.
 */
export function filterFromQuery(query: ParamMap): WatchFilter | null {
  const text = query.get('text')?.trim();
  const facets = facetNames.flatMap((name) => {
    const values = query.getAll(name).filter((value) => value);
    return values.length ? [[name, values] as const] : [];
  });
  const years = (['yearFrom', 'yearTo'] as const).flatMap((name) => {
    const year = query.get(name);
    return year && /^-?\d{1,4}$/.test(year) ? [[name, Number(year)] as const] : [];
  });
  const entries = [...(text ? [['text', text] as const] : []), ...facets, ...years];
  return entries.length ? Object.fromEntries(entries) : null;
}
