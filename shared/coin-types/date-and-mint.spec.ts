import { describe, expect, it } from 'vitest';
import type { DateTable } from './coin-type-standard';
import { countStruckPairs, findDateAndMint } from './date-and-mint';

const issue = (year: number, mintMark: string,
  state: 'struck' | 'never_struck' | 'none_released' | 'few_known' | 'proof_only' = 'struck',
  knownCount: number | null = null) =>
  ({ year, mintMark, state, knownCount, note: `${year}${mintMark}`, source: 'made for the test' });
const table: DateTable = { complete: true, through: 1920, anyMintMark: false,
  source: 'a table', sourceKind: 'secondary' };
const issues = [issue(1900, ''), issue(1900, 'D'), issue(1901, 'D'),
  issue(1902, '', 'few_known', 4), issue(1903, '', 'none_released', 0),
  issue(1904, 'S', 'proof_only'),
  issue(1905, '', 'never_struck'), issue(1906, 'P')];

describe('findDateAndMint', () => {
  it.each([
    [1900, '', 'struck'], [1900, 'D', 'struck'], [1900, ' d ', 'struck'], [1900, 'P', 'struck'],
    [1900, 'CC', 'never_struck'], [1901, '', 'never_struck'], [1901, 'P', 'never_struck'],
    [1902, '', 'none_or_few'], [1903, '', 'none_or_few'], [1904, 'S', 'struck'],
    [1905, '', 'never_struck'], [1906, 'P', 'struck'], [1906, '', 'never_struck'],
    [1910, '', 'never_struck'], [1921, '', 'not_in_table'],
  ] as const)('%i with mint mark %j: %s', (year, mintMark, answer) => {
    expect(findDateAndMint(issues, table, year, mintMark).answer).toBe(answer);
  });

  it('judges the date alone where no mint mark was said', () => {
    expect(findDateAndMint(issues, table, 1901, null))
      .toMatchObject({ answer: 'struck', mintCompared: false });
    expect(findDateAndMint(issues, table, 1910, null).answer).toBe('never_struck');
  });

  it('takes any mint mark where the table does not tell mints apart', () => {
    expect(findDateAndMint(issues, { ...table, anyMintMark: true }, 1900, 'W'))
      .toMatchObject({ answer: 'struck', mintCompared: false });
  });

  it('says nothing without a table, or beyond an incomplete one', () => {
    expect(findDateAndMint([], null, 1900, '').answer).toBe('not_in_table');
    expect(findDateAndMint(issues, { ...table, complete: false }, 1910, '').answer)
      .toBe('not_in_table');
  });

  it('never ends where the type ended for good', () => {
    expect(findDateAndMint(issues, { ...table, through: null }, 1999, '').answer)
      .toBe('never_struck');
  });

  it('gives the count, the note and the source of the row', () => {
    expect(findDateAndMint(issues, table, 1902, '')).toEqual({ answer: 'none_or_few',
      knownCount: 4, proofOnly: false, note: '1902', source: 'made for the test',
      mintCompared: true });
    expect(findDateAndMint(issues, table, 1904, 'S').proofOnly).toBe(true);
  });
});

describe('countStruckPairs', () => {
  it('counts pairs once and leaves out what was never released', () => {
    expect(countStruckPairs([...issues, issue(1900, 'D', 'proof_only')])).toBe(5);
  });
});
