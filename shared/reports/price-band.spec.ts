import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { priceBand } from './price-band';

describe('priceBand', () => {
  it.each([[0, 0, 1], [0.99, 0, 1], [1, 1, 2.5], [2.5, 2.5, 5], [9.99, 5, 10], [10, 10, 25],
    [250, 250, 500], [499.99, 250, 500], [500, 500, 1000], [1000, 1000, 2500],
    [1_234_567, 1_000_000, 2_500_000]])('%d lies in %d–%d', (price, low, high) => {
    expect(priceBand(price)).toEqual({ low, high });
  });

  it('holds every price, and says the same for every price in the band', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 1e12, noNaN: true }), (price) => {
      const band = priceBand(price);
      expect(band.low <= price && price < band.high).toBe(true);
      expect(priceBand(band.low)).toEqual(band);
    }));
  });

  it.each([-1, NaN, Infinity])('refuses %d', (price) => {
    expect(() => priceBand(price)).toThrow(RangeError);
  });
});
