import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { BehaviorSubject, switchMap } from 'rxjs';
import { ClubSummary } from '#shared/accounts/session';

import { SessionStore } from '../../auth/session-store';
import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { PageHeader } from '../../ui/page-header';
import { roleWords } from '../../ui/report-words';
import { StateMessage } from '../../ui/state-message';
import { ClubsApi } from '../clubs-api';

/** The clubs of the registry, one's own first. */
@Component({
  selector: 'tn-club-list',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, PageHeader, RouterLink, StateMessage],
  host: { class: 'tn-page' },
  template: `
    <tn-page-header i18n-heading heading="Clubs">
      <p class="tn-meta" i18n>The clubs that share this registry.</p>
      <div actions class="tn-row">
        @if (isRegistrar()) {
          <a matButton="outlined" routerLink="/registry/mail" i18n>Mail ledger</a>
          <a matButton="filled" routerLink="/clubs/new" i18n>Add a club</a>
        }
      </div>
    </tn-page-header>
    @switch (answer().state) {
      @case ('loading') {
        <tn-state-message state="loading" [shapes]="4" />
      }
      @case ('failed') {
        <tn-state-message state="error" [message]="problemText()" [problem]="problem()"
          (retried)="loadAgain()" />
      }
      @case ('ready') {
        @if (rows().length) {
          <ul class="tn-plain-list tn-card">
            @for (club of rows(); track club.slug) {
              <li>
                <a [routerLink]="['/clubs', club.slug]">{{ club.name }}</a>
                @if (club.myRoles) {
                  <span class="tn-meta" i18n>you: {{ club.myRoles }}</span>
                }
              </li>
            }
          </ul>
        } @else {
          <tn-state-message state="empty" i18n-heading heading="No club yet">
            @if (isRegistrar()) {
              <p i18n>Add the first club; its secretary is invited by mail.</p>
              <a matButton="filled" routerLink="/clubs/new" i18n>Add a club</a>
            } @else {
              <p i18n>The registrar adds clubs. Meanwhile, read what is published.</p>
              <a matButton="filled" routerLink="/reports" i18n>Published reports</a>
            }
          </tn-state-message>
        }
      }
    }
  `,
  styles: `
    .tn-card {
      padding: 6px 22px;
    }
    li {
      display: flex;
      flex-wrap: wrap;
      gap: 4px 20px;
      align-items: baseline;
      justify-content: space-between;
      padding: 13px 0;
    }
    li + li {
      border-top: 1px solid var(--tn-line);
    }
    li a {
      font-weight: 700;
    }
  `,
})
export class ClubList {
  private readonly api = inject(ClubsApi);
  private readonly session = inject(SessionStore);
  private readonly reload = new BehaviorSubject<void>(undefined);

  protected readonly isRegistrar = this.session.isRegistrar;
  protected readonly answer = toSignal(
    this.reload.pipe(switchMap(() => loadState(this.api.clubs()))),
    { initialValue: { state: 'loading' } satisfies LoadState<readonly ClubSummary[]> },
  );
  protected readonly rows = computed(() => {
    const answer = this.answer();
    if (answer.state !== 'ready') return [];
    return answer.data
      .map((club) => ({ ...club, myRoles: this.myRoles(club.slug) }))
      .sort((one, other) => Number(other.myRoles !== '') - Number(one.myRoles !== ''));
  });
  protected readonly problem = computed(() => {
    const answer = this.answer();
    return answer.state === 'failed' ? answer.problem : null;
  });
  protected readonly problemText = computed(() => {
    const problem = this.problem();
    return problem ? problemWords(problem) : '';
  });

  protected loadAgain(): void {
    this.reload.next();
  }

  private myRoles(slug: string): string {
    return (this.session.person()?.memberships ?? [])
      .filter(({ club }) => club?.slug === slug)
      .flatMap(({ roles }) => roles.map(roleWords))
      .join(', ');
  }
}
