import { channels, confidences, metals, pieceKinds } from '#shared/reports/report-content';
import { FacetName } from '#shared/reports/report-view';
import { Cadence, WatchFilter } from '#shared/watches/watch-filter';

import { countryName } from '../ui/place-pipe';
import { channelWords, confidenceWords, metalWords, pieceKindWords } from '../ui/report-words';

/** Names of what the catalogue calls by slug or id: coin types and tells. */
export type CatalogueNames = ReadonlyMap<string, string>;

export function cadenceWords(value: Cadence): string {
  switch (value) {
    case 'at_once':
      return $localize`at once`;
    case 'daily':
      return $localize`daily`;
    case 'weekly':
      return $localize`weekly`;
  }
}

/** What a watch looks for, part by part, as it is said: "silver or gold", "years to 1900". */
export function filterWords(
  filter: WatchFilter, names: CatalogueNames, locale: string,
): readonly string[] {
  const either = (name: FacetName, say: (value: string) => string): string =>
    orList((filter[name] ?? []).map(say), locale);
  const parts = [
    filter.text ? $localize`the words "${filter.text}:text:"` : '',
    either('coinType', (slug) => names.get(slug) ?? slug),
    either('metal', (value) => known(metals, value, metalWords)),
    either('kind', (value) => known(pieceKinds, value, pieceKindWords)),
    tellWords(either('tell', (id) => names.get(id) ?? id)),
    either('channel', (value) => known(channels, value, channelWords)),
    either('country', (code) => countryName(code, locale)),
    either('confidence', (value) => known(confidences, value, confidenceWords)),
    yearWords(filter),
  ];
  return parts.filter((part) => part);
}

/** The name proposed for a watch: what it looks for, in one line of at most 200 characters. */
export function proposedName(filter: WatchFilter, names: CatalogueNames, locale: string): string {
  const words = filterWords(filter, names, locale).join(', ');
  if (!words) return $localize`Every report`;
  const name = words.charAt(0).toLocaleUpperCase(locale) + words.slice(1);
  return name.length > 200 ? `${name.slice(0, 199)}…` : name;
}

function tellWords(tells: string): string {
  return tells ? $localize`with the tell ${tells}:tells:` : '';
}

function yearWords({ yearFrom, yearTo }: WatchFilter): string {
  if (yearFrom !== undefined && yearTo !== undefined) {
    return yearFrom === yearTo ? $localize`year ${yearFrom}:year:`
      : $localize`years ${yearFrom}:from: to ${yearTo}:to:`;
  }
  if (yearFrom !== undefined) return $localize`years from ${yearFrom}:from:`;
  return yearTo !== undefined ? $localize`years to ${yearTo}:to:` : '';
}

function orList(words: readonly string[], locale: string): string {
  return new Intl.ListFormat(locale, { type: 'disjunction' }).format(words);
}

/** Words for a code of the list; a code that this client does not know stands for itself. */
function known<Code extends string>(
  codes: readonly Code[], value: string, say: (code: Code) => string,
): string {
  const code = codes.find((each) => each === value);
  return code === undefined ? value : say(code);
}
