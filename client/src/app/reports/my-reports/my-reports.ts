import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { BehaviorSubject, combineLatest, switchMap } from 'rxjs';
import { Page } from '#shared/paging';
import { MyReport } from '#shared/reports/report-view';

import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { Disc } from '../../ui/disc';
import { PageHeader } from '../../ui/page-header';
import { Paging } from '../../ui/paging';
import { ReportNumber } from '../../ui/report-number';
import { StateMessage } from '../../ui/state-message';
import { WhenPipe } from '../../ui/when-pipe';
import { nextStepWords, standingWords } from '../my-report-words';
import { ReportsApi } from '../reports-api';

/** What a member filed, where each report stands and what happens next. */
@Component({
  selector: 'tn-my-reports',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Disc, MatButton, PageHeader, Paging, ReportNumber, RouterLink, StateMessage, WhenPipe],
  host: { class: 'tn-page' },
  templateUrl: './my-reports.html',
  styleUrl: './my-reports.scss',
})
export class MyReports {
  private readonly api = inject(ReportsApi);
  private readonly reload = new BehaviorSubject<void>(undefined);

  /** From the address. */
  readonly after = input<string>();

  protected readonly answer = toSignal(
    combineLatest([toObservable(this.after), this.reload]).pipe(
      switchMap(([after]) => loadState(this.api.myReports(after))),
    ),
    { initialValue: { state: 'loading' } satisfies LoadState<Page<MyReport>> },
  );
  protected readonly rows = computed(() => {
    const answer = this.answer();
    if (answer.state !== 'ready') return [];
    return answer.data.items.map((report) => ({
      ...report,
      standing: standingWords(report),
      nextStep: nextStepWords(report),
    }));
  });
  protected readonly problem = computed(() => {
    const answer = this.answer();
    return answer.state === 'failed' ? answer.problem : null;
  });
  protected readonly problemText = computed(() => {
    const problem = this.problem();
    return problem ? problemWords(problem) : '';
  });

  protected loadAgain(): void {
    this.reload.next();
  }
}
