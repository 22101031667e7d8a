import { ChangeDetectionStrategy, Component, DestroyRef, ElementRef, Injector, afterNextRender,
  computed, effect, inject, input, signal, untracked, viewChild } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { Observable, Subject, finalize, switchMap } from 'rxjs';
import { ApiProblem } from '#shared/api-problem';
import { DecisionKind } from '#shared/review/review';

import { problemOf } from '../../http/api-failure';
import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { Icon } from '../../ui/icon';
import { PageTitle } from '../../ui/page-title';
import { audienceWords } from '../../ui/report-words';
import { StateMessage } from '../../ui/state-message';
import { WhenPipe } from '../../ui/when-pipe';
import { ClaimBox } from '../claim-box/claim-box';
import { ClaimState } from '../claim-state';
import { ConflictForm } from '../conflict-form/conflict-form';
import { DecisionForm } from '../decision-form/decision-form';
import { DeskKeys } from '../desk-keys';
import { EarlierDecisions } from '../earlier-decisions/earlier-decisions';
import { Evidence } from '../evidence/evidence';
import { DecisionDraft, QueueStore } from '../queue-store';
import { ReporterCard } from '../reporter-card/reporter-card';
import { ReviewApi, TimedReview } from '../review-api';
import { barredWords, doneWords } from '../review-words';

/** One report with all its evidence, and the decision on it. */
@Component({
  selector: 'tn-report-desk',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [ClaimBox, ConflictForm, DecisionForm, EarlierDecisions, Evidence, Icon, MatButton,
    ReporterCard, RouterLink, StateMessage, WhenPipe],
  providers: [ClaimState],
  templateUrl: './report-desk.html',
  styleUrl: './report-desk.scss',
})
export class ReportDesk {
  private readonly api = inject(ReviewApi);
  private readonly store = inject(QueueStore);
  private readonly title = inject(PageTitle);
  private readonly destroyed = inject(DestroyRef);
  private readonly injector = inject(Injector);
  private readonly loads = new Subject<string>();
  protected readonly claim = inject(ClaimState);

  readonly number = input.required<string>();

  private readonly decisionForm = viewChild(DecisionForm);
  private readonly outcomeMessage = viewChild<ElementRef<HTMLElement>>('outcomeMessage');

  protected readonly loading = signal<LoadState<TimedReview>>({ state: 'loading' });
  /** What was last read; stays while a newer version is fetched, so that no text is lost. */
  protected readonly review = signal<TimedReview | null>(null);
  protected readonly busy = signal(false);
  protected readonly problem = signal<ApiProblem | null>(null);
  protected readonly seenVersion = signal<number | null>(null);
  protected readonly done = signal<string | null>(null);

  protected readonly heading = computed(() => this.review()?.report.title ?? this.number());
  protected readonly problemText = computed(() => {
    const problem = this.problem();
    return problem ? problemWords(problem) : '';
  });
  protected readonly loadProblem = computed(() => {
    const loading = this.loading();
    return loading.state === 'failed' ? loading.problem : null;
  });
  protected readonly loadProblemText = computed(() => {
    const problem = this.loadProblem();
    return problem ? problemWords(problem) : '';
  });
  protected readonly isStale = computed(() => this.problem()?.code === 'stale_version');
  protected readonly barred = computed(() => {
    const barred = this.review()?.barred;
    return barred ? barredWords(barred) : null;
  });
  protected readonly asked = computed(() => {
    const report = this.review()?.report;
    return audienceWords(report?.askedAudience ?? report?.audience ?? 'clubs');
  });
  protected readonly next = computed(() => this.store.nextFor(this.number()));

  constructor() {
    this.loads
      .pipe(
        switchMap((number) => loadState(this.api.review(number))),
        takeUntilDestroyed(),
      )
      .subscribe((loading) => this.takeIn(loading));
    effect(() => {
      const number = this.number();
      untracked(() => this.open(number));
    });
    const keys = inject(DeskKeys);
    keys.claim.pipe(takeUntilDestroyed()).subscribe(() => this.claimReport());
    keys.decide.pipe(takeUntilDestroyed()).subscribe(() => this.decisionForm()?.focusOutcome());
  }

  protected reload(): void {
    this.problem.set(null);
    this.loads.next(this.number());
  }

  protected claimReport(): void {
    const review = this.review();
    if (!review?.stage || review.barred || this.busy()) return;
    this.run(this.api.claim(review.report.number), (lease) => {
      this.claim.take(lease);
      this.problem.set(null);
      this.store.renew();
      // Someone may have changed the report between the reading and the claim.
      if (lease.version !== review.report.version) this.problem.set(staleProblem);
    });
  }

  protected releaseReport(): void {
    this.run(this.api.release(this.number()), () => {
      this.claim.take(null);
      this.store.renew();
    });
  }

  protected decide(decision: DecisionDraft & { readonly kind: DecisionKind }): void {
    const review = this.review();
    const leaseToken = this.claim.token();
    if (!review || !leaseToken || this.busy()) return;
    const { number, version, rowVersion, askedAudience } = review.report;
    this.run(
      this.api.decide(number, { ...decision, leaseToken, version, rowVersion }),
      (decided) => {
        this.store.dropDraft(number);
        this.claim.take(null);
        this.review.set(decided);
        this.done.set(doneWords(decision.kind, askedAudience ?? 'clubs'));
        this.store.renew();
        afterNextRender(() => this.outcomeMessage()?.nativeElement.focus(), {
          injector: this.injector,
        });
      },
    );
  }

  protected stepBack(): void {
    this.claim.take(null);
    this.reload();
    this.store.renew();
  }

  private open(number: string): void {
    this.review.set(null);
    this.claim.take(null);
    this.done.set(null);
    this.problem.set(null);
    this.seenVersion.set(null);
    this.loads.next(number);
  }

  private takeIn(loading: LoadState<TimedReview>): void {
    this.loading.set(loading);
    if (loading.state !== 'ready') return;
    const before = this.review()?.report.version;
    const { report, lease } = loading.data;
    if (before !== undefined && before !== report.version) this.seenVersion.set(before);
    this.review.set(loading.data);
    this.claim.take(lease);
    this.title.nameScreen($localize`Review: ${report.title}:title:`);
  }

  private run<Answer>(request: Observable<Answer>, take: (answer: Answer) => void): void {
    this.busy.set(true);
    request
      .pipe(
        finalize(() => this.busy.set(false)),
        takeUntilDestroyed(this.destroyed),
      )
      .subscribe({ next: take, error: (error: unknown) => this.refuse(problemOf(error)) });
  }

  private refuse(problem: ApiProblem): void {
    this.problem.set(problem);
    if (problem.code === 'lease_needed') this.claim.lose();
    if (problem.code === 'lease_taken') {
      this.claim.lose();
      this.review.update((review) => review && { ...review, leaseHeldByOther: true });
    }
  }
}

const staleProblem: ApiProblem = { type: 'about:blank', title: '', status: 409,
  code: 'stale_version' };
