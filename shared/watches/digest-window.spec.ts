import { describe, expect, it } from 'vitest';
import { lastDue, nextDue } from './digest-window';

describe('digest window', () => {
  it('is seven in the morning of the subscriber, before and after the clocks change', () => {
    // Europe/Berlin: UTC+1 in winter, UTC+2 from 29 March 2026 (IANA tz database).
    expect(lastDue('daily', new Date('2026-03-28T12:00:00Z'), 'Europe/Berlin').toISOString())
      .toBe('2026-03-28T06:00:00.000Z');
    expect(lastDue('daily', new Date('2026-03-29T12:00:00Z'), 'Europe/Berlin').toISOString())
      .toBe('2026-03-29T05:00:00.000Z');
    expect(lastDue('daily', new Date('2026-03-29T04:59:59Z'), 'Europe/Berlin').toISOString())
      .toBe('2026-03-28T06:00:00.000Z');
  });

  it('reads the day where the subscriber lives, not in UTC', () => {
    expect(lastDue('daily', new Date('2026-12-01T18:30:00Z'), 'Pacific/Auckland').toISOString())
      .toBe('2026-12-01T18:00:00.000Z');
    expect(lastDue('weekly', new Date('2026-12-01T18:30:00Z'), 'America/Los_Angeles')
      .toISOString()).toBe('2026-11-30T15:00:00.000Z');
  });

  it('has every next moment after every last one', () => {
    const now = new Date('2026-11-30T06:00:00Z');
    expect(nextDue('weekly', now, 'UTC').toISOString()).toBe('2026-11-30T07:00:00.000Z');
    expect(nextDue('weekly', new Date('2026-11-30T07:00:00Z'), 'UTC').toISOString())
      .toBe('2026-12-07T07:00:00.000Z');
    expect(nextDue('daily', now, 'Asia/Kolkata').toISOString()).toBe('2026-12-01T01:30:00.000Z');
    expect(nextDue('at_once', now, 'UTC').toISOString()).toBe('2026-11-30T06:01:00.000Z');
  });
});
