import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';

import { ClaimState } from '../claim-state';

const lastMinutes = 120;

/** The claim on the open report: take it, see how long it lasts, extend it, let go. */
@Component({
  selector: 'tn-claim-box',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton],
  templateUrl: './claim-box.html',
  styleUrl: './claim-box.scss',
})
export class ClaimBox {
  protected readonly claim = inject(ClaimState);

  readonly heldByOther = input.required<boolean>();
  readonly busy = input(false);

  readonly claimed = output();
  readonly released = output();

  protected readonly left = computed(() => {
    const seconds = this.claim.secondsLeft();
    return `${Math.floor(seconds / 60)}:${String(seconds % 60).padStart(2, '0')}`;
  });
  protected readonly isShort = computed(() => this.claim.secondsLeft() <= lastMinutes);
  /** Spoken twice only: a count-down read out each second would drown everything else. */
  protected readonly spoken = computed(() =>
    this.claim.isHeld() && this.isShort()
      ? $localize`Less than two minutes are left of your claim. Press c to extend it.`
      : '',
  );
}
