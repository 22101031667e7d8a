import { DOCUMENT } from '@angular/common';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  signal,
} from '@angular/core';
import { takeUntilDestroyed, toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import { catchError, fromEvent, map, of, switchMap, throwError } from 'rxjs';
import { FiledReport } from '#shared/reports/report-content';

import { SessionStore } from '../../auth/session-store';
import { problemOf } from '../../http/api-failure';
import { problemWords } from '../../http/problem-words';
import { Icon } from '../../ui/icon';
import { StateMessage } from '../../ui/state-message';
import { WhenPipe } from '../../ui/when-pipe';
import { DraftStore } from '../draft-store';
import { FilingApi } from '../filing-api';
import { FilingStep, filingSteps, reportOf } from '../filing-content';
import { FiledMessage } from '../filed-message/filed-message';
import { MeasureStep } from '../measure-step/measure-step';
import { PhotosStep } from '../photos-step/photos-step';
import { PieceStep } from '../piece-step/piece-step';
import { SendStep } from '../send-step/send-step';
import { SurfacingStep } from '../surfacing-step/surfacing-step';

/** The stepped form, over a draft (`/file/:draftId`) or over a returned report. */
@Component({
  selector: 'tn-filing-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    FiledMessage,
    Icon,
    MatButton,
    MeasureStep,
    PhotosStep,
    PieceStep,
    RouterLink,
    SendStep,
    StateMessage,
    SurfacingStep,
    WhenPipe,
  ],
  providers: [DraftStore],
  host: { class: 'tn-page' },
  templateUrl: './filing-page.html',
  styleUrl: './filing-page.scss',
})
export class FilingPage {
  private readonly api = inject(FilingApi);
  private readonly session = inject(SessionStore);
  private readonly route = inject(ActivatedRoute);
  private readonly router = inject(Router);
  private readonly document = inject(DOCUMENT);
  protected readonly store = inject(DraftStore);

  /** Of the draft; absent where a filed report is changed. */
  readonly draftId = input<string>();
  /** Of the returned report that is changed. */
  readonly number = input<string>();

  private readonly rowVersion = signal(0);
  protected readonly loading = signal<'loading' | 'ready' | string>('loading');
  protected readonly sending = signal(false);
  protected readonly problem = signal('');
  protected readonly filed = signal<FiledReport | null>(null);
  protected readonly steps = filingSteps;

  protected readonly step = toSignal(
    this.route.queryParamMap.pipe(
      map((query): FilingStep => filingSteps.find((step) => step === query.get('step')) ?? 'piece'),
    ),
    { initialValue: 'piece' as FilingStep },
  );
  protected readonly at = computed(() => filingSteps.indexOf(this.step()));
  protected readonly next = computed(() => filingSteps[this.at() + 1]);
  protected readonly previous = computed(() => filingSteps[this.at() - 1]);

  constructor() {
    toObservable(computed(() => ({ draftId: this.draftId(), number: this.number() })))
      .pipe(
        switchMap(({ draftId, number }) => this.load(draftId, number)),
        takeUntilDestroyed(),
      )
      .subscribe();
    const view = this.document.defaultView;
    if (view) {
      fromEvent<BeforeUnloadEvent>(view, 'beforeunload')
        .pipe(takeUntilDestroyed())
        .subscribe((event) => {
          if (this.hasUnsaved()) event.preventDefault();
        });
    }
  }

  hasUnsaved(): boolean {
    return !this.filed() && ['unsaved', 'saving', 'stale'].includes(this.store.saveState());
  }

  protected retryLoad(): void {
    this.loading.set('loading');
    this.load(this.draftId(), this.number()).subscribe();
  }

  protected send(): void {
    if (this.sending() || this.store.missing().length) return;
    this.sending.set(true);
    this.problem.set('');
    const content = reportOf(this.store.content());
    const number = this.number();
    const request = number
      ? this.api.change(number, this.rowVersion(), content)
      : this.api.file(this.draftId() ?? '', content);
    request.subscribe({
      next: (filed) => {
        this.store.close();
        this.filed.set(filed);
        this.sending.set(false);
      },
      error: (error: unknown) => {
        const problem = problemOf(error);
        const fields = (problem.fields ?? []).map(({ field }) => field).join(', ');
        this.problem.set(fields ? `${problemWords(problem)} (${fields})` : problemWords(problem));
        this.sending.set(false);
      },
    });
  }

  protected goTo(step: FilingStep): void {
    void this.router.navigate([], { relativeTo: this.route, queryParams: { step } });
    this.document.defaultView?.scrollTo({ top: 0 });
  }

  protected stepWords(step: FilingStep): string {
    switch (step) {
      case 'piece':
        return $localize`The piece`;
      case 'photos':
        return $localize`Photos and tells`;
      case 'measure':
        return $localize`Measurements`;
      case 'surfacing':
        return $localize`Where and when`;
      case 'send':
        return $localize`Check and send`;
    }
  }

  protected isMissingIn(step: FilingStep): boolean {
    return this.store.missing().some((each) => each.step === step);
  }

  private load(draftId: string | undefined, number: string | undefined) {
    return this.session.whenKnown().pipe(
      switchMap(() => {
        const club = this.session.clubsAs('member')[0]?.slug ?? '';
        if (number) {
          return this.api.filedContent(number).pipe(
            map(({ content, rowVersion }) => {
              this.rowVersion.set(rowVersion);
              this.store.openFiled(content);
            }),
          );
        }
        const id = draftId ?? '';
        return this.storedDraft(id).pipe(map((draft) => this.store.open(id, club, draft)));
      }),
      map(() => this.loading.set('ready')),
      catchError((error: unknown) => {
        this.loading.set(problemWords(problemOf(error)));
        return of(undefined);
      }),
    );
  }

  /** A draft that the server does not have is a new one. */
  private storedDraft(id: string) {
    return this.api
      .draft(id)
      .pipe(
        catchError((error: unknown) =>
          problemOf(error).status === 404 ? of(null) : throwError(() => error),
        ),
      );
  }
}
