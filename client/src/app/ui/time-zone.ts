import { InjectionToken } from '@angular/core';

/** The reader's own IANA time zone, as the browser has it. */
export const OWN_TIME_ZONE = new InjectionToken<string>('OWN_TIME_ZONE', {
  providedIn: 'root',
  factory: () => new Intl.DateTimeFormat().resolvedOptions().timeZone,
});

/** Every time zone the browser knows, in alphabetical order. */
export function knownTimeZones(): readonly string[] {
  // Browsers leave UTC out of their list, though people and clubs may be set to it.
  return [...new Set(['UTC', ...Intl.supportedValuesOf('timeZone')])].sort();
}
