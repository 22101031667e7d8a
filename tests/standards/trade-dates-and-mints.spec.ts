/** Facts of the trade on dates and mints: common practice, no source. */
import { describe, expect, it } from 'vitest';
import { lookUp, pairsListed } from './catalogue-type';

const between = (from: number, to: number) =>
  Array.from({ length: to - from + 1 }, (_, each) => from + each);

describe('Morgan dollar', () => {
  const carsonCity = [...between(1878, 1885), ...between(1889, 1893)];
  it('was struck at Carson City in 1878-85 and 1889-93 only, so that 1886-CC cannot be', () => {
    for (const year of between(1870, 1921)) {
      expect([year, lookUp('us-dollar-morgan', year, 'CC').answer])
        .toEqual([year, carsonCity.includes(year) ? 'struck' : 'never_struck']);
    }
  });
  it('of 1895 without a mint mark is not known but in proof: an extraordinary claim', () => {
    expect(lookUp('us-dollar-morgan', 1895, '').answer).toBe('none_or_few');
    expect(lookUp('us-dollar-morgan', 1895, 'P').answer).toBe('none_or_few');
    expect(lookUp('us-dollar-morgan', 1895, 'O').answer).toBe('struck');
  });
  it('says nothing of the collector issues of 2021', () => {
    expect(lookUp('us-dollar-morgan', 2021, '').answer).toBe('not_in_table');
  });
});

describe('Peace dollar', () => {
  it('is dated 1921-28 and 1934-35 only', () => {
    const years = [...between(1921, 1928), 1934, 1935];
    for (const year of between(1915, 1963)) {
      expect([year, lookUp('us-dollar-peace', year, null).answer])
        .toEqual([year, years.includes(year) ? 'struck' : 'never_struck']);
    }
  });
  it('dated 1964 was struck at Denver and all destroyed', () => {
    expect(lookUp('us-dollar-peace', 1964, 'D'))
      .toMatchObject({ answer: 'none_or_few', knownCount: 0 });
    expect(lookUp('us-dollar-peace', 1964, 'S').answer).toBe('never_struck');
  });
});

it('of dollars dated 1804 fifteen are known, none struck in that year', () => {
  expect(lookUp('us-dollar-draped-bust', 1804, ''))
    .toMatchObject({ answer: 'none_or_few', knownCount: 15 });
});

it('no Walking Liberty half is dated 1922, 1924-26 or 1930-32', () => {
  for (const year of [1922, 1924, 1925, 1926, 1930, 1931, 1932]) {
    expect([year, lookUp('us-half-walking', year, null).answer]).toEqual([year, 'never_struck']);
  }
  expect(lookUp('us-half-walking', 1923, 'S').answer).toBe('struck');
});

it('no half dollar is dated 1975', () => {
  for (const mintMark of ['', 'D', 'S', null]) {
    expect(lookUp('us-half-kennedy', 1975, mintMark).answer).toBe('never_struck');
  }
  expect(lookUp('us-half-kennedy', 1976, 'D').answer).toBe('struck');
});

it('a sovereign is not judged by its date, since the list is from memory and has gaps', () => {
  for (const year of [1897, 1911]) {
    expect(lookUp('gb-sovereign', year, '').answer).toBe('not_in_table');
  }
});

describe('pairs of date and mint', () => {
  it.each([['us-dollar-morgan', 96], ['us-dollar-peace', 24], ['us-20-saint', 49],
    ['us-half-walking', 63], ['us-half-franklin', 35], ['us-quarter-standing', 34],
    ['us-dime-mercury', 77]])('%s: %i', (slug, pairs) => {
    expect(pairsListed(slug)).toBe(pairs);
  });
});
