import { InjectionToken } from '@angular/core';
import { Observable, interval } from 'rxjs';

export interface DeskClock {
  /** Milliseconds; only differences count. */
  now(): number;
  readonly seconds: Observable<unknown>;
}

/** The clock behind the count-down of a claim; tests turn its hands. */
export const DESK_CLOCK = new InjectionToken<DeskClock>('DESK_CLOCK', {
  providedIn: 'root',
  // Date and not a count of ticks: browsers slow the ticks of a page in the background.
  factory: () => ({ now: () => Date.now(), seconds: interval(1000) }),
});
