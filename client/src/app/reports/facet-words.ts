import { FacetName } from '#shared/reports/report-view';
import {
  Channel,
  Confidence,
  Metal,
  PieceKind,
  channels,
  confidences,
  metals,
  pieceKinds,
} from '#shared/reports/report-content';

import { countryName } from '../ui/place-pipe';
import { channelWords, confidenceWords, metalWords, pieceKindWords } from '../ui/report-words';

/** Names that only the catalogue knows: of coin types by slug, of tells by id. */
export interface CatalogueNames {
  readonly coinTypes: ReadonlyMap<string, string>;
  readonly tells: ReadonlyMap<string, string>;
}

export const noNames: CatalogueNames = { coinTypes: new Map(), tells: new Map() };

export function facetHeading(name: FacetName): string {
  switch (name) {
    case 'coinType':
      return $localize`Coin type`;
    case 'metal':
      return $localize`Metal`;
    case 'kind':
      return $localize`Kind of piece`;
    case 'tell':
      return $localize`Tell`;
    case 'channel':
      return $localize`Where it surfaced`;
    case 'country':
      return $localize`Country`;
    case 'confidence':
      return $localize`Confidence`;
  }
}

/** A value of a facet in words; a code that is not known stands as it is. */
export function facetValueWords(
  name: FacetName,
  value: string,
  names: CatalogueNames,
  locale: string,
): string {
  switch (name) {
    case 'coinType':
      return names.coinTypes.get(value) ?? value.replaceAll('-', ' ');
    case 'tell':
      return names.tells.get(value) ?? value.replaceAll('-', ' ');
    case 'metal':
      return isOneOf<Metal>(metals, value) ? metalWords(value) : value;
    case 'kind':
      return isOneOf<PieceKind>(pieceKinds, value) ? pieceKindWords(value) : value;
    case 'channel':
      return isOneOf<Channel>(channels, value) ? channelWords(value) : value;
    case 'country':
      return countryName(value, locale);
    case 'confidence':
      return isOneOf<Confidence>(confidences, value) ? confidenceWords(value) : value;
  }
}

function isOneOf<Code extends string>(codes: readonly Code[], value: string): value is Code {
  return (codes as readonly string[]).includes(value);
}
