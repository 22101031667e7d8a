import { TestBed } from '@angular/core/testing';

import { WhenPipe } from './when-pipe';

describe('tnWhen', () => {
  const pipe = (): WhenPipe => TestBed.runInInjectionContext(() => new WhenPipe());

  it('says an instant in the zone asked for', () => {
    const instant = '2026-11-27T23:30:00Z';
    expect(pipe().transform(instant, 'date', 'UTC')).toBe('27 November 2026');
    expect(pipe().transform(instant, 'date', 'Asia/Tokyo')).toBe('28 November 2026');
  });

  it('never moves a day or a month by a zone', () => {
    expect(pipe().transform('2026-11-01', 'date', 'America/Los_Angeles')).toBe('1 November 2026');
    expect(pipe().transform('2026-11', 'date', 'America/Los_Angeles')).toBe('November 2026');
  });

  it.each([
    ['2026-11-30T11:59:30Z', 'now'],
    ['2026-11-30T11:58:59Z', '1 minute ago'],
    ['2026-11-29T11:00:00Z', 'yesterday'],
    ['2026-11-14T12:00:00Z', '2 weeks ago'],
    ['2026-12-01T13:00:00Z', 'tomorrow'],
  ])('says the age of %s as "%s"', (instant, words) => {
    const noon = new Date('2026-11-30T12:00:00Z');
    expect(pipe().transform(instant, 'age', undefined, noon)).toBe(words);
  });

  it('passes nothing through', () => {
    expect(pipe().transform(null)).toBeNull();
  });
});
