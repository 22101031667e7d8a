import { facetNames } from '#shared/reports/report-view';
import { WatchFilter } from '#shared/watches/watch-filter';

import { CatalogueNames, facetHeading, facetValueWords } from '../facet-words';
import { withFacet, without } from '../search-address';

/** One part of the search, to be taken away by itself. */
export interface ActiveFilter {
  readonly key: string;
  readonly heading: string;
  readonly label: string;
  readonly without: WatchFilter;
}

/** Every part of a search in words, with the search that is left without it. */
export function activeFilters(
  filter: WatchFilter,
  names: CatalogueNames,
  locale: string,
): readonly ActiveFilter[] {
  const words: ActiveFilter[] = filter.text
    ? [{
        key: 'text',
        heading: $localize`Words`,
        label: $localize`“${filter.text}:words:”`,
        without: without(filter, 'text'),
      }]
    : [];
  const facets = facetNames.flatMap((name) =>
    (filter[name] ?? []).map((value) => ({
      key: `${name}=${value}`,
      heading: facetHeading(name),
      label: facetValueWords(name, value, names, locale),
      without: withFacet(filter, name, value, false),
    })),
  );
  return [...words, ...facets, ...years(filter)];
}

function years(filter: WatchFilter): readonly ActiveFilter[] {
  const { yearFrom, yearTo } = filter;
  const heading = $localize`Year on the piece`;
  return [
    ...(yearFrom === undefined ? [] : [{
      key: 'yearFrom', heading, label: $localize`from ${yearFrom}:year:`,
      without: without(filter, 'yearFrom'),
    }]),
    ...(yearTo === undefined ? [] : [{
      key: 'yearTo', heading, label: $localize`to ${yearTo}:year:`,
      without: without(filter, 'yearTo'),
    }]),
  ];
}
