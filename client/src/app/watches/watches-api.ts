import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable, map } from 'rxjs';
import { WatchFilter, WatchSave, WatchView } from '#shared/watches/watch-filter';

/** How many published reports fit a filter now; `more` where the count was cut short. */
export interface WatchPreview {
  readonly count: number;
  readonly more: boolean;
}

/** The reader's own standing searches. */
@Injectable({ providedIn: 'root' })
export class WatchesApi {
  private readonly http = inject(HttpClient);

  list(): Observable<readonly WatchView[]> {
    return this.http
      .get<{ items: readonly WatchView[] }>('/api/watches')
      .pipe(map(({ items }) => items));
  }

  /** Adds, changes, or brings back a removed one: `id` is made here, so repeating is safe. */
  save(id: string, watch: WatchSave): Observable<WatchView> {
    return this.http.put<WatchView>(`/api/watches/${encodeURIComponent(id)}`, watch);
  }

  remove(id: string): Observable<unknown> {
    return this.http.delete(`/api/watches/${encodeURIComponent(id)}`);
  }

  preview(filter: WatchFilter): Observable<WatchPreview> {
    return this.http.post<WatchPreview>('/api/watches/preview', { filter });
  }
}
