import { SourceKind } from '#shared/catalogue/coin-type-view';
import { Quantity, quantities } from '#shared/reports/report-content';

import { quantityWords } from '../ui/measurement-words';

/** What a row of a standard states, in words. */
export function standardQuantityWords(quantity: string): string {
  if (isMeasured(quantity)) return quantityWords(quantity);
  switch (quantity) {
    case 'fineness':
      return $localize`fineness`;
    case 'composition':
      return $localize`composition`;
    case 'edge':
      return $localize`edge`;
    case 'least_current_weight':
    case 'least_current':
      return $localize`least current weight`;
    case 'fine_weight':
      return $localize`fine metal`;
    case 'mint_mark_place':
      return $localize`place of the mint mark`;
    default:
      return quantity.replaceAll('_', ' ');
  }
}

/** Where a value comes from: how far it may be trusted. */
export function sourceKindWords(kind: SourceKind): string {
  switch (kind) {
    case 'statute':
      return $localize`statute`;
    case 'secondary':
      return $localize`secondary source`;
    case 'memory':
      return $localize`from memory, unconfirmed`;
  }
}

function isMeasured(quantity: string): quantity is Quantity {
  return (quantities as readonly string[]).includes(quantity);
}
