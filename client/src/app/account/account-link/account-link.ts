import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Router, RouterLink } from '@angular/router';
import { combineLatest, startWith, Subject, switchMap, tap } from 'rxjs';
import { AccountLinkUse, AccountLinkView } from '#shared/accounts/session';

import { SessionStore } from '../../auth/session-store';
import { problemOf } from '../../http/api-failure';
import { markFieldProblems } from '../../http/form-problems';
import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { FieldError } from '../../ui/field-error';
import { PageHeader } from '../../ui/page-header';
import { roleWords } from '../../ui/report-words';
import { StateMessage } from '../../ui/state-message';
import { OWN_TIME_ZONE } from '../../ui/time-zone';
import { AccountApi } from '../account-api';
import { PasswordField, newPasswordRules } from '../password-field';

/**
 * What a mailed (or printed, for the first registrar) link leads to: a new password, an
 * invitation, a new account. Asks only for what the link's kind still needs.
 */
@Component({
  selector: 'tn-account-link',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    FieldError,
    MatButton,
    MatFormFieldModule,
    MatInput,
    PageHeader,
    PasswordField,
    ReactiveFormsModule,
    RouterLink,
    StateMessage,
  ],
  host: { class: 'tn-page tn-narrow' },
  templateUrl: './account-link.html',
  styleUrl: '../account-form.scss',
})
export class AccountLink {
  private readonly api = inject(AccountApi);
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);
  private readonly timeZone = inject(OWN_TIME_ZONE);
  private readonly reload = new Subject<void>();

  /** From the address. */
  readonly token = input.required<string>();

  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', [Validators.required, Validators.email]],
    displayName: ['', [Validators.required, Validators.maxLength(120)]],
    password: ['', [Validators.required, newPasswordRules]],
  });
  protected readonly link = toSignal(
    combineLatest([toObservable(this.token), this.reload.pipe(startWith(undefined))]).pipe(
      switchMap(([token]) => loadState(this.api.readLink(token))),
      tap((link) => {
        if (link.state === 'ready') this.askFor(link.data);
      }),
    ),
    { initialValue: { state: 'loading' } satisfies LoadState<AccountLinkView> },
  );
  protected readonly loadProblem = computed(() => {
    const link = this.link();
    return link.state === 'failed' ? link.problem : null;
  });
  protected readonly loadProblemText = computed(() => {
    const problem = this.loadProblem();
    return problem ? problemWords(problem) : '';
  });
  protected readonly heading = computed(() => {
    const link = this.link();
    return link.state === 'ready' ? headingOf(link.data) : $localize`Your link`;
  });
  protected readonly busy = signal(false);
  protected readonly problem = signal('');

  protected roleList(link: AccountLinkView): string {
    return link.roles.map(roleWords).join(', ');
  }

  protected useLink(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.busy()) return;
    this.busy.set(true);
    this.problem.set('');
    this.api.useLink(this.token(), this.answers()).subscribe({
      next: (view) => {
        // An invitation for an account that is there already signs nobody in.
        if (view.person) this.session.keep(view);
        void this.router.navigateByUrl(view.person || this.session.isSignedIn() ? '/' : '/sign-in');
      },
      error: (error: unknown) => {
        const problem = problemOf(error);
        markFieldProblems(this.form, problem);
        this.busy.set(false);
        this.problem.set(problemWords(problem));
      },
    });
  }

  protected loadAgain(): void {
    this.reload.next();
  }

  /** A group with every control switched off gives all their values: hence one by one. */
  private answers(): AccountLinkUse {
    const { email, displayName, password } = this.form.controls;
    return {
      ...(email.enabled ? { email: email.value } : {}),
      ...(displayName.enabled ? { displayName: displayName.value } : {}),
      ...(password.enabled ? { password: password.value } : {}),
      timeZone: this.timeZone,
    };
  }

  /** Controls that this link does not need are switched off, and so neither checked nor sent. */
  private askFor(link: AccountLinkView): void {
    const { email, displayName, password } = this.form.controls;
    email[link.email === null ? 'enable' : 'disable']();
    const named = link.kind === 'reset' || link.kind === 'registration' || !link.needsPassword;
    displayName[named ? 'disable' : 'enable']();
    password[link.needsPassword ? 'enable' : 'disable']();
  }
}

function headingOf(link: AccountLinkView): string {
  switch (link.kind) {
    case 'reset':
      return $localize`Set a new password`;
    case 'registration':
      return $localize`Set your password`;
    case 'first_registrar':
      return $localize`Set up the registry`;
    case 'invitation':
      return link.club
        ? $localize`Invitation of ${link.club.name}:club:`
        : $localize`Your invitation`;
  }
}
