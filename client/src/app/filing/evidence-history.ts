import { computed, signal } from '@angular/core';

import { FilingContent } from './filing-content';

/** What undo and redo reach: the photos and the tells with their pins. */
export type Evidence = Pick<FilingContent, 'photos' | 'tells'>;

const depth = 100;

/** Steps back and forth. All that happens within one drag is one step. */
export class EvidenceHistory {
  private readonly past = signal<readonly Evidence[]>([]);
  private readonly future = signal<readonly Evidence[]>([]);
  private gesture: 'none' | 'begun' | 'remembered' = 'none';

  readonly canUndo = computed(() => this.past().length > 0);
  readonly canRedo = computed(() => this.future().length > 0);

  beginGesture(): void {
    this.gesture = 'begun';
  }

  endGesture(): void {
    this.gesture = 'none';
  }

  remember(before: Evidence): void {
    if (this.gesture === 'remembered') return;
    if (this.gesture === 'begun') this.gesture = 'remembered';
    this.past.update((past) => [...past, evidenceOf(before)].slice(-depth));
    this.future.set([]);
  }

  /** What stood before the last step, or undefined. */
  undo(now: Evidence): Evidence | undefined {
    const before = this.past().at(-1);
    if (!before) return undefined;
    this.past.update((past) => past.slice(0, -1));
    this.future.update((future) => [...future, evidenceOf(now)]);
    return before;
  }

  redo(now: Evidence): Evidence | undefined {
    const after = this.future().at(-1);
    if (!after) return undefined;
    this.future.update((future) => future.slice(0, -1));
    this.past.update((past) => [...past, evidenceOf(now)]);
    return after;
  }
}

function evidenceOf({ photos, tells }: Evidence): Evidence {
  return { photos, tells };
}
