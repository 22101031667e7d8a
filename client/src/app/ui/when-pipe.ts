import { LOCALE_ID, Pipe, PipeTransform, inject } from '@angular/core';

export type WhenForm = 'date' | 'date-time' | 'month' | 'age';

/**
 * An instant (ISO 8601), a day (`2026-11-27`) or a month (`2026-11`) in words. `date` and
 * `date-time` in `timeZone` (the reader's own where none is given; days and months have no
 * zone), `age` relative to `now`, in the largest unit that is at least one.
 */
@Pipe({ name: 'tnWhen' })
export class WhenPipe implements PipeTransform {
  private readonly locale = inject(LOCALE_ID);

  transform(value: string, form?: WhenForm, timeZone?: string, now?: Date): string;
  transform(
    value: string | null | undefined, form?: WhenForm, timeZone?: string, now?: Date,
  ): string | null;
  transform(
    value: string | null | undefined,
    form: WhenForm = 'date',
    timeZone?: string,
    now: Date = new Date(),
  ): string | null {
    if (!value) return null;
    if (/^\d{4}-\d{2}$/.test(value)) return this.write(`${value}-01`, 'month', 'UTC');
    if (/^\d{4}-\d{2}-\d{2}$/.test(value)) {
      return this.write(value, form === 'month' ? 'month' : 'date', 'UTC');
    }
    return form === 'age' ? this.age(new Date(value), now) : this.write(value, form, timeZone);
  }

  private write(value: string, form: Exclude<WhenForm, 'age'>, timeZone?: string): string {
    return new Intl.DateTimeFormat(this.locale, {
      year: 'numeric',
      month: 'long',
      ...(form === 'month' ? {} : { day: 'numeric' }),
      ...(form === 'date-time' ? { hour: '2-digit', minute: '2-digit' } : {}),
      timeZone,
    }).format(new Date(value));
  }

  private age(then: Date, now: Date): string {
    const seconds = (then.getTime() - now.getTime()) / 1000;
    const relative = new Intl.RelativeTimeFormat(this.locale, { numeric: 'auto' });
    for (const [unit, length] of unitsLongestFirst) {
      const count = Math.trunc(seconds / length);
      if (count !== 0) return relative.format(count, unit);
    }
    return relative.format(0, 'second');
  }
}

const day = 86_400;
// Mean Gregorian lengths in seconds; an age is rounded down and never needs better.
const unitsLongestFirst: readonly (readonly [Intl.RelativeTimeFormatUnit, number])[] = [
  ['year', 365.2425 * day],
  ['month', 30.436875 * day],
  ['week', 7 * day],
  ['day', day],
  ['hour', 3600],
  ['minute', 60],
];
