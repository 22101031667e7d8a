import {
  ChangeDetectionStrategy, Component, DestroyRef, computed, inject, input, signal,
} from '@angular/core';
import { takeUntilDestroyed, toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { BehaviorSubject, catchError, combineLatest, forkJoin, map, of, switchMap } from 'rxjs';
import { ApiProblem } from '#shared/api-problem';
import { MyReport, ReportView } from '#shared/reports/report-view';

import { problemOf } from '../../http/api-failure';
import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { Icon } from '../../ui/icon';
import { Crumb, PageHeader } from '../../ui/page-header';
import { ReportNumber } from '../../ui/report-number';
import { audienceWords } from '../../ui/report-words';
import { StateMessage } from '../../ui/state-message';
import { WhenPipe } from '../../ui/when-pipe';
import { CatalogueApi } from '../catalogue-api';
import { mayWithdraw, nextStepWords, standingWords } from '../my-report-words';
import { ReportEvidence } from '../report-evidence/report-evidence';
import { ReportHistory } from '../report-history/report-history';
import { ReportParticulars } from '../report-particulars/report-particulars';
import { ReportsApi } from '../reports-api';

interface OwnReport {
  readonly report: ReportView;
  readonly row: MyReport | undefined;
}

/** One's own report: what was filed, what was decided and why, and what can be done now. */
@Component({
  selector: 'tn-my-report',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    Icon, MatButton, PageHeader, ReportEvidence, ReportHistory, ReportNumber, ReportParticulars,
    RouterLink, StateMessage, WhenPipe,
  ],
  host: { class: 'tn-page' },
  templateUrl: './my-report.html',
  styleUrl: './my-report.scss',
})
export class MyReportPage {
  private readonly api = inject(ReportsApi);
  private readonly catalogue = inject(CatalogueApi);
  private readonly destroyed = inject(DestroyRef);
  private readonly reload = new BehaviorSubject<void>(undefined);

  /** From the address. */
  readonly number = input.required<string>();

  protected readonly answer = toSignal(
    combineLatest([toObservable(this.number), this.reload]).pipe(
      switchMap(([number]) =>
        loadState(
          forkJoin([this.api.myReport(number), this.api.myReportRow(number)]).pipe(
            map(([report, row]): OwnReport => ({ report, row })),
          ),
        ),
      ),
    ),
    { initialValue: { state: 'loading' } satisfies LoadState<OwnReport> },
  );
  protected readonly own = computed(() => {
    const answer = this.answer();
    return answer.state === 'ready' ? answer.data : null;
  });
  protected readonly coinType = toSignal(
    toObservable(computed(() => this.own()?.report.coinType?.slug)).pipe(
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
  protected readonly crumbs = computed<readonly Crumb[]>(() => [
    { label: $localize`My reports`, link: '/my/reports' },
    { label: this.own()?.report.title ?? this.number() },
  ]);
  protected readonly standing = computed(() => {
    const row = this.standingRow();
    return row && standingWords(row);
  });
  protected readonly nextStep = computed(() => {
    const row = this.standingRow();
    return row && nextStepWords(row);
  });
  protected readonly askedAudience = computed(() => {
    const asked = this.own()?.report.askedAudience;
    return asked ? audienceWords(asked) : null;
  });
  protected readonly mayWithdraw = computed(() => {
    const row = this.standingRow();
    return !!row && mayWithdraw(row);
  });

  protected readonly asking = signal(false);
  protected readonly busy = signal(false);
  protected readonly refusal = signal<ApiProblem | null>(null);
  protected readonly refusalText = computed(() => {
    const refusal = this.refusal();
    return refusal ? problemWords(refusal) : '';
  });

  private readonly standingRow = computed(() => {
    const own = this.own();
    if (!own) return null;
    const { report, row } = own;
    return (
      row ?? {
        state: report.state,
        inReview: false,
        audience: report.askedAudience ?? 'clubs',
        publishedAudience: report.audience,
      }
    );
  });

  protected askBeforeWithdrawal(): void {
    this.asking.set(true);
  }

  protected keepReport(): void {
    this.asking.set(false);
  }

  protected withdraw(report: ReportView): void {
    if (this.busy()) return;
    this.busy.set(true);
    this.refusal.set(null);
    this.api
      .withdraw(report.number, report.rowVersion)
      .pipe(takeUntilDestroyed(this.destroyed))
      .subscribe({
        next: () => this.endWithdrawal(null),
        error: (error: unknown) => this.endWithdrawal(problemOf(error)),
      });
  }

  protected loadAgain(): void {
    this.reload.next();
  }

  private endWithdrawal(refusal: ApiProblem | null): void {
    this.busy.set(false);
    this.asking.set(false);
    this.refusal.set(refusal);
    this.reload.next();
  }
}
