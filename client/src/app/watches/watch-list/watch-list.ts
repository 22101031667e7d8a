import { LiveAnnouncer } from '@angular/cdk/a11y';
import { ChangeDetectionStrategy, Component, DestroyRef, LOCALE_ID, computed, effect, inject,
  signal } from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import { Observable, Subject, finalize, map, startWith, switchMap } from 'rxjs';
import { ApiProblem } from '#shared/api-problem';
import { WatchFilter, WatchSave, WatchView } from '#shared/watches/watch-filter';

import { problemOf } from '../../http/api-failure';
import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { PageHeader } from '../../ui/page-header';
import { StateMessage } from '../../ui/state-message';
import { CatalogueNamesStore } from '../catalogue-names';
import { filterFromQuery } from '../filter-query';
import { MetalStart } from '../metal-start/metal-start';
import { NEW_ID } from '../../ui/new-id';
import { WatchEditor } from '../watch-editor/watch-editor';
import { WatchRow } from '../watch-row/watch-row';
import { proposedName } from '../watch-words';
import { WatchesApi } from '../watches-api';

/** As far away as a pause without an end is written by the server, too. */
const untilFurtherNotice = '9999-12-31T00:00:00Z';

/** Own watches; with a search in the address, a new one made from it. */
@Component({
  selector: 'tn-watch-list',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MetalStart, PageHeader, RouterLink, StateMessage, WatchEditor, WatchRow],
  host: { class: 'tn-page' },
  templateUrl: './watch-list.html',
  styleUrl: './watch-list.scss',
})
export class WatchList {
  private readonly api = inject(WatchesApi);
  private readonly router = inject(Router);
  private readonly announcer = inject(LiveAnnouncer);
  private readonly catalogue = inject(CatalogueNamesStore);
  private readonly destroyed = inject(DestroyRef);
  private readonly locale = inject(LOCALE_ID);
  private readonly newId = inject(NEW_ID);
  private readonly loads = new Subject<void>();

  /** The search that the address carries, to be made a watch. */
  protected readonly asked = toSignal(
    inject(ActivatedRoute).queryParamMap.pipe(map(filterFromQuery)),
    { initialValue: null },
  );
  // One id for one search asked: sending it twice makes one watch.
  private readonly askedId = computed(() => (this.asked(), this.newId()));
  protected readonly loading = signal<LoadState<readonly WatchView[]>>({ state: 'loading' });
  protected readonly watches = signal<readonly WatchView[]>([]);
  /** Removed in this visit, shown in their place until the list is left. */
  protected readonly removed = signal<ReadonlySet<string>>(new Set());
  protected readonly editing = signal<string | null>(null);
  protected readonly busy = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);
  protected readonly problemText = computed(() => {
    const problem = this.problem();
    return problem ? problemWords(problem) : '';
  });
  protected readonly loadProblemText = computed(() => {
    const loading = this.loading();
    return loading.state === 'failed' ? problemWords(loading.problem) : '';
  });

  constructor() {
    this.loads
      .pipe(
        startWith(undefined),
        switchMap(() => loadState(this.api.list())),
        takeUntilDestroyed(),
      )
      .subscribe((loading) => {
        this.loading.set(loading);
        if (loading.state === 'ready') this.watches.set(loading.data);
      });
    effect(() => this.catalogue.fetchFor(this.watches().map(({ filter }) => filter)));
  }

  protected loadAgain(): void {
    this.loads.next();
  }

  protected addAskedWatch(watch: WatchSave): void {
    this.save(this.askedId(), watch, () => this.leaveQuery());
  }

  protected startWithMetals(filter: WatchFilter): void {
    const name = proposedName(filter, this.catalogue.names(), this.locale);
    this.save(this.newId(), { name, filter, cadence: 'weekly' });
  }

  protected changeWatch(watch: WatchView, change: WatchSave): void {
    const pausedUntil = watch.pausedUntil;
    this.save(watch.id, { ...change, pausedUntil }, () => this.editing.set(null));
  }

  protected pauseWatch(watch: WatchView): void {
    this.save(watch.id, { ...savedForm(watch), pausedUntil: untilFurtherNotice });
  }

  protected resumeWatch(watch: WatchView): void {
    this.save(watch.id, { ...savedForm(watch), pausedUntil: null });
  }

  protected removeWatch(watch: WatchView): void {
    this.run(this.api.remove(watch.id), () => {
      this.removed.update((removed) => new Set([...removed, watch.id]));
      void this.announcer.announce($localize`${watch.name}:watch: is removed.`);
    });
  }

  protected bringBack(watch: WatchView): void {
    this.save(watch.id, { ...savedForm(watch), pausedUntil: watch.pausedUntil }, () =>
      this.removed.update((removed) => new Set([...removed].filter((id) => id !== watch.id))));
  }

  protected editWatch(id: string): void {
    this.problem.set(null);
    this.editing.set(id);
  }

  protected leaveQuery(): void {
    void this.router.navigate(['/watches']);
  }

  private save(id: string, watch: WatchSave, then: () => void = () => undefined): void {
    this.run(this.api.save(id, watch), (saved) => {
      this.watches.update((watches) => watches.some((each) => each.id === id)
        ? watches.map((each) => (each.id === id ? saved : each))
        : [...watches, saved]);
      then();
      void this.announcer.announce($localize`${saved.name}:watch: is saved.`);
    });
  }

  private run<Answer>(request: Observable<Answer>, take: (answer: Answer) => void): void {
    if (this.busy()) return;
    this.busy.set(true);
    this.problem.set(null);
    request
      .pipe(
        finalize(() => this.busy.set(false)),
        takeUntilDestroyed(this.destroyed),
      )
      .subscribe({
        next: take,
        error: (error: unknown) => this.problem.set(problemOf(error)),
      });
  }
}

function savedForm({ name, filter, cadence }: WatchView): WatchSave {
  return { name, filter, cadence };
}
