import {
  ChangeDetectionStrategy, Component, DestroyRef, computed, inject, input, output, signal,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { switchMap } from 'rxjs';
import { ClubRole } from '#shared/access/audience';
import { ClubView, InvitationView } from '#shared/accounts/session';

import { problemOf } from '../../http/api-failure';
import { markFieldProblems } from '../../http/form-problems';
import { problemWords } from '../../http/problem-words';
import { FieldError } from '../../ui/field-error';
import { roleWords } from '../../ui/report-words';
import { WhenPipe } from '../../ui/when-pipe';
import { ClubsApi } from '../clubs-api';
import { invitationMailWords } from '../mail-words';
import { RoleChoice } from '../role-choice/role-choice';

const firstRoles: readonly ClubRole[] = ['member'];

/** Open invitations with the state of each one's mail, and the form for a new one. */
@Component({
  selector: 'tn-club-invitations',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    FieldError, MatButton, MatFormFieldModule, MatInput, ReactiveFormsModule, RoleChoice, WhenPipe,
  ],
  templateUrl: './club-invitations.html',
  styleUrls: ['../club-form.scss', './club-invitations.scss'],
})
export class ClubInvitations {
  private readonly api = inject(ClubsApi);
  private readonly destroyed = inject(DestroyRef);

  readonly club = input.required<ClubView>();
  readonly clubChanged = output<ClubView>();

  protected readonly rows = computed(() =>
    this.club().invitations.map((invitation) => ({
      ...invitation,
      rolesText: invitation.roles.map(roleWords).join(', '),
      mailText: invitationMailWords(invitation.mailState),
      failed: ['refused', 'uncertain', 'dropped'].includes(invitation.mailState ?? ''),
    })),
  );
  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', [Validators.required, Validators.email]],
  });
  protected readonly roles = signal(firstRoles);
  protected readonly rolesLegend = $localize`Invited as`;
  protected readonly busy = signal(false);
  protected readonly problem = signal('');
  protected readonly done = signal('');

  protected invite(): void {
    this.form.markAllAsTouched();
    this.done.set('');
    if (!this.roles().length) this.problem.set($localize`Choose one role at least.`);
    if (this.form.invalid || !this.roles().length || this.busy()) return;
    this.start();
    const { email } = this.form.getRawValue();
    this.api
      .invite(this.club().slug, email, this.roles())
      .pipe(takeUntilDestroyed(this.destroyed))
      .subscribe({
        next: (club) => {
          this.form.reset();
          this.roles.set(firstRoles);
          this.finish(club, $localize`The invitation to ${email}:email: is on its way.`);
        },
        error: (error: unknown) => this.fail(error),
      });
  }

  protected withdrawInvitation({ id, email }: InvitationView): void {
    if (this.busy()) return;
    this.start();
    const { slug } = this.club();
    this.api
      .withdrawInvitation(slug, id)
      .pipe(
        switchMap(() => this.api.club(slug)),
        takeUntilDestroyed(this.destroyed),
      )
      .subscribe({
        next: (club) =>
          this.finish(club, $localize`The invitation to ${email}:email: is withdrawn.`),
        error: (error: unknown) => this.fail(error),
      });
  }

  private start(): void {
    this.busy.set(true);
    this.problem.set('');
    this.done.set('');
  }

  private finish(club: ClubView, words: string): void {
    this.busy.set(false);
    this.done.set(words);
    this.clubChanged.emit(club);
  }

  private fail(error: unknown): void {
    const problem = problemOf(error);
    markFieldProblems(this.form, problem);
    this.busy.set(false);
    this.problem.set(problemWords(problem));
  }
}
