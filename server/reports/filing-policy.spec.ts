import { describe, expect, it } from 'vitest';
import type { ReportContent } from '#shared/reports/report-content';
import { clearMethod, findFilingProblems, type FilingFacts } from './filing-policy';

const now = new Date('2026-06-15T12:00:00Z');
const content: ReportContent = {
  club: 'harbour',
  presentedAs: { coinType: null, kind: 'coin', metal: 'gold', description: 'Harbour ducat',
    year: null, mintMark: '' },
  components: [], pieceCount: 1, condition: 'worn', whereabouts: 'unknown', photos: [], tells: [],
  measurements: [],
  surfacing: { channel: 'shop', surfacedOn: '2026-06', country: 'GB', region: '', town: '',
    venue: '', price: null, currency: null },
  account: '', audience: 'clubs', namedClubs: [], embargoUntil: null,
  photoLicence: 'registry_only', authorNamed: false,
};
const facts: FilingFacts = {
  memberClubs: new Map([['harbour', 'id']]), namedClubs: new Map([['harbour', 'id']]),
  coinType: undefined, photos: new Set(),
  tells: new Map([
    ['bubbles', { disclosure: 'public', methods: ['cast'] }],
    ['seam', { disclosure: 'public', methods: ['cast', 'electrotype'] }],
    ['spikes', { disclosure: 'clubs', methods: ['transfer-die'] }],
  ]),
};
const surfaced = (surfacedOn: string): ReportContent =>
  ({ ...content, surfacing: { ...content.surfacing, surfacedOn } });
const named = (...tellIds: string[]): ReportContent => ({ ...content, tells: tellIds
  .map((tellId) => ({ tellId, note: '', disclosure: 'public', pins: [] })) });

describe('what may be filed', () => {
  it('needs little', () => {
    expect(findFilingProblems(content, facts, now)).toEqual([]);
  });

  it.each([['2026-06-16', []], ['2026-06-17', ['in_the_future']], ['2026-07', ['in_the_future']],
    ['2025-13', ['not_a_date']], ['2025-02-29', ['not_a_date']], ['2024-02-29', []],
    ['1799-01', ['not_a_date']]])('a piece that surfaced on %s: %j', (day, codes) => {
    expect(findFilingProblems(surfaced(day), facts, now).map(({ code }) => code)).toEqual(codes);
  });

  it('holds an embargo of five years and no longer', () => {
    const until = (embargoUntil: string) =>
      findFilingProblems({ ...content, embargoUntil }, facts, now).map(({ code }) => code);
    expect(until('2031-06-15T11:59:59Z')).toEqual([]);
    expect(until('2031-06-15T12:00:01Z')).toEqual(['too_far']);
  });

  it('keeps a pin to the side that its photo shows, save on a detail', () => {
    const photoId = 'ec0b7d0e-2f2f-4a53-9c39-1d8c3d5c7e11';
    const on = (side: 'obverse' | 'reverse' | 'detail'): ReportContent => ({
      ...content,
      photos: [{ photoId, side, circle: null, uprightDegrees: 0, caption: '' }],
      tells: [{ tellId: 'seam', note: '', disclosure: 'clubs', pins: [{ id: 'pin', photoId,
        note: '', place: { side: 'obverse', clockHours: 1, radiusFraction: 0.5 } }] }],
    });
    const known = { ...facts, photos: new Set([photoId]) };
    expect(findFilingProblems(on('obverse'), known, now)).toEqual([]);
    expect(findFilingProblems(on('detail'), known, now)).toEqual([]);
    expect(findFilingProblems(on('reverse'), known, now)).toEqual([
      { field: 'content.tells.0.pins.0.place.side', code: 'other_side' }]);
  });
});

describe('the method', () => {
  it.each([[['bubbles'], 'cast'], [['bubbles', 'seam'], 'cast'], [['seam'], null],
    [['bubbles', 'spikes'], null], [[], null]])('that %j speak for: %s', (tells, method) => {
    expect(clearMethod(named(...tells), facts)).toBe(method);
  });
});
