import { ChangeDetectionStrategy, Component, input, signal } from '@angular/core';
import {
  AbstractControl,
  FormControl,
  ReactiveFormsModule,
  ValidationErrors,
} from '@angular/forms';
import { MatIconButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { passwordProblem } from '#shared/access/password-rules';

import { FieldError } from '../ui/field-error';
import { Icon } from '../ui/icon';

/** The rules of a new password, as the server holds them. */
export function newPasswordRules(control: AbstractControl): ValidationErrors | null {
  const value: unknown = control.value;
  if (typeof value !== 'string' || value === '') return null;
  const problem = passwordProblem(value);
  return problem ? { [problem]: true } : null;
}

/** A password, hidden until asked; pasting and password keepers work as everywhere. */
@Component({
  selector: 'tn-password-field',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [FieldError, Icon, MatFormFieldModule, MatIconButton, MatInput, ReactiveFormsModule],
  template: `
    <mat-form-field class="tn-field">
      <mat-label>{{ label() }}</mat-label>
      <input
        matInput
        [type]="shown() ? 'text' : 'password'"
        [formControl]="control()"
        [attr.autocomplete]="kind() === 'new' ? 'new-password' : 'current-password'"
        autocapitalize="none"
        spellcheck="false"
        required
      />
      <button
        matIconButton
        matSuffix
        type="button"
        [attr.aria-pressed]="shown()"
        i18n-aria-label
        aria-label="Show the password"
        (click)="toggleShown()"
      >
        <tn-icon [name]="shown() ? 'hidden' : 'eye'" />
      </button>
      @if (kind() === 'new') {
        <mat-hint i18n>Twelve characters or more. Four unrelated words do well.</mat-hint>
      }
      <mat-error><tn-field-error [control]="control()" /></mat-error>
    </mat-form-field>
  `,
  styles: `
    button tn-icon {
      display: flex;
    }
  `,
})
export class PasswordField {
  readonly control = input.required<FormControl<string>>();
  readonly label = input.required<string>();
  readonly kind = input<'current' | 'new'>('current');

  protected readonly shown = signal(false);

  protected toggleShown(): void {
    this.shown.update((shown) => !shown);
  }
}
