import { ChangeDetectionStrategy, Component, computed, inject, output } from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Subject, map, startWith, switchMap } from 'rxjs';
import { ClubSummary } from '#shared/accounts/session';
import { audiences } from '#shared/access/audience';

import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { Caution } from '../../ui/caution';
import { audienceWords } from '../../ui/report-words';
import { StateMessage } from '../../ui/state-message';
import { DraftStore } from '../draft-store';
import { FilingApi } from '../filing-api';
import { Missing } from '../filing-content';
import { PhotoShelf } from '../photo-shelf';

/** What is missing, who will see it, under which licence; then it can be sent. */
@Component({
  selector: 'tn-send-step',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Caution, MatButton, MatFormFieldModule, MatInput, ReactiveFormsModule, StateMessage],
  templateUrl: './send-step.html',
  styleUrls: ['../step.scss', './send-step.scss'],
})
export class SendStep {
  protected readonly store = inject(DraftStore);
  private readonly start = this.store.content();

  /** What is missing was asked for: its field is where to go. */
  readonly missingChosen = output<Missing>();

  protected readonly audiences = audiences;
  protected readonly audienceWords = audienceWords;
  protected readonly words = problemWords;
  protected readonly isSendingPhotos = inject(PhotoShelf).isSending;
  /** The day after today: an embargo until an earlier one would be none. */
  protected readonly firstDay = new Date(Date.now() + 86_400_000).toISOString().slice(0, 10);
  private readonly api = inject(FilingApi);
  private readonly reloads = new Subject<void>();
  protected readonly clubs = toSignal(
    this.reloads.pipe(
      startWith(undefined),
      switchMap(() => loadState(this.api.clubs().pipe(map(({ items }) => this.others(items))))),
    ),
    { initialValue: { state: 'loading' } as LoadState<readonly ClubSummary[]> },
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

  protected reloadClubs(): void {
    this.reloads.next();
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

  private others(clubs: readonly ClubSummary[]): readonly ClubSummary[] {
    return clubs.filter(({ slug }) => slug !== this.store.content().club);
  }
}
