import {
  ChangeDetectionStrategy, Component, computed, effect, inject, input, linkedSignal,
} from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { BehaviorSubject, combineLatest, switchMap } from 'rxjs';
import { ClubView } from '#shared/accounts/session';

import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { Crumb, PageHeader } from '../../ui/page-header';
import { PageTitle } from '../../ui/page-title';
import { StateMessage } from '../../ui/state-message';
import { ClubDetails } from '../club-details/club-details';
import { ClubInvitations } from '../club-invitations/club-invitations';
import { ClubMembers } from '../club-members/club-members';
import { ClubsApi } from '../clubs-api';

/** A club; for its secretary and the registrar with members, roles and invitations. */
@Component({
  selector: 'tn-club-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ClubDetails, ClubInvitations, ClubMembers, PageHeader, StateMessage],
  host: { class: 'tn-page' },
  template: `
    @switch (answer().state) {
      @case ('loading') {
        <tn-page-header i18n-heading heading="Club" [crumbs]="crumbs()" />
        <tn-state-message state="loading" [shapes]="6" />
      }
      @case ('failed') {
        <tn-page-header i18n-heading heading="Club" [crumbs]="crumbs()" />
        <tn-state-message state="error" [message]="problemText()" [problem]="problem()"
          (retried)="loadAgain()" />
      }
    }
    @if (club(); as club) {
      <tn-page-header [heading]="club.name" [crumbs]="crumbs()">
        <p class="tn-meta address">{{ club.postalAddress }}</p>
      </tn-page-header>
      @if (club.mayManage) {
        <div class="columns">
          <div class="tn-stack">
            <tn-club-members class="tn-card" [club]="club" (clubChanged)="showClub($event)" />
            <tn-club-invitations class="tn-card" [club]="club" (clubChanged)="showClub($event)" />
          </div>
          <tn-club-details class="tn-card" [club]="club" (clubChanged)="showClub($event)" />
        </div>
      } @else {
        <p i18n>
          Its secretary looks after members and roles. To file reports in its name, ask the
          secretary for an invitation.
        </p>
      }
    }
  `,
  styles: `
    .address {
      margin: 0;
      white-space: pre-line;
    }
    .columns {
      display: grid;
      grid-template-columns: minmax(0, 1.7fr) minmax(0, 1fr);
      gap: 20px;
      align-items: start;
    }
    @media (max-width: 900px) {
      .columns {
        grid-template-columns: minmax(0, 1fr);
      }
    }
  `,
})
export class ClubPage {
  private readonly api = inject(ClubsApi);
  private readonly pageTitle = inject(PageTitle);
  private readonly reload = new BehaviorSubject<void>(undefined);

  /** From the address. */
  readonly slug = input.required<string>();

  protected readonly answer = toSignal(
    combineLatest([toObservable(this.slug), this.reload]).pipe(
      switchMap(([slug]) => loadState(this.api.club(slug))),
    ),
    { initialValue: { state: 'loading' } satisfies LoadState<ClubView> },
  );
  /** As loaded, and after each change as the server answered it. */
  protected readonly club = linkedSignal<ClubView | null>(() => {
    const answer = this.answer();
    return answer.state === 'ready' ? answer.data : null;
  });
  protected readonly problem = computed(() => {
    const answer = this.answer();
    return answer.state === 'failed' ? answer.problem : null;
  });
  protected readonly problemText = computed(() => {
    const problem = this.problem();
    return problem ? problemWords(problem) : '';
  });
  protected readonly crumbs = computed<readonly Crumb[]>(() => [
    { label: $localize`Clubs`, link: '/clubs' },
    { label: this.club()?.name ?? this.slug() },
  ]);

  constructor() {
    effect(() => {
      const club = this.club();
      if (club) this.pageTitle.nameScreen(club.name);
    });
  }

  protected showClub(club: ClubView): void {
    this.club.set(club);
  }

  protected loadAgain(): void {
    this.reload.next();
  }
}
