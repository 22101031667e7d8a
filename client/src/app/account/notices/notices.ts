import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { Subject, combineLatest, startWith, switchMap } from 'rxjs';
import { NoticeView } from '#shared/accounts/session';
import { Page } from '#shared/paging';

import { SessionStore } from '../../auth/session-store';
import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { PageHeader } from '../../ui/page-header';
import { Paging } from '../../ui/paging';
import { StateMessage } from '../../ui/state-message';
import { WhenPipe } from '../../ui/when-pipe';
import { AccountApi } from '../account-api';

/** What became of the reader's own reports, the newest first. */
@Component({
  selector: 'tn-notices',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, PageHeader, Paging, RouterLink, StateMessage, WhenPipe],
  host: { class: 'tn-page tn-narrow' },
  templateUrl: './notices.html',
  styleUrl: './notices.scss',
})
export class Notices {
  private readonly api = inject(AccountApi);
  private readonly session = inject(SessionStore);
  private readonly reload = new Subject<void>();
  private readonly readNow = signal<ReadonlySet<string>>(new Set());

  /** Key of the page, from the address. */
  readonly after = input<string>();

  protected readonly timeZone = computed(() => this.session.person()?.timeZone);
  protected readonly page = toSignal(
    combineLatest([toObservable(this.after), this.reload.pipe(startWith(undefined))]).pipe(
      switchMap(([after]) => loadState(this.api.notices(after))),
    ),
    { initialValue: { state: 'loading' } satisfies LoadState<Page<NoticeView>> },
  );
  protected readonly problem = computed(() => {
    const page = this.page();
    return page.state === 'failed' ? page.problem : null;
  });
  protected readonly problemText = computed(() => {
    const problem = this.problem();
    return problem ? problemWords(problem) : '';
  });

  protected words(notice: NoticeView): string {
    return noticeWords(notice.kind);
  }

  protected isUnread(notice: NoticeView): boolean {
    return notice.readAt === null && !this.readNow().has(notice.id);
  }

  protected markRead(notice: NoticeView): void {
    if (!this.isUnread(notice)) return;
    this.readNow.update((ids) => new Set(ids).add(notice.id));
    const unread = this.session.person()?.unreadNotices ?? 0;
    this.session.keepUnreadNotices(Math.max(0, unread - 1));
    // Left unread by a lost line it only shows again: nothing to tell the reader.
    this.api.markNoticeRead(notice.id).subscribe({ error: () => undefined });
  }

  protected loadAgain(): void {
    this.reload.next();
  }
}

function noticeWords(kind: string): string {
  switch (kind) {
    case 'report_filed':
      return $localize`Filed, and waiting for review`;
    case 'report_published':
      return $localize`Published`;
    case 'report_returned':
      return $localize`Returned: changes are asked`;
    case 'report_declined':
      return $localize`Declined`;
    case 'report_unresolved':
      return $localize`Cannot be told from this evidence`;
    case 'report_made_public':
      return $localize`Now open to everyone`;
    case 'report_retracted':
      return $localize`Retracted`;
    default:
      return $localize`News of a report`;
  }
}
