import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { checkCharacter, formatReportNumber, parseReportNumber, permuteSequence,
  reportNumberFor } from './report-number';

/** A stand-in for a keyed hash: mixes well enough to test with. */
const keyed = (key: number) => (round: number, half: number) => {
  let mixed = Math.imul(half + 1, 0x9e3779b1) ^ Math.imul(round + key, 0x85ebca6b);
  mixed = Math.imul(mixed ^ (mixed >>> 15), 0xc2b2ae35);
  return (mixed ^ (mixed >>> 13)) >>> 0;
};
const serials = fc.integer({ min: 0, max: 99_999 }).map((serial) =>
  String(serial).padStart(5, '0'));
const numbers = fc.tuple(fc.integer({ min: 2020, max: 2099 }), serials)
  .map(([year, serial]) => formatReportNumber(year, serial));

describe('parseReportNumber', () => {
  it('reads its own numbers, however they are typed', () => {
    fc.assert(fc.property(numbers, (number) => {
      for (const typed of [number, number.toLowerCase(), number.replaceAll('-', ''),
        number.replaceAll('-', ' '), ` ${number.replaceAll('-', '–')} `]) {
        expect(parseReportNumber(typed)).toEqual({ number });
      }
    }));
  });

  it('notices any one wrong character', () => {
    fc.assert(fc.property(numbers, fc.nat(), fc.nat({ max: 9 }), (number, at, digit) => {
      const places = [3, 4, 6, 7, 8, 9, 10];
      const place = places[at % places.length] ?? 3;
      fc.pre(number.charAt(place) !== String(digit));
      const mistyped = number.slice(0, place) + String(digit) + number.slice(place + 1);
      expect(parseReportNumber(mistyped)).toEqual({ problem: 'wrong_check_character' });
    }));
  });

  it('notices nearly every swap of two neighbours, which is what a hybrid system promises', () => {
    let swaps = 0;
    let missed = 0;
    for (let serial = 0; serial < 100_000; serial += 7) {
      const number = formatReportNumber(2026, String(serial).padStart(5, '0'));
      for (const at of [6, 7, 8, 9]) {
        const [a, b] = [number.charAt(at), number.charAt(at + 1)];
        if (a === b) continue;
        swaps += 1;
        const swapped = number.slice(0, at) + b + a + number.slice(at + 2);
        if (parseReportNumber(swapped).number) missed += 1;
      }
    }
    expect(swaps).toBeGreaterThan(50_000);
    expect(missed / swaps).toBeLessThan(0.01);
  });

  it('tells a letter for a digit instead of mending it, and nothing of what is right', () => {
    expect(parseReportNumber('TN-26-OOO42-3')).toEqual({ problem: 'letter_for_digit' });
    expect(parseReportNumber('TN-26-0004L-3')).toEqual({ problem: 'letter_for_digit' });
  });

  it.each([['TN-26-00042', 'wrong_length'], ['TN-26-0000042-3', 'wrong_length'],
    ['', 'not_a_number'], ['Morgan dollar', 'not_a_number'], ['TN', 'not_a_number'],
    ['1881-S', 'not_a_number'], ['TN-26-00042-3 and more', 'not_a_number'],
  ])('%j: %s', (text, problem) => {
    expect(parseReportNumber(text)).toEqual({ problem });
  });

  it('keeps six digits', () => {
    const number = formatReportNumber(2026, '123456');
    expect(parseReportNumber(number.replaceAll('-', ''))).toEqual({ number });
  });
});

describe('checkCharacter', () => {
  it('refuses what the system has no value for', () => {
    expect(() => checkCharacter('tn26')).toThrow(RangeError);
  });
});

describe('permuteSequence', () => {
  it.each([1, 2, 3, 4])('is one to one on %i digits', (digits) => {
    const size = 10 ** digits;
    const images = new Set(Array.from({ length: size }, (_, each) =>
      permuteSequence(each, digits, keyed(7))));
    expect(images.size).toBe(size);
    expect(Math.max(...images)).toBe(size - 1);
  });

  it('never maps two of five or six digits to one', () => {
    fc.assert(fc.property(fc.integer(), fc.constantFrom(5, 6), fc.nat({ max: 99_999 }),
      fc.nat({ max: 99_999 }), (key, digits, a, b) => {
        fc.pre(a !== b);
        expect(permuteSequence(a, digits, keyed(key)))
          .not.toBe(permuteSequence(b, digits, keyed(key)));
      }));
  });

  it('depends on the key, and scatters neighbours', () => {
    const images = (key: number) => Array.from({ length: 200 }, (_, each) =>
      permuteSequence(each, 5, keyed(key)));
    expect(images(1)).not.toEqual(images(2));
    const steps = images(1).slice(1).map((image, at) =>
      Math.abs(image - (images(1)[at] ?? 0)));
    expect(steps.filter((step) => step < 100).length).toBeLessThan(5);
  });

  it.each([[-1, 5], [100_000, 5], [1.5, 5], [0, 0]])('refuses %d in %d digits', (each, digits) => {
    expect(() => permuteSequence(each, digits, keyed(1))).toThrow(RangeError);
  });
});

describe('reportNumberFor', () => {
  it('goes on with six digits once five are used up', () => {
    expect(reportNumberFor(2026, 99_999, keyed(3))).toMatch(/^TN-26-\d{5}-[0-9A-Z]$/);
    expect(reportNumberFor(2026, 100_000, keyed(3))).toMatch(/^TN-26-\d{6}-[0-9A-Z]$/);
    expect(() => reportNumberFor(2026, 1_100_000, keyed(3))).toThrow(RangeError);
  });
});
