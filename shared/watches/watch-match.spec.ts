import { describe, expect, it } from 'vitest';
import { matchReasons, type ReportFacts } from './watch-match';

const facts: ReportFacts = {
  coinType: ['quillhaven-crown'], metal: ['silver'], kind: ['coin'],
  tell: ['edge-seam', 'rounded-pits'], channel: ['coin_show'], country: ['NO'],
  confidence: ['probable'], year: 1887,
};

describe('matchReasons', () => {
  it('takes values of one facet as alternatives and names the one that fits', () => {
    expect(matchReasons({ metal: ['gold', 'silver'] }, facts, false))
      .toEqual([{ kind: 'metal', value: 'silver' }]);
  });
  it('adds facets up', () => {
    expect(matchReasons({ metal: ['silver'], channel: ['auction'] }, facts, false)).toBeUndefined();
    expect(matchReasons({ metal: ['silver'], tell: ['edge-seam'] }, facts, false)).toHaveLength(2);
  });
  it('asks that the words fit', () => {
    expect(matchReasons({ text: 'crown' }, facts, false)).toBeUndefined();
    expect(matchReasons({ text: 'crown' }, facts, true))
      .toEqual([{ kind: 'text', value: 'crown' }]);
  });
  it('keeps years inclusive and refuses an unknown one', () => {
    expect(matchReasons({ yearFrom: 1887, yearTo: 1887 }, facts, false))
      .toEqual([{ kind: 'year', value: '1887' }]);
    expect(matchReasons({ yearTo: 1886 }, facts, false)).toBeUndefined();
    expect(matchReasons({ yearTo: 1900 }, { ...facts, year: null }, false)).toBeUndefined();
  });
  it('fits everything where nothing is asked', () => {
    expect(matchReasons({}, facts, false)).toEqual([{ kind: 'all', value: '' }]);
  });
});
