import {
  ChangeDetectionStrategy, Component, DestroyRef, computed, inject, input, signal,
} from '@angular/core';
import { takeUntilDestroyed, toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatSelectModule } from '@angular/material/select';
import { Router, RouterLink } from '@angular/router';
import { BehaviorSubject, combineLatest, switchMap } from 'rxjs';
import { MailLedgerRow, MailSettlement, mailStates } from '#shared/mail/mail-ledger';
import { Page } from '#shared/paging';

import { problemOf } from '../../http/api-failure';
import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { Caution } from '../../ui/caution';
import { PageHeader } from '../../ui/page-header';
import { Paging } from '../../ui/paging';
import { StateMessage } from '../../ui/state-message';
import { WhenPipe } from '../../ui/when-pipe';
import { mailKindWords, mailStateWords } from '../mail-words';
import { RegistryApi } from '../registry-api';

/** Every mail the registry sent or means to; the uncertain ones are settled here by hand. */
@Component({
  selector: 'tn-mail-ledger',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    Caution, MatButton, MatFormFieldModule, MatSelectModule, PageHeader, Paging, RouterLink,
    StateMessage, WhenPipe,
  ],
  host: { class: 'tn-page' },
  templateUrl: './mail-ledger.html',
  styleUrl: './mail-ledger.scss',
})
export class MailLedger {
  private readonly api = inject(RegistryApi);
  private readonly router = inject(Router);
  private readonly destroyed = inject(DestroyRef);
  private readonly reload = new BehaviorSubject<void>(undefined);

  /** From the address. */
  readonly state = input<string>();
  readonly after = input<string>();

  protected readonly answer = toSignal(
    combineLatest([
      toObservable(computed(() => ({ state: this.state(), after: this.after() }))),
      this.reload,
    ]).pipe(switchMap(([{ state, after }]) => loadState(this.api.mail(state, after)))),
    { initialValue: { state: 'loading' } satisfies LoadState<Page<MailLedgerRow>> },
  );
  protected readonly rows = computed(() => {
    const answer = this.answer();
    if (answer.state !== 'ready') return [];
    return answer.data.items.map((mail) => ({
      ...mail,
      kindText: mailKindWords(mail.kind),
      stateText: mailStateWords(mail.state),
    }));
  });
  protected readonly problem = computed(() => {
    const answer = this.answer();
    return answer.state === 'failed' ? answer.problem : null;
  });
  protected readonly problemText = computed(() => {
    const problem = this.problem();
    return problem ? problemWords(problem) : '';
  });
  protected readonly stateOptions = mailStates.map((value) => ({
    value,
    label: mailStateWords(value),
  }));
  protected readonly settling = signal<string | null>(null);
  protected readonly busy = signal(false);
  protected readonly refusal = signal('');

  protected showState(state: string): void {
    void this.router.navigate(['/registry/mail'], { queryParams: state ? { state } : {} });
  }

  protected askSettlement(id: string): void {
    this.refusal.set('');
    this.settling.set(id);
  }

  protected leaveSettlement(): void {
    this.settling.set(null);
  }

  protected settle(id: string, outcome: MailSettlement['outcome']): void {
    if (this.busy()) return;
    this.busy.set(true);
    this.api
      .settle(id, { outcome })
      .pipe(takeUntilDestroyed(this.destroyed))
      .subscribe({
        next: () => this.endSettlement(''),
        error: (error: unknown) => this.endSettlement(problemWords(problemOf(error))),
      });
  }

  protected loadAgain(): void {
    this.reload.next();
  }

  private endSettlement(refusal: string): void {
    this.busy.set(false);
    this.settling.set(null);
    this.refusal.set(refusal);
    this.reload.next();
  }
}
