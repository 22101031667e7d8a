/**
 * NIST Handbook 44, Specifications, Tolerances, and Other Technical Requirements for Weighing and
 * Measuring Devices, appendix C, section 4: the exact values (underlined there). The figures were
 * confirmed in secondary sources; the page of the handbook itself is cited from memory.
 */
import { describe, expect, it } from 'vitest';
import { fineTroyOunces, toGrams, toMillimetres } from '#shared/metrology/units';

describe('NIST Handbook 44, appendix C: exact values', () => {
  it('grain: 64.79891 mg exactly', () => {
    expect(toGrams(1, 'gr')).toBe(0.06479891);
  });
  it('troy ounce: 480 grains, 31.1034768 g exactly', () => {
    expect(toGrams(1, 'oz t')).toBe(31.1034768);
    expect(toGrams(480, 'gr')).toBeCloseTo(31.1034768, 12);
  });
  it('pennyweight: 24 grains, 1.55517384 g exactly; 20 to the troy ounce', () => {
    expect(toGrams(1, 'dwt')).toBe(1.55517384);
    expect(toGrams(24, 'gr')).toBeCloseTo(1.55517384, 12);
    expect(toGrams(20, 'dwt')).toBeCloseTo(31.1034768, 12);
  });
  it('avoirdupois pound: 7000 grains, 453.59237 g exactly', () => {
    expect(toGrams(7000, 'gr')).toBeCloseTo(453.59237, 11);
  });
  it('inch: 25.4 mm exactly', () => {
    expect(toMillimetres(1, 'in')).toBe(25.4);
  });
});

describe('fine weights that follow from the statutes (arithmetic on the values above)', () => {
  it.each([
    ['silver dollar: 412.5 gr at 0.900', toGrams(412.5, 'gr'), 0.9, 0.7734375, 7],
    ['dime: 2.5 g at 0.900', 2.5, 0.9, 0.07234, 5],
    ['double eagle: 516 gr at 0.900', toGrams(516, 'gr'), 0.9, 0.9675, 5],
    ['sovereign: 7.98805 g at 0.91666', 7.98805, 0.91666, 0.23542, 5],
    ['31.103 g at 0.999: not a full ounce', 31.103, 0.999, 0.99898, 5],
  ])('%s', (_, grams, fineness, ounces, places) => {
    expect(fineTroyOunces(grams, fineness)).toBeCloseTo(ounces, places);
  });
});
