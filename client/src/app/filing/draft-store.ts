import { DestroyRef, Injectable, computed, effect, inject, signal, untracked } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { EMPTY, Observable, Subject, catchError, concatMap, debounceTime, merge, switchMap, tap,
  timer } from 'rxjs';
import { ApiProblem } from '#shared/api-problem';
import { DraftView } from '#shared/reports/report-content';

import { isNetworkFailure, problemOf } from '../http/api-failure';
import { Connection } from '../http/connection';
import { EvidenceHistory } from './evidence-history';
import { FilingApi } from './filing-api';
import { FilingContent, contentOfDraft, draftOf, emptyContent, missingIn } from './filing-content';
import { KeptDrafts } from './kept-drafts';

/** Milliseconds without a keystroke after which a draft is saved. */
export const quietTime = 700;
/** Milliseconds until a failed save is tried again; twice as long after each failure. */
export const firstRetryTime = 2_000;
const longestRetryTime = 60_000;

export type SaveState = 'untouched' | 'saving' | 'saved' | 'unsaved' | 'stale';

/**
 * The report being written. Every change is kept in this browser at once and on the server a
 * moment later; a lost line keeps it here and tries again, a second tab that saved meanwhile
 * leaves the choice to the person.
 */
@Injectable()
export class DraftStore {
  private readonly api = inject(FilingApi);
  private readonly kept = inject(KeptDrafts);
  private readonly connection = inject(Connection);
  private readonly changes = new Subject<void>();
  private readonly retries = new Subject<number>();
  private readonly written = signal<FilingContent>(emptyContent(''));
  private readonly history = new EvidenceHistory();
  private id = '';
  private revision = 0;
  private failures = 0;
  /** False for a filed report, which is saved by sending it. */
  private isDraft = true;
  private isClosed = false;

  readonly content = this.written.asReadonly();
  readonly saveState = signal<SaveState>('untouched');
  readonly savedAt = signal<Date | null>(null);
  /** Why the last save failed; null where it went well. */
  readonly saveProblem = signal<ApiProblem | null>(null);
  /** The other tab's version, where it saved in between. */
  readonly other = signal<DraftView | null>(null);
  /** Of two versions the one not gone on with; kept until this page is left. */
  readonly setAside = signal<FilingContent | null>(null);
  /** Counts how often the whole content was replaced: fields of a form start afresh then. */
  readonly round = signal(0);
  readonly missing = computed(() => missingIn(this.written()));
  readonly canUndo = this.history.canUndo;
  readonly canRedo = this.history.canRedo;

  constructor() {
    merge(
      this.changes.pipe(debounceTime(quietTime)),
      this.retries.pipe(switchMap((milliseconds) => timer(milliseconds))),
    )
      .pipe(
        concatMap(() => this.save()),
        takeUntilDestroyed(inject(DestroyRef)),
      )
      .subscribe();
    effect(() => {
      if (this.connection.state() === 'good' && untracked(this.saveProblem)) this.retries.next(0);
    });
  }

  /** Starts with a draft from the server, or a new one; what this browser kept wins. */
  open(id: string, club: string, stored: DraftView | null): void {
    this.id = id;
    this.revision = stored?.revision ?? 0;
    this.written.set(stored ? contentOfDraft(stored.content, club) : emptyContent(club));
    this.savedAt.set(stored ? new Date(stored.updatedAt) : null);
    this.saveState.set(stored ? 'saved' : 'untouched');
    const kept = this.kept.read(id);
    if (!kept) return;
    this.written.set(contentOfDraft(kept.content, club));
    this.revision = kept.revision;
    this.saveState.set('unsaved');
    this.changes.next();
  }

  /** Starts with a filed report to be changed, which is no draft and is saved by sending it. */
  openFiled(number: string, rowVersion: number, content: FilingContent): void {
    this.id = `change ${number}`;
    this.revision = rowVersion;
    this.isDraft = false;
    const kept = this.kept.read(this.id);
    // What was kept of an older version would undo what changed since.
    const mine = kept?.revision === rowVersion ? kept : null;
    this.written.set(mine ? contentOfDraft(mine.content, content.club) : content);
    this.saveState.set(mine ? 'unsaved' : 'untouched');
  }

  /** Whether this browser holds something of the draft that the server may not have. */
  isKept(id: string): boolean {
    return this.kept.read(id) !== null;
  }

  update(change: Partial<FilingContent>): void {
    if (change.photos || change.tells) this.history.remember(this.written());
    this.replace({ ...this.written(), ...change });
  }

  /** Until its end, all changes of photos and pins are one step of undo. */
  beginGesture(): void {
    this.history.beginGesture();
  }

  endGesture(): void {
    this.history.endGesture();
  }

  undo(): void {
    const evidence = this.history.undo(this.written());
    if (evidence) this.replace({ ...this.written(), ...evidence });
  }

  redo(): void {
    const evidence = this.history.redo(this.written());
    if (evidence) this.replace({ ...this.written(), ...evidence });
  }

  /** Of two versions, this tab's: it is saved over the other, which is set aside. */
  keepMine(): void {
    const other = this.other();
    if (!other) return;
    this.setAside.set(contentOfDraft(other.content, this.written().club));
    this.revision = other.revision;
    this.other.set(null);
    this.saveState.set('unsaved');
    this.retries.next(0);
  }

  /** Of two versions, the other tab's; this tab's is set aside. */
  takeOther(): void {
    const other = this.other();
    if (!other) return;
    this.setAside.set(this.written());
    this.revision = other.revision;
    this.written.set(contentOfDraft(other.content, this.written().club));
    this.savedAt.set(new Date(other.updatedAt));
    this.other.set(null);
    this.saveState.set('saved');
    this.kept.forget(this.id);
    this.round.update((round) => round + 1);
  }

  /** Goes on with the version that was set aside, and sets this one aside. */
  changeToSetAside(): void {
    const aside = this.setAside();
    if (!aside) return;
    this.setAside.set(this.written());
    this.replace(aside);
    this.round.update((round) => round + 1);
  }

  /** The report is sent: nothing more is saved, and nothing stays behind in this browser. */
  close(): void {
    this.isClosed = true;
    this.saveState.set('saved');
    this.kept.forget(this.id);
  }

  private replace(content: FilingContent): void {
    this.written.set(content);
    if (this.isClosed) return;
    if (this.saveState() !== 'stale') this.saveState.set('unsaved');
    this.kept.keep(this.id, {
      revision: this.revision,
      content: draftOf(content),
      keptAt: new Date().toISOString(),
    });
    if (this.isDraft) this.changes.next();
  }

  private save(): Observable<unknown> {
    if (this.isClosed || this.saveState() !== 'unsaved') return EMPTY;
    const content = this.written();
    this.saveState.set('saving');
    return this.api.saveDraft(this.id, { revision: this.revision, content: draftOf(content) }).pipe(
      tap((saved) => this.noteSaved(saved, content)),
      catchError((error: unknown) => this.noteFailed(problemOf(error))),
    );
  }

  private noteSaved(saved: DraftView, content: FilingContent): void {
    this.failures = 0;
    this.revision = saved.revision;
    this.savedAt.set(new Date(saved.updatedAt));
    this.saveProblem.set(null);
    if (this.isClosed) return;
    const isWhole = this.written() === content;
    this.saveState.set(isWhole ? 'saved' : 'unsaved');
    if (isWhole) this.kept.forget(this.id);
    else this.changes.next();
  }

  private noteFailed(problem: ApiProblem): Observable<unknown> {
    if (this.isClosed) return EMPTY;
    if (problem.code === 'stale_version') return this.fetchOther();
    this.saveState.set('unsaved');
    this.saveProblem.set(problem);
    if (isNetworkFailure(problem) || problem.status >= 500 || problem.status === 429) {
      this.retries.next(Math.min(longestRetryTime, firstRetryTime * 2 ** this.failures));
      this.failures += 1;
    }
    return EMPTY;
  }

  private fetchOther(): Observable<unknown> {
    this.saveState.set('stale');
    return this.api.draft(this.id).pipe(
      tap((other) => this.other.set(other)),
      catchError((error: unknown) => {
        const problem = problemOf(error);
        // Removed elsewhere: what stands here is saved as a new draft.
        if (problem.status === 404) this.revision = 0;
        this.saveState.set('unsaved');
        this.saveProblem.set(problem);
        this.retries.next(firstRetryTime);
        return EMPTY;
      }),
    );
  }
}
