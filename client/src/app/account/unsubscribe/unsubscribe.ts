import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { Subject, combineLatest, startWith, switchMap } from 'rxjs';
import { UnsubscribeView } from '#shared/watches/unsubscribe-view';

import { problemOf } from '../../http/api-failure';
import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { PageHeader } from '../../ui/page-header';
import { StateMessage } from '../../ui/state-message';
import { AccountApi } from '../account-api';

/**
 * Where the link at the foot of a digest leads, without signing in. Opening the page stops
 * nothing, since mail programs open links by themselves: the button does.
 */
@Component({
  selector: 'tn-unsubscribe',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, PageHeader, RouterLink, StateMessage],
  host: { class: 'tn-page tn-narrow' },
  templateUrl: './unsubscribe.html',
  styleUrl: '../account-form.scss',
})
export class Unsubscribe {
  private readonly api = inject(AccountApi);
  private readonly reload = new Subject<void>();

  /** From the address. */
  readonly token = input.required<string>();

  protected readonly view = toSignal(
    combineLatest([toObservable(this.token), this.reload.pipe(startWith(undefined))]).pipe(
      switchMap(([token]) => loadState(this.api.readUnsubscription(token))),
    ),
    { initialValue: { state: 'loading' } satisfies LoadState<UnsubscribeView> },
  );
  protected readonly loadProblem = computed(() => {
    const view = this.view();
    return view.state === 'failed' ? view.problem : null;
  });
  protected readonly loadProblemText = computed(() => {
    const problem = this.loadProblem();
    return problem ? problemWords(problem) : '';
  });
  protected readonly state = signal<'asking' | 'busy' | 'stopped'>('asking');
  protected readonly problem = signal('');

  protected stopAllMail(): void {
    if (this.state() === 'busy') return;
    this.state.set('busy');
    this.problem.set('');
    this.api.stopAllMail(this.token()).subscribe({
      next: () => this.state.set('stopped'),
      error: (error: unknown) => {
        this.state.set('asking');
        this.problem.set(problemWords(problemOf(error)));
      },
    });
  }

  protected loadAgain(): void {
    this.reload.next();
  }
}
