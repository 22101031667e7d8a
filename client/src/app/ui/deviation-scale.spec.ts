import { deviationScale } from './deviation-scale';

describe('deviationScale', () => {
  it('holds every figure with a margin and says the ticks without rounding dirt', () => {
    const scale = deviationScale([16.7, 16.9, 16.05, 16.11]);
    expect(scale.from).toBeLessThan(16.05);
    expect(scale.to).toBeGreaterThan(16.9);
    expect(scale.ticks).toEqual([16, 16.2, 16.4, 16.6, 16.8, 17]);
  });

  it.each([[[37.9, 38.3]], [[0.1, 0.1004]], [[1000, 31103]], [[8, 8]], [[0, 0]]])(
    'draws three to eight ticks inside the span of %j',
    (figures) => {
      const { from, to, ticks } = deviationScale(figures);
      expect(ticks.length).toBeGreaterThanOrEqual(3);
      expect(ticks.length).toBeLessThanOrEqual(8);
      for (const tick of ticks) {
        expect(tick).toBeGreaterThanOrEqual(from - 1e-9);
        expect(tick).toBeLessThanOrEqual(to + 1e-9);
      }
    },
  );
});
