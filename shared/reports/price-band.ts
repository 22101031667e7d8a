const steps = [1, 2, 5] as const;

/**
 * The band in which a price is shown outside the reporter's club: from one of 1, 2, 5 times a
 * power of ten to the next. A price below 1 is in the band from 0 to 1.
 */
export function priceBand(price: number): { readonly low: number; readonly high: number } {
  if (price < 1) return { low: 0, high: 1 };
  const power = 10 ** Math.floor(Math.log10(price));
  const bounds = [...steps.map((step) => step * power), 10 * power];
  const high = bounds.find((bound) => bound > price) ?? 10 * power;
  return { low: bounds[bounds.indexOf(high) - 1] ?? power, high };
}
