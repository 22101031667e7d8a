import { ChangeDetectionStrategy, Component, LOCALE_ID, computed, inject, input,
  output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { WatchView, filterToQuery } from '#shared/watches/watch-filter';

import { SessionStore } from '../../auth/session-store';
import { Icon } from '../../ui/icon';
import { WhenPipe } from '../../ui/when-pipe';
import { CatalogueNamesStore } from '../catalogue-names';
import { cadenceWords, filterWords } from '../watch-words';

const pausedForGoodFrom = '9000';

/** One watch: what it looks for, how often it mails, when next, and what can be done with it. */
@Component({
  selector: 'tn-watch-row',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Icon, MatButton, RouterLink, WhenPipe],
  templateUrl: './watch-row.html',
  styleUrl: './watch-row.scss',
})
export class WatchRow {
  private readonly catalogue = inject(CatalogueNamesStore);
  private readonly locale = inject(LOCALE_ID);
  private readonly session = inject(SessionStore);

  readonly watch = input.required<WatchView>();
  readonly busy = input(false);

  readonly paused = output();
  readonly resumed = output();
  readonly edited = output();
  readonly removed = output();

  protected readonly timeZone = computed(() => this.session.person()?.timeZone);
  protected readonly parts = computed(() =>
    filterWords(this.watch().filter, this.catalogue.names(), this.locale));
  protected readonly query = computed(() => filterToQuery(this.watch().filter));
  protected readonly cadence = computed(() => cadenceWords(this.watch().cadence));
  /** A pause of a mail's stop link lasts until its owner ends it, written as a far year. */
  protected readonly pausedForGood = computed(
    () => (this.watch().pausedUntil ?? '') >= pausedForGoodFrom);
}
