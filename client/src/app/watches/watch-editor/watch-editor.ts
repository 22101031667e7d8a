import { ChangeDetectionStrategy, Component, LOCALE_ID, computed, effect, inject, input, output,
  signal, untracked } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatRadioButton, MatRadioGroup } from '@angular/material/radio';
import { RouterLink } from '@angular/router';
import { switchMap } from 'rxjs';
import { ApiProblem } from '#shared/api-problem';
import { Cadence, WatchFilter, WatchSave, cadences,
  filterToQuery } from '#shared/watches/watch-filter';

import { markFieldProblems } from '../../http/form-problems';
import { loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { FieldError } from '../../ui/field-error';
import { CatalogueNamesStore } from '../catalogue-names';
import { cadenceWords, filterWords, proposedName } from '../watch-words';
import { WatchesApi } from '../watches-api';

/** A watch being made or changed: what it looks for in words, its name, how often it mails. */
@Component({
  selector: 'tn-watch-editor',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [FieldError, MatButton, MatFormFieldModule, MatInput, MatRadioButton, MatRadioGroup,
    ReactiveFormsModule, RouterLink],
  templateUrl: './watch-editor.html',
  styleUrl: './watch-editor.scss',
})
export class WatchEditor {
  private readonly api = inject(WatchesApi);
  private readonly catalogue = inject(CatalogueNamesStore);
  private readonly locale = inject(LOCALE_ID);

  readonly filter = input.required<WatchFilter>();
  /** Empty: a name is proposed from what is looked for. */
  readonly name = input('');
  readonly cadence = input<Cadence>('weekly');
  readonly busy = input(false);
  readonly problem = input<ApiProblem | null>(null);

  readonly saved = output<WatchSave>();
  readonly cancelled = output();

  protected readonly form = inject(NonNullableFormBuilder).group({
    name: ['', [Validators.required, Validators.maxLength(200)]],
    cadence: 'weekly' as Cadence,
  });
  protected readonly choices = cadences.map((value) => ({ value, words: cadenceWords(value) }));
  protected readonly parts = computed(() =>
    filterWords(this.filter(), this.catalogue.names(), this.locale));
  protected readonly query = computed(() => filterToQuery(this.filter()));
  protected readonly preview = toSignal(
    toObservable(this.filter).pipe(switchMap((filter) => loadState(this.api.preview(filter)))),
  );
  protected readonly problemText = signal('');

  constructor() {
    effect(() => {
      const name = this.name()
        || proposedName(this.filter(), this.catalogue.names(), this.locale);
      const cadence = this.cadence();
      untracked(() => {
        // Names of the catalogue may come late; what was typed meanwhile stays.
        if (!this.form.controls.name.dirty) this.form.controls.name.setValue(name);
        if (!this.form.controls.cadence.dirty) this.form.controls.cadence.setValue(cadence);
      });
    });
    effect(() => {
      const problem = this.problem();
      if (problem) untracked(() => markFieldProblems(this.form, problem));
      this.problemText.set(problem ? problemWords(problem) : '');
    });
    effect(() => this.catalogue.fetchFor([this.filter()]));
  }

  protected saveWatch(): void {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.busy()) return;
    const { name, cadence } = this.form.getRawValue();
    this.saved.emit({ name: name.trim(), cadence, filter: this.filter() });
  }
}
