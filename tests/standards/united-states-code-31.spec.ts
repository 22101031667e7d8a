/** 31 U.S.C. 5112 (denominations, specifications and design of coins) and 5113 (tolerances). */
import { describe, expect, it } from 'vitest';
import { fineTroyOunces } from '#shared/metrology/units';
import { specificationOf, standardOf } from './catalogue-type';

describe('31 U.S.C. 5112(a): gold coins', () => {
  it.each([
    ['us-gold-bullion-50', 33.931, 32.7, 1, '(7)'],
    ['us-gold-bullion-25', 16.966, 27, 0.5, '(8)'],
    ['us-gold-bullion-10', 8.483, 22, 0.25, '(9)'],
    ['us-gold-bullion-5', 3.393, 16.5, 0.1, '(10)'],
  ])('%s: %d g, %d mm, %d troy ounce fine, paragraph %s', (slug, grams, millimetres, ounces) => {
    const { weight, diameter, fineness } = standardOf(slug);
    expect(weight?.nominal).toMatchObject({ value: grams, sourceKind: 'statute' });
    expect(diameter?.nominal).toMatchObject({ value: millimetres, sourceKind: 'statute' });
    expect(fineTroyOunces(grams, fineness?.nominal?.value ?? 0)).toBeCloseTo(ounces, 4);
  });
});

describe('31 U.S.C. 5112(a)(2): half dollar', () => {
  it('1.205 inches, 11.34 grams', () => {
    expect(standardOf('us-half-kennedy').diameter?.nominal?.value).toBeCloseTo(30.607, 6);
    expect(specificationOf('us-half-kennedy', 1990).weight?.nominal?.value).toBe(11.34);
  });
});

describe('31 U.S.C. 5112(e): silver coin of one ounce', () => {
  it('31.103 g, .999 fine; seen in a secondary source only, and said so', () => {
    const { weight, fineness, diameter } = standardOf('us-silver-bullion-1oz');
    expect(weight?.nominal).toMatchObject({ value: 31.103, sourceKind: 'secondary' });
    expect(fineness?.nominal).toMatchObject({ value: 0.999, sourceKind: 'secondary' });
    // 40.6 mm comes from memory.
    expect(diameter?.nominal).toMatchObject({ value: 40.6, sourceKind: 'memory' });
  });
});

describe('31 U.S.C. 5113(a): one-cent coin', () => {
  it('0.13 g restates the two grains of 1873 (Historical and Revision Notes)', () => {
    expect(standardOf('us-cent-lincoln-wheat').weight?.tolerance?.value).toBeCloseTo(0.13, 2);
  });
});
