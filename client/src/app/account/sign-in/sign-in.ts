import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Router, RouterLink } from '@angular/router';

import { safeReturnAddress } from '../../auth/return-address';
import { SessionStore } from '../../auth/session-store';
import { problemOf } from '../../http/api-failure';
import { problemWords } from '../../http/problem-words';
import { FieldError } from '../../ui/field-error';
import { PageHeader } from '../../ui/page-header';
import { PasswordField } from '../password-field';

/** Sign-in; goes back to where the reader came from. */
@Component({
  selector: 'tn-sign-in',
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
  templateUrl: './sign-in.html',
  styleUrl: '../account-form.scss',
})
export class SignIn {
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);

  /** The path asked for before, from the address. */
  readonly returnTo = input<string>();

  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', [Validators.required, Validators.email]],
    password: ['', Validators.required],
  });
  protected readonly busy = signal(false);
  protected readonly problem = signal('');

  protected signIn(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.busy()) return;
    this.busy.set(true);
    this.problem.set('');
    this.session.signIn(this.form.getRawValue()).subscribe({
      next: () => void this.router.navigateByUrl(safeReturnAddress(this.returnTo())),
      error: (error: unknown) => {
        this.busy.set(false);
        this.problem.set(problemWords(problemOf(error)));
      },
    });
  }
}
