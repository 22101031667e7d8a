import { StandardValue } from '#shared/catalogue/coin-type-view';
import { Measurement } from '#shared/reports/report-content';

import { compareWithStandard } from './against-standard';

const weight: StandardValue = {
  quantity: 'weight', nominal: 16.8, low: 16.7, high: 16.9, unit: 'g', words: '', source: 'Act 9',
  sourceKind: 'statute', variant: '',
};

function measured(value: number, changes: Partial<Measurement> = {}): Measurement {
  return { quantity: 'weight', value, unit: 'g', resolution: 0.02, ...changes };
}

function answer(measurement: Measurement, condition: 'little_worn' | 'worn' = 'little_worn') {
  return compareWithStandard(measurement, { standard: [weight] }, condition)?.answer;
}

describe('compareWithStandard', () => {
  it('is within only where the whole interval is', () => {
    expect(answer(measured(16.8))).toBe('within');
    expect(answer(measured(16.705))).toBe('cannot_tell');
  });

  it('is outside above the limits, and below them where nothing was worn off', () => {
    expect(answer(measured(17), 'worn')).toBe('outside');
    expect(answer(measured(16.08))).toBe('outside');
    expect(answer(measured(16.08), 'worn')).toBe('cannot_tell');
  });

  it('reads grains as the standard reads grams', () => {
    const comparison = compareWithStandard(
      measured(260, { unit: 'gr', resolution: 1 }), { standard: [weight] }, 'little_worn');
    expect(comparison?.value).toBeCloseTo(16.8477, 4);
    expect(comparison?.uncertainty).toBeCloseTo(0.0324, 4);
    expect(comparison?.answer).toBe('within');
  });

  it('answers nothing without limits, and cannot tell between two variants', () => {
    expect(answer(measured(20, { quantity: 'diameter', unit: 'mm' }))).toBeUndefined();
    const light = { ...weight, variant: 'from 1910', low: 15, high: 15.2 };
    const both = { standard: [weight, light] };
    expect(compareWithStandard(measured(16.8), both, 'little_worn')?.answer).toBe('cannot_tell');
  });
});
