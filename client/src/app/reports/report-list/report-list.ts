import {
  ChangeDetectionStrategy,
  Component,
  LOCALE_ID,
  computed,
  effect,
  inject,
  signal,
} from '@angular/core';
import { takeUntilDestroyed, toObservable, toSignal } from '@angular/core/rxjs-interop';
import {
  FormControl, FormGroup, NonNullableFormBuilder, ReactiveFormsModule,
} from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import {
  BehaviorSubject, Observable, catchError, combineLatest, debounceTime, distinctUntilChanged,
  filter, forkJoin, map, of, switchMap, tap,
} from 'rxjs';
import { ReportSearchAnswer } from '#shared/reports/report-view';
import { WatchFilter, filterToQuery } from '#shared/watches/watch-filter';

import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { Caution } from '../../ui/caution';
import { Icon } from '../../ui/icon';
import { PageHeader } from '../../ui/page-header';
import { Paging } from '../../ui/paging';
import { ReportCard } from '../../ui/report-card';
import { StateMessage } from '../../ui/state-message';
import { CatalogueApi } from '../catalogue-api';
import { FacetChoice, FacetPanel } from '../facet-panel/facet-panel';
import { CatalogueNames, noNames } from '../facet-words';
import { ReportsApi } from '../reports-api';
import {
  SearchAddress, addressOfSearch, isUnfiltered, searchOfAddress, withFacet,
} from '../search-address';
import { ActiveFilter, activeFilters } from './active-filters';

const typingPauseMilliseconds = 250;
const noSearch: SearchAddress = { filter: {}, exact: false, after: null };

/** Published reports: search by number or words, filters with counts, all of it in the address. */
@Component({
  selector: 'tn-report-list',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    Caution, FacetPanel, Icon, MatButton, MatFormFieldModule, MatInput, PageHeader, Paging,
    ReactiveFormsModule, ReportCard, RouterLink, StateMessage,
  ],
  host: { class: 'tn-page' },
  templateUrl: './report-list.html',
  styleUrl: './report-list.scss',
})
export class ReportList {
  private readonly api = inject(ReportsApi);
  private readonly catalogue = inject(CatalogueApi);
  private readonly router = inject(Router);
  private readonly locale = inject(LOCALE_ID);
  private readonly reload = new BehaviorSubject<void>(undefined);

  private readonly address$ = inject(ActivatedRoute).queryParamMap.pipe(map(searchOfAddress));
  protected readonly address = toSignal(this.address$, {
    initialValue: noSearch,
  });
  protected readonly answer = toSignal(
    combineLatest([this.address$, this.reload]).pipe(
      switchMap(([address]) => loadState(this.search(address))),
    ),
    { initialValue: { state: 'loading' } satisfies LoadState<ReportSearchAnswer> },
  );
  /** Kept while the next answer loads, so that the filters don't jump under the finger. */
  protected readonly facets = signal<ReportSearchAnswer['facets']>(null);
  private readonly needsNames = computed(() => {
    const { coinType, tell } = this.address().filter;
    const facets = this.facets();
    return !!(coinType?.length || tell?.length || facets?.coinType.length || facets?.tell.length);
  });
  protected readonly names = toSignal(
    toObservable(this.needsNames).pipe(
      filter((needed) => needed),
      switchMap(() => this.catalogueNames()),
    ),
    { initialValue: noNames },
  );

  protected readonly form = inject(NonNullableFormBuilder).group({ text: '' });
  protected readonly years = new FormGroup({
    from: new FormControl<number | null>(null),
    to: new FormControl<number | null>(null),
  });
  protected readonly suggestions = toSignal(
    this.form.controls.text.valueChanges.pipe(
      debounceTime(typingPauseMilliseconds),
      map((text) => text.trim()),
      distinctUntilChanged(),
      switchMap((text) =>
        text.length < 2 ? of([]) : this.api.suggestions(text).pipe(catchError(() => of([]))),
      ),
    ),
    { initialValue: [] },
  );
  protected readonly filtersShown = signal(false);

  protected readonly chips = computed(() =>
    activeFilters(this.address().filter, this.names(), this.locale),
  );
  protected readonly problem = computed(() => {
    const answer = this.answer();
    return answer.state === 'failed' ? answer.problem : null;
  });
  protected readonly problemText = computed(() => {
    const problem = this.problem();
    return problem ? problemWords(problem) : '';
  });
  protected readonly totalText = computed(() => {
    const answer = this.answer();
    if (answer.state !== 'ready') return '';
    const { count, more } = answer.data.total;
    const figure = count.toLocaleString(this.locale);
    if (more) return $localize`${figure}:count:+ reports`;
    return count === 1 ? $localize`1 report` : $localize`${figure}:count: reports`;
  });
  /** What a watch keeps: the search as it was made, with mended words. */
  protected readonly watchQuery = computed(() => filterToQuery(this.exactFilter()));
  protected readonly isUnfiltered = computed(() => isUnfiltered(this.address().filter));
  protected readonly broaderQuery = computed(() => {
    const { text } = this.address().filter;
    return text && this.chips().length > 1 ? addressOfSearch({ text }) : {};
  });

  constructor() {
    this.address$.pipe(takeUntilDestroyed()).subscribe(({ filter: { text, yearFrom, yearTo } }) => {
      this.form.setValue({ text: text ?? '' }, { emitEvent: false });
      this.years.setValue({ from: yearFrom ?? null, to: yearTo ?? null }, { emitEvent: false });
    });
    effect(() => {
      const answer = this.answer();
      if (answer.state === 'ready' && answer.data.number) {
        void this.router.navigate(['/reports', answer.data.number], { replaceUrl: true });
      }
    });
  }

  protected searchWords(): void {
    const text = this.form.getRawValue().text.trim();
    this.show({ ...this.address().filter, text: text || undefined });
  }

  protected narrowYears(): void {
    const { from, to } = this.years.getRawValue();
    this.show({ ...this.address().filter, yearFrom: from ?? undefined, yearTo: to ?? undefined });
  }

  protected chooseFacet({ name, value, chosen }: FacetChoice): void {
    this.show(withFacet(this.address().filter, name, value, chosen));
  }

  protected removeFilter(chip: ActiveFilter): void {
    this.show(chip.without);
  }

  protected exactQuery() {
    return addressOfSearch(this.address().filter, true);
  }

  protected toggleFilters(): void {
    this.filtersShown.update((shown) => !shown);
  }

  protected loadAgain(): void {
    this.reload.next();
  }

  private show(filterShown: WatchFilter): void {
    const queryParams = addressOfSearch(filterShown, this.address().exact);
    void this.router.navigate(['/reports'], { queryParams });
  }

  private exactFilter(): WatchFilter {
    const answer = this.answer();
    const { filter: asked } = this.address();
    const mended = answer.state === 'ready' ? answer.data.mended : null;
    return mended ? { ...asked, text: mended.to } : asked;
  }

  private search({ filter: asked, exact, after }: SearchAddress): Observable<ReportSearchAnswer> {
    const page = this.api.search(asked, { exact, after });
    if (!after) return page.pipe(tap(({ facets }) => this.facets.set(facets)));
    // Counts come with a first page only, and a reader may land in the middle of a list.
    return forkJoin([page, this.api.search(asked, { exact, limit: 1 })]).pipe(
      tap(([, first]) => this.facets.set(first.facets)),
      map(([answer]) => answer),
    );
  }

  private catalogueNames(): Observable<CatalogueNames> {
    return forkJoin([
      this.catalogue.coinTypeNames().pipe(catchError(() => of(noNames.coinTypes))),
      this.catalogue.tells().pipe(
        map(({ tells }) => new Map(tells.map(({ id, name }) => [id, name]))),
        catchError(() => of(noNames.tells)),
      ),
    ]).pipe(map(([coinTypes, tells]) => ({ coinTypes, tells })));
  }
}
