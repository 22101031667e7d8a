import {
  ChangeDetectionStrategy, Component, DestroyRef, computed, inject, input, output, signal,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { ClubRole } from '#shared/access/audience';
import { ClubMemberView, ClubView } from '#shared/accounts/session';

import { problemOf } from '../../http/api-failure';
import { problemWords } from '../../http/problem-words';
import { roleWords } from '../../ui/report-words';
import { WhenPipe } from '../../ui/when-pipe';
import { ClubsApi } from '../clubs-api';
import { RoleChoice } from '../role-choice/role-choice';

/** The members with their roles, changed one person at a time. */
@Component({
  selector: 'tn-club-members',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, RoleChoice, WhenPipe],
  templateUrl: './club-members.html',
  styleUrl: './club-members.scss',
})
export class ClubMembers {
  private readonly api = inject(ClubsApi);
  private readonly destroyed = inject(DestroyRef);

  readonly club = input.required<ClubView>();
  readonly clubChanged = output<ClubView>();

  protected readonly rows = computed(() =>
    this.club().members.map((member) => ({
      ...member,
      rolesText: member.roles.map(roleWords).join(', '),
      legend: $localize`Roles of ${member.displayName}:name:`,
    })),
  );
  protected readonly editing = signal<string | null>(null);
  protected readonly chosenRoles = signal<readonly ClubRole[]>([]);
  protected readonly busy = signal(false);
  protected readonly problem = signal('');

  protected editRoles({ personId, roles }: ClubMemberView): void {
    this.problem.set('');
    this.chosenRoles.set(roles);
    this.editing.set(personId);
  }

  protected leaveRoles(): void {
    this.editing.set(null);
  }

  protected saveRoles(personId: string): void {
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set('');
    this.api
      .setRoles(this.club().slug, personId, this.chosenRoles())
      .pipe(takeUntilDestroyed(this.destroyed))
      .subscribe({
        next: (club) => {
          this.busy.set(false);
          this.editing.set(null);
          this.clubChanged.emit(club);
        },
        error: (error: unknown) => {
          this.busy.set(false);
          this.problem.set(problemWords(problemOf(error)));
        },
      });
  }
}
