import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fineTroyOunces, fromGrams, fromMillimetres, lengthUnits, massUnits, parseLength,
  parseMass, toGrams, toMillimetres } from './units';

describe('conversion', () => {
  it('goes there and back within double precision', () => {
    fc.assert(fc.property(fc.double({ min: 0.001, max: 1e6, noNaN: true }),
      fc.constantFrom(...massUnits), (value, unit) => {
        expect(fromGrams(toGrams(value, unit), unit)).toBeCloseTo(value, 8);
      }));
    fc.assert(fc.property(fc.double({ min: 0.001, max: 1e6, noNaN: true }),
      fc.constantFrom(...lengthUnits), (value, unit) => {
        expect(fromMillimetres(toMillimetres(value, unit), unit)).toBeCloseTo(value, 8);
      }));
  });

  it('does not take 31.103 g at .999 for a full ounce', () => {
    expect(fineTroyOunces(31.103, 0.999)).toBeCloseTo(0.99898, 5);
  });
});

describe('parseMass', () => {
  it.each([
    ['26.7', 26.7, 'g', 0.1], ['26.70 g', 26.7, 'g', 0.01], ['412.5gr', 412.5, 'gr', 0.1],
    ['17,2 dwt', 17.2, 'dwt', 0.1], ['1 oz t', 1, 'oz t', 1], ['1 Troy Oz.', 1, 'oz t', 1],
    ['0,125 oz  t', 0.125, 'oz t', 0.001], ['.5 g', 0.5, 'g', 0.1], ['8 Grains', 8, 'gr', 1],
  ])('reads %j', (text, value, unit, resolution) => {
    expect(parseMass(text, 'g')).toEqual({ quantity: { value, unit, resolution } });
  });

  it.each([
    ['', 'not_a_number'], ['heavy', 'not_a_number'], ['1.2.3 g', 'not_a_number'],
    ['-3 g', 'negative'], ['1 oz', 'unknown_unit'], ['3 stone', 'unknown_unit'],
    ['3 constructor', 'unknown_unit'], ['1,234 g', 'ambiguous'],
  ])('refuses %j: %s', (text, problem) => {
    expect(parseMass(text, 'g')).toEqual({ problem });
  });

  it('reads back what it would print', () => {
    fc.assert(fc.property(fc.integer({ min: 0, max: 1e7 }), fc.constantFrom(...massUnits),
      (thousandths, unit) => {
        const value = thousandths / 1000;
        expect(parseMass(`${value.toFixed(3)} ${unit}`, 'g'))
          .toEqual({ quantity: { value, unit, resolution: 0.001 } });
      }));
  });
});

describe('parseLength', () => {
  it.each([['38.1', 38.1, 'mm'], ['1.205 in', 1.205, 'in'], ['1.5″', 1.5, 'in'],
    ['38.1 Millimeters', 38.1, 'mm']])('reads %j', (text, value, unit) => {
    expect(parseLength(text, 'mm')).toMatchObject({ quantity: { value, unit } });
  });
  it('knows no masses', () => {
    expect(parseLength('3 g', 'mm')).toEqual({ problem: 'unknown_unit' });
  });
});
