import { Injectable, computed, inject, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { map } from 'rxjs';

import { DESK_CLOCK } from './desk-clock';
import { TimedLease } from './review-api';

/** The reader's claim on the open report, and how long it lasts. */
@Injectable()
export class ClaimState {
  private readonly clock = inject(DESK_CLOCK);
  private readonly now = toSignal(this.clock.seconds.pipe(map(() => this.clock.now())), {
    initialValue: this.clock.now(),
  });
  private readonly claim = signal<{ token: string; endsAt: number } | null>(null);
  private readonly lost = signal(false);

  readonly secondsLeft = computed(() => {
    const claim = this.claim();
    return claim ? Math.max(0, Math.round((claim.endsAt - this.now()) / 1000)) : 0;
  });
  readonly isHeld = computed(() => this.secondsLeft() > 0);
  /** Was held and ran out, on this clock or by the server's word. */
  readonly isLost = computed(() => this.lost() || (this.claim() !== null && !this.isHeld()));
  readonly token = computed(() => (this.isHeld() ? (this.claim()?.token ?? null) : null));

  take(lease: TimedLease | null): void {
    this.lost.set(false);
    this.claim.set(
      lease && { token: lease.token, endsAt: this.clock.now() + lease.secondsLeft * 1000 },
    );
  }

  /** The server does not know the claim (any more). */
  lose(): void {
    this.claim.set(null);
    this.lost.set(true);
  }
}
