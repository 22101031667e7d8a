import { HttpClient, HttpResponse } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable, map } from 'rxjs';
import { ClubSummary } from '#shared/accounts/session';
import { DecisionRequest, LeaseView, QueueAnswer, QueueFlag,
  ReviewView } from '#shared/review/review';

export interface QueueFilter {
  readonly flag?: QueueFlag;
  /** Slug of the club it was filed in. */
  readonly club?: string;
  /** Slug of the coin type it is presented as. */
  readonly coinType?: string;
  readonly after?: string;
}

/** A lease with the seconds it still had when the server answered, whatever this clock says. */
export interface TimedLease extends LeaseView {
  readonly secondsLeft: number;
}

export interface TimedReview extends ReviewView {
  readonly lease: TimedLease | null;
}

/** The moderator's routes. */
@Injectable({ providedIn: 'root' })
export class ReviewApi {
  private readonly http = inject(HttpClient);

  queue(filter: QueueFilter): Observable<QueueAnswer> {
    return this.http.get<QueueAnswer>('/api/review/queue', { params: { ...filter } });
  }

  clubs(): Observable<readonly ClubSummary[]> {
    return this.http
      .get<{ items: readonly ClubSummary[] }>('/api/clubs')
      .pipe(map(({ items }) => items));
  }

  review(number: string): Observable<TimedReview> {
    return this.http
      .get<ReviewView>(this.address(number), { observe: 'response' })
      .pipe(map(timedReview));
  }

  /** Takes the lease, or renews one's own. */
  claim(number: string): Observable<TimedLease> {
    return this.http
      .post<LeaseView>(`${this.address(number)}/lease`, {}, { observe: 'response' })
      .pipe(map((response) => timed(bodyOf(response), response)));
  }

  release(number: string): Observable<unknown> {
    return this.http.delete(`${this.address(number)}/lease`);
  }

  decide(number: string, decision: DecisionRequest): Observable<TimedReview> {
    return this.http
      .post<ReviewView>(`${this.address(number)}/decisions`, decision, { observe: 'response' })
      .pipe(map(timedReview));
  }

  declareConflict(number: string, note: string): Observable<unknown> {
    return this.http.post(`${this.address(number)}/conflict`, { note });
  }

  private address(number: string): string {
    return `/api/review/reports/${encodeURIComponent(number)}`;
  }
}

function timedReview(response: HttpResponse<ReviewView>): TimedReview {
  const view = bodyOf(response);
  return { ...view, lease: view.lease && timed(view.lease, response) };
}

function timed(lease: LeaseView, response: HttpResponse<unknown>): TimedLease {
  const date = response.headers.get('Date');
  const serverNow = date ? new Date(date).getTime() : Date.now();
  const milliseconds = new Date(lease.expiresAt).getTime() - serverNow;
  return { ...lease, secondsLeft: Math.max(0, Math.floor(milliseconds / 1000)) };
}

function bodyOf<Body>(response: HttpResponse<Body>): Body {
  if (response.body === null) throw new Error('the answer has no body');
  return response.body;
}
