import { HttpClient, HttpParams } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import { MailLedgerRow, MailSettlement } from '#shared/mail/mail-ledger';
import { Page } from '#shared/paging';

/** The registrar's own routes. */
@Injectable({ providedIn: 'root' })
export class RegistryApi {
  private readonly http = inject(HttpClient);

  mail(state?: string | null, after?: string | null): Observable<Page<MailLedgerRow>> {
    let params = new HttpParams();
    if (state) params = params.set('state', state);
    if (after) params = params.set('after', after);
    return this.http.get<Page<MailLedgerRow>>('/api/registry/mail', { params });
  }

  settle(id: string, settlement: MailSettlement): Observable<unknown> {
    return this.http.post(`/api/registry/mail/${encodeURIComponent(id)}/settlement`, settlement);
  }
}
