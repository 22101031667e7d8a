import { ChangeDetectionStrategy, Component, DestroyRef, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { Router, RouterLink } from '@angular/router';

import { problemOf } from '../../http/api-failure';
import { markFieldProblems } from '../../http/form-problems';
import { problemWords } from '../../http/problem-words';
import { FieldError } from '../../ui/field-error';
import { Crumb, PageHeader } from '../../ui/page-header';
import { OWN_TIME_ZONE, knownTimeZones } from '../../ui/time-zone';
import { ClubsApi } from '../clubs-api';

const slugForm = /^[a-z0-9]+(-[a-z0-9]+)*$/;

/** The registrar adds a club; its secretary is invited by mail. */
@Component({
  selector: 'tn-club-new',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    FieldError, MatButton, MatFormFieldModule, MatInput, MatSelectModule, PageHeader,
    ReactiveFormsModule, RouterLink,
  ],
  host: { class: 'tn-page tn-narrow' },
  templateUrl: './club-new.html',
  styleUrl: '../club-form.scss',
})
export class ClubNew {
  private readonly api = inject(ClubsApi);
  private readonly router = inject(Router);
  private readonly destroyed = inject(DestroyRef);

  protected readonly crumbs: readonly Crumb[] = [
    { label: $localize`Clubs`, link: '/clubs' },
    { label: $localize`Add a club` },
  ];
  protected readonly timeZones = knownTimeZones();
  protected readonly form = inject(NonNullableFormBuilder).group({
    name: ['', [Validators.required, Validators.maxLength(120)]],
    slug: ['', [Validators.required, Validators.maxLength(60), Validators.pattern(slugForm)]],
    postalAddress: ['', [Validators.maxLength(300)]],
    timeZone: [inject(OWN_TIME_ZONE), [Validators.required]],
    secretaryEmail: ['', [Validators.required, Validators.email]],
  });
  protected readonly busy = signal(false);
  protected readonly problem = signal('');

  constructor() {
    const { name, slug } = this.form.controls;
    // The address follows the name until it is changed by hand.
    name.valueChanges.pipe(takeUntilDestroyed()).subscribe((text) => {
      if (slug.pristine) slug.setValue(slugOf(text));
    });
  }

  protected addClub(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.busy()) return;
    this.busy.set(true);
    this.problem.set('');
    this.api
      .add(this.form.getRawValue())
      .pipe(takeUntilDestroyed(this.destroyed))
      .subscribe({
        next: ({ slug }) => void this.router.navigate(['/clubs', slug]),
        error: (error: unknown) => {
          const problem = problemOf(error);
          markFieldProblems(this.form, problem);
          this.busy.set(false);
          this.problem.set(problemWords(problem));
        },
      });
  }
}

/** "Münzfreunde am See" → "munzfreunde-am-see". */
export function slugOf(name: string): string {
  return name
    .normalize('NFD')
    .replace(/\p{M}/gu, '')
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, '-')
    .replace(/^-+|-+$/g, '')
    .slice(0, 60)
    .replace(/-+$/, '');
}
