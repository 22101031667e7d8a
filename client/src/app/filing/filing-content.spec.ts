import { describe, expect, it } from 'vitest';

import { contentOfDraft, draftOf, emptyContent, missingIn, reportOf,
  speaksOfPaperMoney } from './filing-content';
import { filingContent } from './filing-factory';

describe('missingIn', () => {
  it('asks for photos, what it is presented as, where and when, and for nothing else', () => {
    expect(missingIn(emptyContent('larkmoor')).map(({ code }) => code))
      .toEqual(['presentedAs', 'photos', 'channel', 'country', 'surfacedOn']);
    expect(missingIn(filingContent())).toEqual([]);
  });
  it('takes a description in place of a coin type', () => {
    const { presentedAs } = emptyContent('larkmoor');
    const described = { ...presentedAs, description: 'Ferry token, brass' };
    expect(missingIn(filingContent({ presentedAs: described }))).toEqual([]);
  });
  it('asks for the currency of a price, for clubs to be named, for the obverse', () => {
    const { surfacing, photos } = filingContent();
    expect(missingIn(filingContent({
      surfacing: { ...surfacing, price: 12 },
      audience: 'named_clubs',
      photos: photos.map((photo) => ({ ...photo, side: 'detail' })),
    })).map(({ code }) => code)).toEqual(['obverse', 'currency', 'namedClubs']);
  });
});

describe('speaksOfPaperMoney', () => {
  it.each(['a banknote of 1914', 'Bank note', 'ten-dollar bill', '5 pound note', 'PAPER MONEY'])(
    'knows %j', (words) => expect(speaksOfPaperMoney(words)).toBe(true));
  it.each(['Medal of William “Bill” Marsh', 'bar with a bank’s stamp', 'crown, noted by many', ''])(
    'lets %j pass', (words) => expect(speaksOfPaperMoney(words)).toBe(false));
});

it('gives back from a draft what was put into it', () => {
  expect(contentOfDraft(draftOf(filingContent()), 'another-club')).toEqual(filingContent());
  expect(contentOfDraft({}, 'larkmoor')).toEqual(emptyContent('larkmoor'));
});

it('sends no clubs and no currency that were chosen before and not needed any more', () => {
  const { surfacing } = filingContent();
  const report = reportOf(filingContent({
    namedClubs: ['saltmarsh'], surfacing: { ...surfacing, currency: 'EUR' } }));
  expect(report.namedClubs).toEqual([]);
  expect(report.surfacing.currency).toBeNull();
});
