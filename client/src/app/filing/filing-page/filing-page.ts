import { DOCUMENT } from '@angular/common';
import {
  AfterRenderRef,
  ChangeDetectionStrategy,
  Component,
  Injector,
  LOCALE_ID,
  afterEveryRender,
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
import { isNetworkFailure, problemOf } from '../../http/api-failure';
import { fieldProblemWords, problemWords } from '../../http/problem-words';
import { Icon } from '../../ui/icon';
import { StateMessage } from '../../ui/state-message';
import { WhenPipe } from '../../ui/when-pipe';
import { DraftStore } from '../draft-store';
import { FilingApi } from '../filing-api';
import { FilingStep, Missing, filingSteps, reportOf, stepOfField } from '../filing-content';
import { FiledMessage } from '../filed-message/filed-message';
import { MeasureStep } from '../measure-step/measure-step';
import { PhotoShelf } from '../photo-shelf';
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
  providers: [DraftStore, PhotoShelf],
  host: { class: 'tn-page', '[class.wide]': "step() === 'photos' && !filed()" },
  templateUrl: './filing-page.html',
  styleUrl: './filing-page.scss',
})
export class FilingPage {
  private readonly api = inject(FilingApi);
  private readonly session = inject(SessionStore);
  private readonly route = inject(ActivatedRoute);
  private readonly router = inject(Router);
  private readonly document = inject(DOCUMENT);
  private readonly injector = inject(Injector);
  private readonly locale = inject(LOCALE_ID);
  protected readonly shelf = inject(PhotoShelf);
  protected readonly store = inject(DraftStore);

  /** Of the draft; absent where a filed report is changed. */
  readonly draftId = input<string>();
  /** Of the returned report that is changed. */
  readonly number = input<string>();

  private focusing: AfterRenderRef | null = null;
  private readonly rowVersion = signal(0);
  protected readonly loading = signal<'loading' | 'ready' | string>('loading');
  protected readonly sending = signal(false);
  protected readonly problem = signal('');
  /** What the server did not accept, by the step where it is mended. */
  protected readonly faults = signal<readonly { step: FilingStep; words: string }[]>([]);
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
  protected readonly savedWords = computed(() => {
    const savedAt = this.store.savedAt();
    return savedAt && timeWords(savedAt, new Date(), this.locale);
  });
  protected readonly saveProblemWords = computed(() => {
    const problem = this.store.saveProblem();
    // A lost line mends itself; the banner of the page speaks of it already.
    return problem && !isNetworkFailure(problem) && problem.status < 500
      ? problemWords(problem)
      : '';
  });

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
    if (this.filed()) return false;
    return (
      this.shelf.isSending() || ['unsaved', 'saving', 'stale'].includes(this.store.saveState())
    );
  }

  protected retryLoad(): void {
    this.loading.set('loading');
    this.load(this.draftId(), this.number()).subscribe();
  }

  protected send(): void {
    if (this.sending() || this.store.missing().length || this.shelf.isSending()) return;
    this.sending.set(true);
    this.problem.set('');
    this.faults.set([]);
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
        this.focusWhenShown('h1');
      },
      error: (error: unknown) => {
        const problem = problemOf(error);
        this.problem.set(problemWords(problem));
        this.faults.set(
          (problem.fields ?? []).map((field) => ({
            step: stepOfField(field.field),
            words: fieldProblemWords(field),
          })),
        );
        this.sending.set(false);
      },
    });
  }

  /** Shows a step from its top, with the focus on its heading or on the field asked for. */
  protected async goTo(step: FilingStep, field?: string): Promise<void> {
    await this.router.navigate([], { relativeTo: this.route, queryParams: { step } });
    this.document.defaultView?.scrollTo({ top: 0 });
    this.focusWhenShown(field ? `[id^="field-${field}"]` : 'h1');
  }

  protected goToMissing({ step, code }: Missing): void {
    void this.goTo(step, code === 'paperMoney' ? 'presentedAs' : code);
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

  /** A tick for what is answered: not for what was offered and left, nor for the sending. */
  protected isAnswered(step: FilingStep): boolean {
    if (step === 'send') return false;
    if (step === 'measure') return this.store.content().measurements.length > 0;
    return !this.store.missing().some((each) => each.step === step);
  }

  private load(draftId: string | undefined, number: string | undefined) {
    return this.session.whenKnown().pipe(
      switchMap(() => {
        const club = this.session.clubsAs('member')[0]?.slug ?? '';
        if (number) {
          return this.api.filedContent(number).pipe(
            map(({ content, rowVersion }) => {
              this.rowVersion.set(rowVersion);
              this.store.openFiled(number, rowVersion, content);
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

  /** A draft that the server does not have is a new one; one kept here opens without a line. */
  private storedDraft(id: string) {
    return this.api.draft(id).pipe(
      catchError((error: unknown) => {
        const problem = problemOf(error);
        const isUnanswered = isNetworkFailure(problem) || problem.status >= 500;
        return problem.status === 404 || (isUnanswered && this.store.isKept(id))
          ? of(null)
          : throwError(() => error);
      }),
    );
  }

  /** A step's code may be under way still: the first of its renderings that has the element. */
  private focusWhenShown(selector: string): void {
    this.focusing?.destroy();
    this.focusing = afterEveryRender(
      () => {
        const element = this.document.querySelector<HTMLElement>(`main ${selector}`);
        if (!element) return;
        this.focusing?.destroy();
        this.focusing = null;
        element.focus();
      },
      { injector: this.injector },
    );
  }
}

/** The time alone where it was today, the day as well where it was not. */
function timeWords(then: Date, now: Date, locale: string): string {
  const isToday = then.toDateString() === now.toDateString();
  return new Intl.DateTimeFormat(locale, {
    ...(isToday ? {} : { day: 'numeric', month: 'long' }),
    hour: '2-digit',
    minute: '2-digit',
  }).format(then);
}
