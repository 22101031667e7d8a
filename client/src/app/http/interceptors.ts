import {
  HttpContextToken,
  HttpErrorResponse,
  HttpInterceptorFn,
  HttpRequest,
  HttpResponse,
  HttpXsrfTokenExtractor,
} from '@angular/common/http';
import { inject } from '@angular/core';
import { Router } from '@angular/router';
import { catchError, finalize, retry, switchMap, tap, throwError, timer } from 'rxjs';

import { ApiFailure, problemOf } from './api-failure';
import { Connection } from './connection';

/** Set on a request whose sender handles a lost session itself, such as a draft being saved. */
export const STAYS_WHEN_SIGNED_OUT = new HttpContextToken<boolean>(() => false);

const retriesOfReads = 3;
const firstRetryMilliseconds = 400;
const slowAfterMilliseconds = 4000;
const statusesWorthRetrying = [0, 502, 503, 504];

/** Repeats unanswered reads with a growing pause, and tells {@link Connection} how it goes. */
export const connectionInterceptor: HttpInterceptorFn = (request, next) => {
  const connection = inject(Connection);
  // A photo being sent takes its time and shows its own progress.
  const watched = !request.reportProgress;
  let slow = false;
  const patience = timer(slowAfterMilliseconds).subscribe(() => {
    slow = watched;
    if (slow) connection.noteSlow();
  });

  return next(request).pipe(
    retry({
      count: request.method === 'GET' ? retriesOfReads : 0,
      delay: (error: unknown, tries) => {
        if (!isUnanswered(error)) return throwError(() => error);
        connection.noteUnanswered();
        return timer(firstRetryMilliseconds * 2 ** (tries - 1));
      },
    }),
    tap({
      next: (event) => {
        if (event instanceof HttpResponse) connection.noteAnswered();
      },
      error: (error: unknown) =>
        isUnanswered(error) ? connection.noteUnanswered() : connection.noteAnswered(),
    }),
    finalize(() => {
      patience.unsubscribe();
      if (slow) connection.noteSlowEnded();
    }),
  );
};

/** Turns every failure into an {@link ApiFailure}. */
export const problemInterceptor: HttpInterceptorFn = (request, next) =>
  next(request).pipe(
    catchError((error: unknown) => throwError(() => new ApiFailure(problemOf(error), error))),
  );

/** Sends the reader to the sign-in, with the way back, where the session has ended. */
export const signInInterceptor: HttpInterceptorFn = (request, next) => {
  const router = inject(Router);
  return next(request).pipe(
    tap({
      error: (error: unknown) => {
        const lost = problemOf(error).code === 'not_signed_in';
        if (!lost || request.context.get(STAYS_WHEN_SIGNED_OUT)) return;
        const returnTo = router.currentNavigation()?.finalUrl?.toString() ?? router.url;
        if (returnTo.startsWith('/sign-in')) return;
        void router.navigate(['/sign-in'], { queryParams: { returnTo } });
      },
    }),
  );
};

/**
 * A page left open longer than its token lives gets a new one from `GET /api/session` and
 * repeats its request once.
 */
export const freshTokenInterceptor: HttpInterceptorFn = (request, next) => {
  const extractor = inject(HttpXsrfTokenExtractor);
  return next(request).pipe(
    catchError((error: unknown) => {
      if (problemOf(error).code !== 'csrf_refused') return throwError(() => error);
      return next(new HttpRequest('GET', '/api/session')).pipe(
        // Progress events of the session's answer come before it; the last one repeats.
        switchMap((event) => (event instanceof HttpResponse ? next(withToken()) : [])),
      );
    }),
  );

  function withToken(): typeof request {
    const token = extractor.getToken();
    return token ? request.clone({ setHeaders: { 'X-XSRF-TOKEN': token } }) : request;
  }
};

function isUnanswered(error: unknown): boolean {
  return error instanceof HttpErrorResponse && statusesWorthRetrying.includes(error.status);
}
