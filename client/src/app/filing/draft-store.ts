import { DestroyRef, Injectable, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { EMPTY, Subject, catchError, concatMap, debounceTime, tap, timer } from 'rxjs';
import { DraftView } from '#shared/reports/report-content';

import { isNetworkFailure, problemOf } from '../http/api-failure';
import { BROWSER_STORAGE } from '../ui/browser-storage';
import { FilingApi } from './filing-api';
import { FilingContent, contentOfDraft, draftOf, emptyContent, missingIn } from './filing-content';

/** Milliseconds without a keystroke after which a draft is saved, and until a failed try again. */
const quietTime = 700;
const retryTime = 4_000;
const undoDepth = 100;

export type SaveState = 'untouched' | 'saving' | 'saved' | 'unsaved' | 'stale';

/**
 * The report being written. Every change is kept in this browser at once and on the server a
 * moment later; a lost line keeps it here and tries again, a second tab that saved meanwhile
 * leaves the choice to the person.
 */
@Injectable()
export class DraftStore {
  private readonly api = inject(FilingApi);
  private readonly storage = inject(BROWSER_STORAGE);
  private readonly destroyRef = inject(DestroyRef);
  private readonly changes = new Subject<void>();
  private readonly written = signal<FilingContent>(emptyContent(''));
  private readonly past = signal<readonly FilingContent[]>([]);
  private readonly future = signal<readonly FilingContent[]>([]);
  private id = '';
  private revision = 0;
  private keepsDraft = true;

  readonly content = this.written.asReadonly();
  readonly saveState = signal<SaveState>('untouched');
  readonly savedAt = signal<Date | null>(null);
  /** The other tab's version, where it saved in between. */
  readonly other = signal<DraftView | null>(null);
  readonly missing = computed(() => missingIn(this.written()));
  readonly canUndo = computed(() => this.past().length > 0);
  readonly canRedo = computed(() => this.future().length > 0);

  constructor() {
    this.changes
      .pipe(
        debounceTime(quietTime),
        concatMap(() => this.save()),
        takeUntilDestroyed(this.destroyRef),
      )
      .subscribe();
  }

  /** Starts with a draft from the server, or a new one; what this browser kept wins. */
  open(id: string, club: string, stored: DraftView | null): void {
    this.id = id;
    this.revision = stored?.revision ?? 0;
    this.written.set(stored ? contentOfDraft(stored.content, club) : emptyContent(club));
    this.savedAt.set(stored ? new Date(stored.updatedAt) : null);
    this.saveState.set(stored ? 'saved' : 'untouched');
    const kept = this.readKept();
    if (kept) {
      this.written.set(contentOfDraft(kept.content, club));
      this.revision = kept.revision;
      this.saveState.set('unsaved');
      this.changes.next();
    }
  }

  /** Starts with a filed report to be changed, which is no draft and is saved by sending it. */
  openFiled(content: FilingContent): void {
    this.keepsDraft = false;
    this.written.set(content);
  }

  update(change: Partial<FilingContent>): void {
    this.past.update((past) => [...past, this.written()].slice(-undoDepth));
    this.future.set([]);
    this.replace({ ...this.written(), ...change });
  }

  undo(): void {
    const before = this.past().at(-1);
    if (!before) return;
    this.past.update((past) => past.slice(0, -1));
    this.future.update((future) => [...future, this.written()]);
    this.replace(before);
  }

  redo(): void {
    const after = this.future().at(-1);
    if (!after) return;
    this.future.update((future) => future.slice(0, -1));
    this.past.update((past) => [...past, this.written()]);
    this.replace(after);
  }

  /** Of two versions, this tab's: it is saved over the other. */
  keepMine(): void {
    this.revision = this.other()?.revision ?? this.revision;
    this.other.set(null);
    this.saveState.set('unsaved');
    this.changes.next();
  }

  /** Of two versions, the other tab's; undo brings this tab's back. */
  takeOther(): void {
    const other = this.other();
    if (!other) return;
    this.past.update((past) => [...past, this.written()]);
    this.revision = other.revision;
    this.written.set(contentOfDraft(other.content, this.written().club));
    this.other.set(null);
    this.saveState.set('saved');
    this.forgetKept();
  }

  /** The report is sent: nothing more is saved, and nothing stays behind in this browser. */
  close(): void {
    this.keepsDraft = false;
    this.saveState.set('saved');
    this.forgetKept();
  }

  private replace(content: FilingContent): void {
    this.written.set(content);
    if (!this.keepsDraft) return;
    if (this.saveState() !== 'stale') this.saveState.set('unsaved');
    this.keep();
    this.changes.next();
  }

  private save() {
    if (!this.keepsDraft || this.saveState() === 'stale') return EMPTY;
    const content = this.written();
    this.saveState.set('saving');
    return this.api.saveDraft(this.id, { revision: this.revision, content: draftOf(content) }).pipe(
      tap((saved) => {
        this.revision = saved.revision;
        this.savedAt.set(new Date(saved.updatedAt));
        if (this.written() === content) {
          this.saveState.set('saved');
          this.forgetKept();
        } else {
          this.saveState.set('unsaved');
        }
      }),
      catchError((error: unknown) => {
        const problem = problemOf(error);
        if (problem.code === 'stale_version') return this.fetchOther();
        this.saveState.set('unsaved');
        if (isNetworkFailure(problem) || problem.status >= 500 || problem.status === 429) {
          timer(retryTime)
            .pipe(takeUntilDestroyed(this.destroyRef))
            .subscribe(() => this.changes.next());
        }
        return EMPTY;
      }),
    );
  }

  private fetchOther() {
    this.saveState.set('stale');
    return this.api.draft(this.id).pipe(
      tap((other) => this.other.set(other)),
      catchError(() => {
        this.saveState.set('unsaved');
        return EMPTY;
      }),
    );
  }

  private keep(): void {
    try {
      this.storage?.setItem(
        this.storageKey(),
        JSON.stringify({ revision: this.revision, content: draftOf(this.written()) }),
      );
    } catch {
      // A full or forbidden storage is no reason to stop anybody from writing.
    }
  }

  private readKept(): Pick<DraftView, 'revision' | 'content'> | null {
    try {
      const text = this.storage?.getItem(this.storageKey());
      return text ? (JSON.parse(text) as Pick<DraftView, 'revision' | 'content'>) : null;
    } catch {
      return null;
    }
  }

  private forgetKept(): void {
    this.storage?.removeItem(this.storageKey());
  }

  private storageKey(): string {
    return `touchneedle.draft.${this.id}`;
  }
}
