import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { BehaviorSubject, catchError, combineLatest, of, switchMap } from 'rxjs';
import { ReportView } from '#shared/reports/report-view';
import { WatchFilter, filterToQuery } from '#shared/watches/watch-filter';

import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { Caution } from '../../ui/caution';
import { Icon } from '../../ui/icon';
import { Crumb, PageHeader } from '../../ui/page-header';
import { PageTitle } from '../../ui/page-title';
import { ReportNumber } from '../../ui/report-number';
import { metalWords } from '../../ui/report-words';
import { StateMessage } from '../../ui/state-message';
import { WhenPipe } from '../../ui/when-pipe';
import { CatalogueApi } from '../catalogue-api';
import { ReportActions } from '../report-actions/report-actions';
import { ReportEvidence } from '../report-evidence/report-evidence';
import { ReportHistory } from '../report-history/report-history';
import { ReportParticulars } from '../report-particulars/report-particulars';
import { ReportsApi } from '../reports-api';

/** A published report as its reader may see it, in the version shown now or an earlier one. */
@Component({
  selector: 'tn-report-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    Caution, Icon, MatButton, PageHeader, ReportActions, ReportEvidence, ReportHistory,
    ReportNumber, ReportParticulars, RouterLink, StateMessage, WhenPipe,
  ],
  host: { class: 'tn-page' },
  templateUrl: './report-page.html',
  styleUrl: './report-page.scss',
})
export class ReportPage {
  private readonly api = inject(ReportsApi);
  private readonly catalogue = inject(CatalogueApi);
  private readonly pageTitle = inject(PageTitle);
  private readonly reload = new BehaviorSubject<void>(undefined);

  /** From the address. */
  readonly number = input.required<string>();
  readonly version = input<string>();

  protected readonly answer = toSignal(
    combineLatest([
      toObservable(computed(() => ({ number: this.number(), version: this.version() }))),
      this.reload,
    ]).pipe(switchMap(([{ number, version }]) => loadState(this.api.report(number, version)))),
    { initialValue: { state: 'loading' } satisfies LoadState<ReportView> },
  );
  protected readonly report = computed(() => {
    const answer = this.answer();
    return answer.state === 'ready' ? answer.data : null;
  });
  /** Without its standard a report is still worth reading: a failure leaves the bars away. */
  protected readonly coinType = toSignal(
    toObservable(computed(() => this.report()?.coinType?.slug)).pipe(
      switchMap((slug) =>
        slug ? this.catalogue.coinType(slug).pipe(catchError(() => of(null))) : of(null),
      ),
    ),
    { initialValue: null },
  );
  protected readonly problem = computed(() => {
    const answer = this.answer();
    return answer.state === 'failed' ? answer.problem : null;
  });
  protected readonly problemText = computed(() => {
    const problem = this.problem();
    return problem ? problemWords(problem) : '';
  });
  protected readonly isMistyped = computed(
    () => this.problem()?.code === 'report_number_mistyped',
  );
  protected readonly crumbs = computed<readonly Crumb[]>(() => {
    const report = this.report();
    if (!report) return [];
    const { coinType, presentedAs } = report;
    return [
      { label: $localize`Reports`, link: '/reports' },
      ...(presentedAs.metal ? [{ label: metalWords(presentedAs.metal) }] : []),
      { label: coinType?.name ?? (presentedAs.description || report.title) },
    ];
  });
  protected readonly presentedAs = computed(() => presentedAsWords(this.report()));
  protected readonly alikeQuery = computed(() => filterToQuery(alikeFilter(this.report())));
  /** The newest publication, where an earlier version is on screen. */
  protected readonly newerVersion = computed(() => {
    const report = this.report();
    const newest = Math.max(...(report?.history ?? []).map(({ version }) => version), 0);
    return report && newest > report.version ? newest : null;
  });

  constructor() {
    effect(() => {
      const report = this.report();
      if (report) {
        this.pageTitle.nameScreen($localize`${report.title}:title:, counterfeit report`);
      }
    });
  }

  protected loadAgain(): void {
    this.reload.next();
  }
}

/** "ten marks 1904 A": the type, or the reporter's description, with year and mint mark. */
function presentedAsWords(report: ReportView | null): string {
  if (!report) return '';
  const { coinType, presentedAs } = report;
  return [coinType?.name ?? presentedAs.description, presentedAs.year, presentedAs.mintMark]
    .filter((part) => part)
    .join(' ');
}

/** Reports of the same type; without a type, of the same kind and metal. */
function alikeFilter(report: ReportView | null): WatchFilter {
  if (!report) return {};
  const { coinType, presentedAs } = report;
  if (coinType) return { coinType: [coinType.slug] };
  return {
    kind: [presentedAs.kind],
    ...(presentedAs.metal ? { metal: [presentedAs.metal] } : {}),
  };
}
