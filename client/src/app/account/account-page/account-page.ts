import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Router, RouterLink } from '@angular/router';
import { ClubRole } from '#shared/access/audience';

import { SessionStore } from '../../auth/session-store';
import { problemOf } from '../../http/api-failure';
import { markFieldProblems } from '../../http/form-problems';
import { problemWords } from '../../http/problem-words';
import { FieldError } from '../../ui/field-error';
import { PageHeader } from '../../ui/page-header';
import { roleWords } from '../../ui/report-words';
import { knownTimeZones } from '../../ui/time-zone';
import { AccountApi } from '../account-api';
import { PasswordField, newPasswordRules } from '../password-field';

/** Name, time zone, password, clubs, and the ways out. */
@Component({
  selector: 'tn-account-page',
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
  ],
  host: { class: 'tn-page tn-narrow' },
  templateUrl: './account-page.html',
  styleUrl: '../account-form.scss',
})
export class AccountPage {
  private readonly api = inject(AccountApi);
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);
  private readonly builder = inject(NonNullableFormBuilder);

  protected readonly person = this.session.person;
  protected readonly timeZones = knownTimeZones();
  protected readonly details = this.builder.group({
    displayName: [
      this.person()?.displayName ?? '',
      [Validators.required, Validators.maxLength(120)],
    ],
    timeZone: [this.person()?.timeZone ?? 'UTC', Validators.required],
  });
  protected readonly passwords = this.builder.group({
    current: ['', Validators.required],
    password: ['', [Validators.required, newPasswordRules]],
  });
  protected readonly detailsState = signal<SaveState>('open');
  protected readonly detailsProblem = signal('');
  protected readonly passwordState = signal<SaveState>('open');
  protected readonly passwordProblem = signal('');

  protected rolesIn(roles: readonly ClubRole[]): string {
    return roles.map(roleWords).join(', ');
  }

  protected saveDetails(): void {
    this.details.markAllAsTouched();
    if (this.details.invalid || this.detailsState() === 'busy') return;
    this.detailsState.set('busy');
    this.detailsProblem.set('');
    this.api.change(this.details.getRawValue()).subscribe({
      next: (view) => {
        this.session.keep(view);
        this.detailsState.set('saved');
      },
      error: (error: unknown) => {
        const problem = problemOf(error);
        markFieldProblems(this.details, problem);
        this.detailsState.set('open');
        this.detailsProblem.set(problemWords(problem));
      },
    });
  }

  protected changePassword(): void {
    this.passwords.markAllAsTouched();
    if (this.passwords.invalid || this.passwordState() === 'busy') return;
    this.passwordState.set('busy');
    this.passwordProblem.set('');
    const { current, password } = this.passwords.getRawValue();
    this.api.changePassword(current, password).subscribe({
      next: () => {
        this.passwords.reset();
        this.passwordState.set('saved');
      },
      error: (error: unknown) => {
        const problem = problemOf(error);
        markFieldProblems(this.passwords, problem);
        this.passwordState.set('open');
        this.passwordProblem.set(problemWords(problem));
      },
    });
  }

  protected signOutEverywhere(): void {
    const toFront = (): void => void this.router.navigateByUrl('/');
    this.session.signOutEverywhere().subscribe({ next: toFront, error: toFront });
  }
}

type SaveState = 'open' | 'busy' | 'saved';
