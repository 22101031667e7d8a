import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import { Observable } from 'rxjs';
import { SignedInPerson } from '#shared/accounts/session';

import { SessionStore } from '../auth/session-store';
import { Icon } from '../ui/icon';
import { ThemePicker } from './theme-picker';

/** The signed-in person's own places, and the ways out. */
@Component({
  selector: 'tn-account-links',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Icon, RouterLink, ThemePicker],
  templateUrl: './account-links.html',
  styleUrl: './account-links.scss',
})
export class AccountLinks {
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);

  readonly person = input.required<SignedInPerson>();

  protected readonly clubs = computed(() =>
    this.person().memberships.flatMap(({ club }) => club ?? []),
  );

  protected signOut(): void {
    this.leave(this.session.signOut());
  }

  protected signOutEverywhere(): void {
    this.leave(this.session.signOutEverywhere());
  }

  private leave(signingOut: Observable<unknown>): void {
    // What is on screen may be for members only: leave it, whatever the answer says.
    const toFront = (): void => void this.router.navigateByUrl('/');
    signingOut.subscribe({ next: toFront, error: toFront });
  }
}
