import { describe, expect, it } from 'vitest';
import { countSlips, foldWord, nearestWord } from './spelling';

describe('slips between words', () => {
  it.each([
    ['morgan', 'morgan', 0], ['mrogan', 'morgan', 1], ['morgn', 'morgan', 1],
    ['morgann', 'morgan', 1], ['margan', 'morgan', 1], ['', 'abc', 3], ['kitten', 'sitting', 3],
  ])('%s and %s: %i', (a, b, slips) => {
    expect(countSlips(a, b)).toBe(slips);
    expect(countSlips(b, a)).toBe(slips);
  });

  it('mend to the nearest candidate, and short words not at all', () => {
    expect(nearestWord('Sovereing', ['sovereign', 'foreign'])).toBe('sovereign');
    expect(nearestWord('cat', ['car'])).toBeUndefined();
    expect(nearestWord('penny', ['ferry'])).toBeUndefined();
    expect(nearestWord('thaler', ['dollar'])).toBeUndefined();
  });

  it('leave case and accents aside', () => {
    expect(foldWord('Brückenzoll')).toBe('bruckenzoll');
  });
});
