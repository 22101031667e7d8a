import {
  ChangeDetectionStrategy, Component, DestroyRef, OnInit, inject, input, output, signal,
} from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { ClubView } from '#shared/accounts/session';

import { problemOf } from '../../http/api-failure';
import { markFieldProblems } from '../../http/form-problems';
import { problemWords } from '../../http/problem-words';
import { FieldError } from '../../ui/field-error';
import { knownTimeZones } from '../../ui/time-zone';
import { ClubsApi } from '../clubs-api';

/** Name, postal address and time zone of a club, for those who run it. */
@Component({
  selector: 'tn-club-details',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    FieldError, MatButton, MatFormFieldModule, MatInput, MatSelectModule, ReactiveFormsModule,
  ],
  templateUrl: './club-details.html',
  styleUrl: '../club-form.scss',
})
export class ClubDetails implements OnInit {
  private readonly api = inject(ClubsApi);
  private readonly destroyed = inject(DestroyRef);

  readonly club = input.required<ClubView>();
  readonly clubChanged = output<ClubView>();

  protected readonly timeZones = knownTimeZones();
  protected readonly form = inject(NonNullableFormBuilder).group({
    name: ['', [Validators.required, Validators.maxLength(120)]],
    postalAddress: ['', [Validators.maxLength(300)]],
    timeZone: ['', [Validators.required]],
  });
  protected readonly busy = signal(false);
  protected readonly problem = signal('');
  protected readonly done = signal('');

  ngOnInit(): void {
    const { name, postalAddress, timeZone } = this.club();
    this.form.setValue({ name, postalAddress, timeZone });
  }

  protected saveDetails(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.busy()) return;
    this.busy.set(true);
    this.problem.set('');
    this.done.set('');
    this.api
      .change(this.club().slug, this.form.getRawValue())
      .pipe(takeUntilDestroyed(this.destroyed))
      .subscribe({
        next: (club) => {
          this.busy.set(false);
          this.done.set($localize`Saved.`);
          this.clubChanged.emit(club);
        },
        error: (error: unknown) => {
          const problem = problemOf(error);
          markFieldProblems(this.form, problem);
          this.busy.set(false);
          this.problem.set(problemWords(problem));
        },
      });
  }
}
