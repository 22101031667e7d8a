import { describe, expect, it } from 'vitest';
import { nominalDiameterMillimetres, nominalWeightGrams, specificationForYear, standardValues,
  type CoinTypeStandard, type SourcedValue } from './coin-type-standard';

const figure = (value: number, unit: 'g' | 'mm' | '1', sourceKind: SourcedValue['sourceKind'],
  source = 'an act'): SourcedValue => ({ value, unit, source, sourceKind });
const standard: CoinTypeStandard = {
  weight: { nominal: figure(26.72955, 'g', 'statute'),
    tolerance: figure(0.0971984, 'g', 'secondary', 'a manual'),
    leastCurrent: figure(26.5, 'g', 'statute') },
  diameter: { range: { low: 39, high: 41, unit: 'mm', source: 'books', sourceKind: 'memory' } },
  edge: { text: 'reeded', source: 'books', sourceKind: 'secondary' },
  variants: [{ label: '1965-1970, clad', from: 1965, to: 1970,
    weight: { nominal: figure(11.5, 'g', 'memory') } },
  { label: '1971 on', from: 1971, to: null, weight: { nominal: figure(11.34, 'g', 'statute') } }],
  dateTable: null,
  notes: [],
};

describe('standardValues', () => {
  it('gives each value a row with its limits, its source, and the weaker kind of the two', () => {
    expect(standardValues(standard)[0]).toEqual({ quantity: 'weight', nominal: 26.72955,
      low: 26.632352, high: 26.826748, unit: 'g', words: '',
      source: 'an act; limits: a manual', sourceKind: 'secondary', variant: '' });
  });

  it('lists the type first, then its variants by their labels', () => {
    expect(standardValues(standard).map(({ quantity, variant }) => [quantity, variant])).toEqual([
      ['weight', ''], ['least_current_weight', ''], ['diameter', ''], ['edge', ''],
      ['weight', '1965-1970, clad'], ['weight', '1971 on']]);
  });

  it('shows a range without a nominal figure', () => {
    expect(standardValues(standard)[2])
      .toMatchObject({ nominal: null, low: 39, high: 41, sourceKind: 'memory' });
  });
});

describe('specificationForYear', () => {
  it.each([[1964, 26.72955], [1965, 11.5], [1970, 11.5], [1971, 11.34], [2030, 11.34],
    [null, 26.72955]])('in %s the weight is %s g', (year, grams) => {
    const specification = specificationForYear(standard, year);
    expect(specification.weight?.nominal?.value).toBe(grams);
    expect(specification.edge?.text).toBe('reeded');
  });
});

it('takes the middle of a range for the diameter that pins are measured by', () => {
  expect(nominalDiameterMillimetres(standard)).toBe(40);
  expect(nominalWeightGrams(standard)).toBe(26.72955);
  expect(nominalWeightGrams({ variants: [], dateTable: null, notes: [] })).toBeNull();
});
