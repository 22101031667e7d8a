import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { DraftContent, DraftView } from '#shared/reports/report-content';

import { problemOf } from '../../http/api-failure';
import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { Caution } from '../../ui/caution';
import { PageHeader } from '../../ui/page-header';
import { StateMessage } from '../../ui/state-message';
import { WhenPipe } from '../../ui/when-pipe';
import { NEW_ID } from '../../ui/new-id';
import { FilingApi } from '../filing-api';
import { KeptDrafts } from '../kept-drafts';

/** Where filing starts: a new report, or one of those begun. */
@Component({
  selector: 'tn-draft-list',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Caution, MatButton, PageHeader, RouterLink, StateMessage, WhenPipe],
  host: { class: 'tn-page tn-narrow' },
  templateUrl: './draft-list.html',
  styleUrl: './draft-list.scss',
})
export class DraftList {
  private readonly api = inject(FilingApi);
  private readonly router = inject(Router);
  private readonly newId = inject(NEW_ID);
  private readonly untilDestroyed = takeUntilDestroyed<LoadState<{
    readonly items: readonly DraftView[];
  }>>();

  protected readonly drafts = signal<LoadState<{ readonly items: readonly DraftView[] }>>({
    state: 'loading',
  });
  protected readonly removed = signal<DraftView | null>(null);
  protected readonly problem = signal('');
  protected readonly words = problemWords;
  /** Reports that this browser holds changes of which the server may not have. */
  protected readonly kept = inject(KeptDrafts)
    .all()
    .filter(({ id }) => !id.startsWith('change '));

  constructor() {
    this.loadDrafts();
  }

  protected loadDrafts(): void {
    loadState(this.api.drafts())
      .pipe(this.untilDestroyed)
      .subscribe((drafts) => this.drafts.set(drafts));
  }

  protected startReport(): void {
    void this.router.navigate(['/file', this.newId()]);
  }

  protected removeDraft(draft: DraftView): void {
    this.problem.set('');
    this.api.removeDraft(draft.id).subscribe({
      next: () => {
        this.removed.set(draft);
        this.loadDrafts();
      },
      error: (error: unknown) => this.problem.set(problemWords(problemOf(error))),
    });
  }

  /** The removed draft is still here: saving it makes it anew. */
  protected bringBack(draft: DraftView): void {
    this.api.saveDraft(draft.id, { revision: 0, content: draft.content }).subscribe({
      next: () => {
        this.removed.set(null);
        this.loadDrafts();
      },
      error: (error: unknown) => this.problem.set(problemWords(problemOf(error))),
    });
  }

  protected removalWords(draft: DraftView): string {
    return $localize`Remove the draft ${this.titleOf(draft)}:title:`;
  }

  protected titleOf({ content }: { readonly content: DraftContent }): string {
    const { presentedAs } = content;
    const name = presentedAs?.description || (presentedAs?.coinType ?? '').replaceAll('-', ' ');
    return [name || $localize`Report without a name yet`, presentedAs?.year ?? '']
      .join(' ')
      .trim();
  }
}
