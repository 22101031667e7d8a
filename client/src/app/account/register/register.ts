import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { RouterLink } from '@angular/router';

import { problemOf } from '../../http/api-failure';
import { markFieldProblems } from '../../http/form-problems';
import { problemWords } from '../../http/problem-words';
import { FieldError } from '../../ui/field-error';
import { PageHeader } from '../../ui/page-header';
import { AccountApi } from '../account-api';

/** Asks for an account as subscriber; the password is set by the link that is mailed. */
@Component({
  selector: 'tn-register',
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
  templateUrl: './register.html',
  styleUrl: '../account-form.scss',
})
export class Register {
  private readonly api = inject(AccountApi);

  protected readonly form = inject(NonNullableFormBuilder).group({
    displayName: ['', [Validators.required, Validators.maxLength(120)]],
    email: ['', [Validators.required, Validators.email]],
  });
  protected readonly state = signal<'asking' | 'busy' | 'mailed'>('asking');
  protected readonly problem = signal('');

  protected requestAccount(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.state() === 'busy') return;
    this.state.set('busy');
    this.problem.set('');
    const { email, displayName } = this.form.getRawValue();
    this.api.register(email, displayName).subscribe({
      next: () => this.state.set('mailed'),
      error: (error: unknown) => {
        const problem = problemOf(error);
        markFieldProblems(this.form, problem);
        this.state.set('asking');
        this.problem.set(problemWords(problem));
      },
    });
  }
}
