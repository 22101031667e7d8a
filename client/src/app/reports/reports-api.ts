import { HttpClient, HttpParams } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { EMPTY, Observable, expand, find, map, mergeMap } from 'rxjs';
import { Page } from '#shared/paging';
import {
  MyReport,
  MyReportContent,
  ReportSearchAnswer,
  ReportView,
  SearchSuggestion,
} from '#shared/reports/report-view';
import { WatchFilter, filterToQuery } from '#shared/watches/watch-filter';

export interface SearchOptions {
  /** The words as they are, without mending a slip of spelling. */
  readonly exact?: boolean;
  readonly after?: string | null;
  readonly limit?: number;
}

/** Published reports, and a member's own. */
@Injectable({ providedIn: 'root' })
export class ReportsApi {
  private readonly http = inject(HttpClient);

  search(filter: WatchFilter, options: SearchOptions = {}): Observable<ReportSearchAnswer> {
    let params = new HttpParams({ fromObject: filterToQuery(filter) });
    if (options.exact) params = params.set('exact', '1');
    if (options.after) params = params.set('after', options.after);
    if (options.limit) params = params.set('limit', options.limit);
    return this.http.get<ReportSearchAnswer>('/api/reports', { params });
  }

  suggestions(text: string): Observable<readonly SearchSuggestion[]> {
    return this.http
      .get<{ readonly items: readonly SearchSuggestion[] }>('/api/reports/suggestions', {
        params: { text },
      })
      .pipe(map(({ items }) => items));
  }

  /** The version shown now, or an earlier one that the reader may see. */
  report(number: string, version?: string | null): Observable<ReportView> {
    return this.http.get<ReportView>(`/api/reports/${encodeURIComponent(number)}`, {
      params: version ? { version } : {},
    });
  }

  myReports(after?: string | null): Observable<Page<MyReport>> {
    return this.http.get<Page<MyReport>>('/api/my/reports', { params: after ? { after } : {} });
  }

  /** The row of one's own report in the list, which alone says what was decided and why. */
  myReportRow(number: string): Observable<MyReport | undefined> {
    return this.myReports().pipe(
      expand(({ next }) => (next ? this.myReports(next) : EMPTY)),
      mergeMap(({ items }) => items),
      find((report) => report.number === number),
    );
  }

  /** One's own report in its newest version, whatever its state. */
  myReport(number: string): Observable<ReportView> {
    return this.http.get<ReportView>(`/api/my/reports/${encodeURIComponent(number)}`);
  }

  myReportContent(number: string): Observable<MyReportContent> {
    return this.http.get<MyReportContent>(
      `/api/my/reports/${encodeURIComponent(number)}/content`,
    );
  }

  withdraw(number: string, rowVersion: number): Observable<unknown> {
    return this.http.post(`/api/my/reports/${encodeURIComponent(number)}/withdrawal`, {
      rowVersion,
    });
  }
}
