import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import {
  AccountLinkUse,
  AccountLinkView,
  NoticeView,
  SessionView,
} from '#shared/accounts/session';
import { Page } from '#shared/paging';
import { UnsubscribeView } from '#shared/watches/unsubscribe-view';

/** The account's own routes; signing in and out is the session store's. */
@Injectable({ providedIn: 'root' })
export class AccountApi {
  private readonly http = inject(HttpClient);

  register(email: string, displayName: string): Observable<unknown> {
    return this.http.post('/api/registrations', { email, displayName });
  }

  requestPasswordReset(email: string): Observable<unknown> {
    return this.http.post('/api/password-resets', { email });
  }

  readLink(token: string): Observable<AccountLinkView> {
    return this.http.get<AccountLinkView>(`/api/account-links/${encodeURIComponent(token)}`);
  }

  useLink(token: string, use: AccountLinkUse): Observable<SessionView> {
    return this.http.post<SessionView>(`/api/account-links/${encodeURIComponent(token)}`, use);
  }

  change(change: { displayName: string; timeZone: string }): Observable<SessionView> {
    return this.http.patch<SessionView>('/api/account', change);
  }

  changePassword(current: string, password: string): Observable<unknown> {
    return this.http.put('/api/account/password', { current, password });
  }

  notices(after?: string): Observable<Page<NoticeView>> {
    return this.http.get<Page<NoticeView>>('/api/notices', { params: after ? { after } : {} });
  }

  markNoticeRead(id: string): Observable<unknown> {
    return this.http.put(`/api/notices/${encodeURIComponent(id)}/read`, {});
  }

  /** What the link of a mail would stop; stops nothing. */
  readUnsubscription(token: string): Observable<UnsubscribeView> {
    return this.http.get<UnsubscribeView>(`/api/unsubscribe/${encodeURIComponent(token)}`);
  }

  stopAllMail(token: string): Observable<UnsubscribeView> {
    return this.http.post<UnsubscribeView>(`/api/unsubscribe/${encodeURIComponent(token)}`, {});
  }
}
