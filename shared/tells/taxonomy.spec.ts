import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { disclosures } from '../access/audience';
import { genuineFeaturesNamed, narrowerDisclosure, suggestMethods } from './taxonomy';

const pits = { id: 'rounded-pits', methods: ['cast'] };
const mushy = { id: 'mushy-detail', methods: ['cast', 'transfer-die'] };
const burr = { id: 'edge-burr', methods: ['cast', 'cut-die', 'transfer-die'] };
const teeth = { id: 'wrong-denticles', methods: ['cut-die'] };

describe('suggestMethods', () => {
  it('names what speaks for and against each method, the best supported first', () => {
    expect(suggestMethods([pits, mushy, teeth])).toEqual([
      { methodId: 'cast', speakFor: ['rounded-pits', 'mushy-detail'],
        speakAgainst: ['wrong-denticles'] },
      { methodId: 'cut-die', speakFor: ['wrong-denticles'],
        speakAgainst: ['rounded-pits', 'mushy-detail'] },
      { methodId: 'transfer-die', speakFor: ['mushy-detail'],
        speakAgainst: ['rounded-pits', 'wrong-denticles'] },
    ]);
  });

  it('counts a tell once, however often it was pinned', () => {
    expect(suggestMethods([teeth, teeth, pits, mushy])[0]?.methodId).toBe('cast');
  });

  it('suggests nothing from nothing', () => {
    expect(suggestMethods([])).toEqual([]);
  });

  it('puts every tell on one side of every method', () => {
    fc.assert(fc.property(fc.subarray([pits, mushy, burr, teeth]), (tells) => {
      for (const { speakFor, speakAgainst } of suggestMethods(tells)) {
        expect([...speakFor, ...speakAgainst].sort())
          .toEqual(tells.map(({ id }) => id).sort());
        expect(speakFor.length).toBeGreaterThan(0);
      }
    }));
  });
});

describe('genuineFeaturesNamed', () => {
  const features = [{ id: 'die-crack' }, { id: 'wear' }, { id: 'clash-marks' }];
  it.each([['A die crack runs to the rim', ['die-crack']],
    ['Die-cracks, wear', ['die-crack', 'wear']],
    ['clash marks behind the head', ['clash-marks']], ['swear words', []], ['', []],
  ])('%j', (note, ids) => {
    expect(genuineFeaturesNamed(note, features).map(({ id }) => id)).toEqual(ids);
  });
});

it('lets nobody widen the disclosure of a tell', () => {
  expect(narrowerDisclosure('public', 'clubs')).toBe('clubs');
  expect(narrowerDisclosure('moderators', 'public')).toBe('moderators');
  for (const each of disclosures) expect(narrowerDisclosure(each, each)).toBe(each);
});
