import type { Cadence } from './watch-filter';

/** Digests leave at seven in the morning where the subscriber lives; weekly ones on Mondays. */
const digestHour = 7;
const monday = 1;

/**
 * The latest moment at or before `now` at which mail of this cadence is due, as an instant.
 * `at_once` is due every minute.
 */
export function lastDue(cadence: Cadence, now: Date, timeZone: string): Date {
  if (cadence === 'at_once') return new Date(Math.floor(now.getTime() / 60_000) * 60_000);
  for (let daysBack = 0; daysBack <= 8; daysBack++) {
    const due = dueOnDay(now, -daysBack, timeZone);
    if (due <= now && (cadence === 'daily' || weekdayIn(due, timeZone) === monday)) return due;
  }
  throw new RangeError(`no due moment found in ${timeZone}`);
}

/** The next moment after `now` at which mail of this cadence is due. */
export function nextDue(cadence: Cadence, now: Date, timeZone: string): Date {
  if (cadence === 'at_once') return new Date(lastDue(cadence, now, timeZone).getTime() + 60_000);
  for (let days = 0; days <= 8; days++) {
    const due = dueOnDay(now, days, timeZone);
    if (due > now && (cadence === 'daily' || weekdayIn(due, timeZone) === monday)) return due;
  }
  throw new RangeError(`no due moment found in ${timeZone}`);
}

/** Seven o'clock on the local day that lies `days` from the local day of `now`. */
function dueOnDay(now: Date, days: number, timeZone: string): Date {
  const { year, month, day } = localParts(now, timeZone);
  const wall = Date.UTC(year, month - 1, day + days, digestHour);
  // Twice, since the first guess may lie on the other side of a change of the clocks.
  let instant = wall - offsetAt(new Date(wall), timeZone);
  instant = wall - offsetAt(new Date(instant), timeZone);
  return new Date(instant);
}

/** Milliseconds by which the zone's wall clock is ahead of UTC. */
function offsetAt(instant: Date, timeZone: string): number {
  const { year, month, day, hour, minute, second } = localParts(instant, timeZone);
  return Date.UTC(year, month - 1, day, hour, minute, second)
    - Math.floor(instant.getTime() / 1000) * 1000;
}

function weekdayIn(instant: Date, timeZone: string): number {
  const { year, month, day } = localParts(instant, timeZone);
  return new Date(Date.UTC(year, month - 1, day)).getUTCDay();
}

interface LocalParts {
  readonly year: number; readonly month: number; readonly day: number; readonly hour: number;
  readonly minute: number; readonly second: number;
}

function localParts(instant: Date, timeZone: string): LocalParts {
  const parts = new Intl.DateTimeFormat('en-US', { timeZone, hourCycle: 'h23', year: 'numeric',
    month: 'numeric', day: 'numeric', hour: 'numeric', minute: 'numeric', second: 'numeric' })
    .formatToParts(instant);
  const number = (type: string): number => Number(parts.find((part) => part.type === type)?.value);
  return { year: number('year'), month: number('month'), day: number('day'), hour: number('hour'),
    minute: number('minute'), second: number('second') };
}
