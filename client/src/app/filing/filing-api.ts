import { HttpClient, HttpContext, HttpEvent } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable } from 'rxjs';
import { ClubSummary } from '#shared/accounts/session';
import { BlurArea, UploadedPhoto } from '#shared/reports/photo';
import { DraftSave, DraftView, FiledReport, ReportContent } from '#shared/reports/report-content';
import { MyReportContent } from '#shared/reports/report-view';

import { STAYS_WHEN_SIGNED_OUT } from '../http/interceptors';

/** What is being written stays on screen where the session ends meanwhile. */
const staying = { context: new HttpContext().set(STAYS_WHEN_SIGNED_OUT, true) };

/** Drafts, photos and the filing itself. */
@Injectable({ providedIn: 'root' })
export class FilingApi {
  private readonly http = inject(HttpClient);

  drafts(): Observable<{ readonly items: readonly DraftView[] }> {
    return this.http.get<{ readonly items: readonly DraftView[] }>('/api/drafts');
  }

  draft(id: string): Observable<DraftView> {
    return this.http.get<DraftView>(`/api/drafts/${id}`);
  }

  saveDraft(id: string, save: DraftSave): Observable<DraftView> {
    return this.http.put<DraftView>(`/api/drafts/${id}`, save, staying);
  }

  removeDraft(id: string): Observable<unknown> {
    return this.http.delete(`/api/drafts/${id}`);
  }

  /** Sends one photo; the events tell how far it is. */
  uploadPhoto(id: string, file: Blob): Observable<HttpEvent<UploadedPhoto>> {
    const form = new FormData();
    form.append('id', id);
    form.append('photo', file);
    return this.http.post<UploadedPhoto>('/api/photos', form, {
      ...staying,
      reportProgress: true,
      observe: 'events',
    });
  }

  photo(id: string): Observable<UploadedPhoto> {
    return this.http.get<UploadedPhoto>(`/api/photos/${id}`);
  }

  blurPhoto(id: string, blurs: readonly BlurArea[]): Observable<UploadedPhoto> {
    return this.http.put<UploadedPhoto>(`/api/photos/${id}/blurs`, { blurs }, staying);
  }

  file(id: string, content: ReportContent): Observable<FiledReport> {
    return this.http.post<FiledReport>('/api/reports', { id, content }, staying);
  }

  filedContent(number: string): Observable<MyReportContent> {
    return this.http.get<MyReportContent>(`/api/my/reports/${number}/content`);
  }

  change(number: string, rowVersion: number, content: ReportContent): Observable<FiledReport> {
    return this.http.put<FiledReport>(`/api/my/reports/${number}/content`, { rowVersion, content },
      staying);
  }

  clubs(): Observable<{ readonly items: readonly ClubSummary[] }> {
    return this.http.get<{ readonly items: readonly ClubSummary[] }>('/api/clubs');
  }
}
