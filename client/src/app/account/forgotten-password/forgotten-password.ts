import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormControl, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { RouterLink } from '@angular/router';

import { problemOf } from '../../http/api-failure';
import { problemWords } from '../../http/problem-words';
import { FieldError } from '../../ui/field-error';
import { PageHeader } from '../../ui/page-header';
import { AccountApi } from '../account-api';

/** Asks for a link to set a new password; the answer tells nobody whether the address is known. */
@Component({
  selector: 'tn-forgotten-password',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    FieldError,
    MatButton,
    MatFormFieldModule,
    MatInput,
    PageHeader,
    ReactiveFormsModule,
    RouterLink,
  ],
  host: { class: 'tn-page tn-narrow' },
  templateUrl: './forgotten-password.html',
  styleUrl: '../account-form.scss',
})
export class ForgottenPassword {
  private readonly api = inject(AccountApi);

  protected readonly email = new FormControl('', {
    nonNullable: true,
    validators: [Validators.required, Validators.email],
  });
  protected readonly state = signal<'asking' | 'busy' | 'mailed'>('asking');
  protected readonly problem = signal('');

  protected requestLink(event: Event): void {
    event.preventDefault();
    this.email.markAsTouched();
    if (this.email.invalid || this.state() === 'busy') return;
    this.state.set('busy');
    this.problem.set('');
    this.api.requestPasswordReset(this.email.value).subscribe({
      next: () => this.state.set('mailed'),
      error: (error: unknown) => {
        this.state.set('asking');
        this.problem.set(problemWords(problemOf(error)));
      },
    });
  }
}
