export interface PriceBand {
  readonly low: number;
  readonly high: number;
}

/**
 * The band that a price is shown as outside the reporter's club: low ≤ price < high, with bounds
 * at 1, 2.5 and 5 times a power of ten, from 0–1 upwards, in the price's own currency. Throws
 * RangeError for a price that is negative or not finite.
 */
export function priceBand(price: number): PriceBand {
  if (!Number.isFinite(price) || price < 0) throw new RangeError('a price is 0 or more');
  if (price < 1) return { low: 0, high: 1 };
  let decade = 1;
  while (price >= decade * 10) decade *= 10;
  if (price < decade * 2.5) return { low: decade, high: decade * 2.5 };
  if (price < decade * 5) return { low: decade * 2.5, high: decade * 5 };
  return { low: decade * 5, high: decade * 10 };
}
