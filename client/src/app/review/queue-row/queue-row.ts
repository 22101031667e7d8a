import { DOCUMENT } from '@angular/common';
import { ChangeDetectionStrategy, Component, ElementRef, computed, inject, input, output,
  viewChild } from '@angular/core';
import { RouterLink } from '@angular/router';
import { QueueItem } from '#shared/review/review';

import { Disc } from '../../ui/disc';
import { WhenPipe } from '../../ui/when-pipe';
import { flagWords } from '../review-words';

/** One waiting report: what it is presented as, since when it waits, and what is special. */
@Component({
  selector: 'tn-queue-row',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Disc, RouterLink, WhenPipe],
  host: { role: 'listitem' },
  templateUrl: './queue-row.html',
  styleUrl: './queue-row.scss',
})
export class QueueRow {
  private readonly document = inject(DOCUMENT);

  readonly item = input.required<QueueItem>();
  readonly isOpen = input(false);

  /** Asks for the next or previous row. */
  readonly moved = output<1 | -1>();

  private readonly link = viewChild.required<ElementRef<HTMLAnchorElement>>('link');

  protected readonly photo = computed(() => this.item().photos[0]);
  protected readonly notes = computed(() => {
    const { barred, flags, lease } = this.item();
    const held = lease === 'mine' ? [$localize`claimed by you`]
      : lease === 'other' ? [$localize`another moderator is on it`] : [];
    const closed = barred ? [$localize`others decide`] : [];
    return [...held, ...closed, ...flags.map(flagWords)];
  });

  focus(): void {
    this.link().nativeElement.focus();
  }

  /** Arrows move within the list only: elsewhere they scroll. */
  protected moveByArrow(event: Event, step: 1 | -1): void {
    event.preventDefault();
    this.moved.emit(step);
  }

  hasFocus(): boolean {
    return this.document.activeElement === this.link().nativeElement;
  }
}
