import { LiveAnnouncer } from '@angular/cdk/a11y';
import { ChangeDetectionStrategy, Component, DestroyRef, ElementRef, computed, effect, inject,
  input, signal, viewChild, viewChildren } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { NavigationEnd, Router, RouterLink, RouterOutlet } from '@angular/router';
import { catchError, filter, map, of, startWith } from 'rxjs';
import { ClubSummary } from '#shared/accounts/session';
import { QueueFlag, queueFlags } from '#shared/review/review';

import { problemWords } from '../../http/problem-words';
import { Icon } from '../../ui/icon';
import { Paging } from '../../ui/paging';
import { StateMessage } from '../../ui/state-message';
import { WhenPipe } from '../../ui/when-pipe';
import { DeskKeys } from '../desk-keys';
import { KeyHelp } from '../key-help/key-help';
import { QueueRow } from '../queue-row/queue-row';
import { QueueStore } from '../queue-store';
import { QueueFilter, ReviewApi } from '../review-api';
import { flagWords } from '../review-words';

/**
 * The queue with its filters, and beside it the report that is open. The filters stand in the
 * address and stay there while reports are opened.
 */
@Component({
  selector: 'tn-review-desk',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Icon, KeyHelp, MatButton, Paging, QueueRow, RouterLink, RouterOutlet, StateMessage,
    WhenPipe],
  providers: [DeskKeys],
  host: { '[class.open]': 'openNumber() !== null' },
  templateUrl: './review-desk.html',
  styleUrl: './review-desk.scss',
})
export class ReviewDesk {
  private readonly router = inject(Router);
  private readonly announcer = inject(LiveAnnouncer);
  private readonly store = inject(QueueStore);
  private readonly keys = inject(DeskKeys);

  readonly flag = input<string>();
  readonly club = input<string>();
  readonly coinType = input<string>();
  readonly after = input<string>();

  private readonly rows = viewChildren(QueueRow);
  private readonly help = viewChild.required<ElementRef<HTMLButtonElement>>('help');

  protected readonly queue = this.store.queue;
  protected readonly clubs = toSignal(
    inject(ReviewApi).clubs().pipe(catchError(() => of<readonly ClubSummary[]>([]))),
    { initialValue: [] },
  );
  protected readonly coinTypes = computed(() => {
    const known = new Map(this.store.items().flatMap(({ coinType }) =>
      coinType ? [[coinType.slug, coinType.name] as const] : []));
    const chosen = this.coinType();
    if (chosen && !known.has(chosen)) known.set(chosen, chosen);
    return [...known].map(([slug, name]) => ({ slug, name }));
  });
  protected readonly flags = queueFlags.map((value) => ({ value, words: flagWords(value) }));
  protected readonly isFiltered = computed(() =>
    [this.flag(), this.club(), this.coinType()].some((each) => !!each));
  protected readonly problemText = computed(() => {
    const queue = this.queue();
    return queue.state === 'failed' ? problemWords(queue.problem) : '';
  });
  protected readonly helpOpen = signal(false);
  protected readonly openNumber = toSignal(
    this.router.events.pipe(
      filter((event) => event instanceof NavigationEnd),
      startWith(null),
      map(() => /^\/review\/([^/?#]+)/.exec(this.router.url)?.[1] ?? null),
    ),
    { initialValue: null },
  );

  constructor() {
    effect(() => this.store.show(this.queueFilter()));
    const { move, help } = this.keys;
    const moved = move.subscribe((step) => this.moveFocus(step));
    const asked = help.subscribe(() => this.toggleHelp());
    inject(DestroyRef).onDestroy(() => {
      moved.unsubscribe();
      asked.unsubscribe();
    });
  }

  protected toggleHelp(): void {
    this.helpOpen.update((open) => !open);
    void this.announcer.announce(this.helpOpen()
      ? $localize`Help on the keys is open.`
      : $localize`Help on the keys is closed.`);
    if (!this.helpOpen()) this.help().nativeElement.focus();
  }

  protected filterBy(parameter: 'club' | 'coinType', value: string): void {
    void this.router.navigate([], {
      queryParams: { [parameter]: value || null, after: null },
      queryParamsHandling: 'merge',
    });
  }

  protected reloadQueue(): void {
    this.store.reload();
  }

  protected moveFocus(step: 1 | -1): void {
    const rows = this.rows();
    const focused = rows.findIndex((row) => row.hasFocus());
    const open = rows.findIndex((row) => row.item().number === this.openNumber());
    const from = focused >= 0 ? focused : open;
    const to = from < 0 ? 0 : Math.min(rows.length - 1, Math.max(0, from + step));
    rows[to]?.focus();
  }

  private queueFilter(): QueueFilter {
    const flag = queueFlags.find((each): each is QueueFlag => each === this.flag());
    return {
      ...(flag ? { flag } : {}),
      ...(this.club() ? { club: this.club() } : {}),
      ...(this.coinType() ? { coinType: this.coinType() } : {}),
      ...(this.after() ? { after: this.after() } : {}),
    };
  }
}
