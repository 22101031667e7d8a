import { ChangeDetectionStrategy, Component, computed, inject, output } from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { catchError, map, of } from 'rxjs';
import { ClubSummary } from '#shared/accounts/session';
import { audiences } from '#shared/access/audience';

import { Caution } from '../../ui/caution';
import { audienceWords } from '../../ui/report-words';
import { DraftStore } from '../draft-store';
import { FilingApi } from '../filing-api';
import { FilingStep, Missing } from '../filing-content';

/** What is missing, who will see it, under which licence; then it can be sent. */
@Component({
  selector: 'tn-send-step',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Caution, MatButton, MatFormFieldModule, MatInput, ReactiveFormsModule],
  templateUrl: './send-step.html',
  styleUrls: ['../step.scss', './send-step.scss'],
})
export class SendStep {
  protected readonly store = inject(DraftStore);
  private readonly start = this.store.content();

  readonly stepChosen = output<FilingStep>();

  protected readonly audiences = audiences;
  protected readonly audienceWords = audienceWords;
  protected readonly clubs = toSignal(
    inject(FilingApi)
      .clubs()
      .pipe(
        map(({ items }) => items.filter(({ slug }) => slug !== this.store.content().club)),
        catchError(() => of([] as readonly ClubSummary[])),
      ),
    { initialValue: [] as readonly ClubSummary[] },
  );
  protected readonly named = computed(() => new Set(this.store.content().namedClubs));

  protected readonly form = inject(NonNullableFormBuilder).group({
    audience: [this.start.audience],
    embargoUntil: [this.start.embargoUntil?.slice(0, 10) ?? ''],
    photoLicence: [this.start.photoLicence],
    authorNamed: [this.start.authorNamed],
  });

  constructor() {
    this.form.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => {
      const { embargoUntil, ...answers } = this.form.getRawValue();
      this.store.update({
        ...answers,
        embargoUntil: /^\d{4}-\d{2}-\d{2}$/.test(embargoUntil)
          ? new Date(`${embargoUntil}T00:00:00`).toISOString()
          : null,
      });
    });
  }

  protected nameClub(slug: string, isNamed: boolean): void {
    const others = this.store.content().namedClubs.filter((each) => each !== slug);
    this.store.update({ namedClubs: isNamed ? [...others, slug] : others });
  }

  protected missingWords(missing: Missing): string {
    switch (missing.code) {
      case 'club':
        return $localize`The club that it is filed in`;
      case 'presentedAs':
        return $localize`What the piece is presented as`;
      case 'paperMoney':
        return $localize`Paper money is not taken here: describe a coin, token, medal or bar`;
      case 'photos':
        return $localize`Two photos`;
      case 'obverse':
        return $localize`Which photo shows the obverse`;
      case 'channel':
        return $localize`Where it came to light: online, at a show, in a shop …`;
      case 'country':
        return $localize`The country`;
      case 'surfacedOn':
        return $localize`The month in which it came to light`;
      case 'currency':
        return $localize`The currency of the price`;
      case 'namedClubs':
        return $localize`At least one club to be named`;
    }
  }
}
