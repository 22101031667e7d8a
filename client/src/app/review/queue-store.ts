import { Injectable, computed, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { BehaviorSubject, filter, switchMap } from 'rxjs';
import { Confidence, ConfidenceBasis } from '#shared/reports/report-content';
import { DecisionKind, QueueAnswer } from '#shared/review/review';

import { LoadState, loadState } from '../http/load-state';
import { QueueFilter, ReviewApi } from './review-api';

/** What a moderator has typed on a report and not sent yet. */
export interface DecisionDraft {
  readonly kind: DecisionKind | null;
  readonly confidence: Confidence | null;
  readonly basis: readonly ConfidenceBasis[];
  readonly reason: string;
}

/** The queue on screen, shared by the list and the desk; lives as long as the app does. */
@Injectable()
export class QueueStore {
  private readonly api = inject(ReviewApi);
  private readonly asked = new BehaviorSubject<{ filter: QueueFilter; quiet: boolean } | null>(
    null,
  );
  private readonly drafts = new Map<string, DecisionDraft>();

  readonly queue = toSignal(
    this.asked.pipe(
      filter((asked) => asked !== null),
      switchMap((asked) =>
        loadState(this.api.queue(asked.filter)).pipe(
          // What is on screen stays there while it is renewed.
          filter(({ state }) => !asked.quiet || state === 'ready'),
        ),
      ),
    ),
    { initialValue: { state: 'loading' } satisfies LoadState<QueueAnswer> },
  );
  readonly items = computed(() => {
    const queue = this.queue();
    return queue.state === 'ready' ? queue.data.items : [];
  });

  show(queueFilter: QueueFilter): void {
    this.asked.next({ filter: queueFilter, quiet: false });
  }

  reload(): void {
    this.askAgain(false);
  }

  renew(): void {
    this.askAgain(true);
  }

  /** The next report on this page that the reader may take, after `number` or from the top. */
  nextFor(number: string): string | null {
    const items = this.items();
    const at = items.findIndex((item) => item.number === number);
    const rest = [...items.slice(at + 1), ...items.slice(0, Math.max(0, at))];
    return rest.find((item) => !item.barred && item.lease !== 'other')?.number ?? null;
  }

  /** Kept in this page only: reasons name private evidence, which no browser should store. */
  draftOf(number: string): DecisionDraft | undefined {
    return this.drafts.get(number);
  }

  keepDraft(number: string, draft: DecisionDraft): void {
    this.drafts.set(number, draft);
  }

  dropDraft(number: string): void {
    this.drafts.delete(number);
  }

  private askAgain(quiet: boolean): void {
    const asked = this.asked.value;
    if (asked) this.asked.next({ ...asked, quiet });
  }
}
