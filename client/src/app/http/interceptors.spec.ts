import {
  HttpClient,
  HttpContext,
  HttpXsrfTokenExtractor,
  provideHttpClient,
  withInterceptors,
} from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { Router, provideRouter } from '@angular/router';
import { vi } from 'vitest';

import { ApiFailure } from './api-failure';
import { Connection } from './connection';
import {
  STAYS_WHEN_SIGNED_OUT,
  connectionInterceptor,
  freshTokenInterceptor,
  problemInterceptor,
  signInInterceptor,
} from './interceptors';

describe('the interceptors', () => {
  let token = 'old';

  beforeEach(() => {
    vi.useFakeTimers();
    TestBed.configureTestingModule({
      providers: [
        provideRouter([{ path: 'sign-in', children: [] }]),
        provideHttpClient(
          withInterceptors([
            problemInterceptor,
            signInInterceptor,
            freshTokenInterceptor,
            connectionInterceptor,
          ]),
        ),
        provideHttpClientTesting(),
        { provide: HttpXsrfTokenExtractor, useValue: { getToken: () => token } },
      ],
    });
  });

  afterEach(() => {
    TestBed.inject(HttpTestingController).verify();
    vi.useRealTimers();
  });

  const http = (): HttpClient => TestBed.inject(HttpClient);
  const server = (): HttpTestingController => TestBed.inject(HttpTestingController);
  const line = (): string => TestBed.inject(Connection).state();
  const problem = (status: number, code: string) =>
    [{ type: 'about:blank', title: '', status, code }, { status, statusText: code }] as const;

  function failureOf(path: string, context = new HttpContext()): { failure?: ApiFailure } {
    const seen: { failure?: ApiFailure } = {};
    http().get(path, { context }).subscribe({
      error: (error: unknown) => {
        if (error instanceof ApiFailure) seen.failure = error;
      },
    });
    return seen;
  }

  it('repeats a read whose answer never came, and says so meanwhile', () => {
    let answer: unknown;
    http().get('/api/x').subscribe((value) => (answer = value));
    server().expectOne('/api/x').error(new ProgressEvent('error'));
    expect(line()).toBe('unanswered');
    vi.advanceTimersByTime(400);
    server().expectOne('/api/x').flush({ well: true });
    expect(answer).toEqual({ well: true });
    expect(line()).toBe('good');
  });

  it('gives up on a read after four tries', () => {
    const seen = failureOf('/api/x');
    for (const pause of [400, 800, 1600, 0]) {
      server().expectOne('/api/x').error(new ProgressEvent('error'));
      vi.advanceTimersByTime(pause);
    }
    expect(seen.failure?.problem).toMatchObject({ status: 0, code: 'unavailable' });
  });

  it('never repeats what may have been done', () => {
    let failed = false;
    http().post('/api/x', {}).subscribe({ error: () => (failed = true) });
    server().expectOne('/api/x').error(new ProgressEvent('error'));
    vi.advanceTimersByTime(10_000);
    expect(failed).toBe(true);
  });

  it('hands on the problem document, typed', () => {
    const seen = failureOf('/api/x');
    server().expectOne('/api/x').flush(...problem(409, 'stale_version'));
    expect(seen.failure?.problem.code).toBe('stale_version');
  });

  it('reads a code it does not know by its status', () => {
    const seen = failureOf('/api/x');
    server().expectOne('/api/x').flush(...problem(404, 'never_heard_of'));
    expect(seen.failure?.problem.code).toBe('not_found');
  });

  it('leads to the sign-in where the session has ended, unless the sender stays', () => {
    const navigate = vi.spyOn(TestBed.inject(Router), 'navigate').mockResolvedValue(true);
    failureOf('/api/x', new HttpContext().set(STAYS_WHEN_SIGNED_OUT, true));
    server().expectOne('/api/x').flush(...problem(401, 'not_signed_in'));
    expect(navigate).not.toHaveBeenCalled();
    failureOf('/api/x');
    server().expectOne('/api/x').flush(...problem(401, 'not_signed_in'));
    expect(navigate).toHaveBeenCalledWith(['/sign-in'], { queryParams: { returnTo: '/' } });
  });

  it('stays where a password was wrong', () => {
    const navigate = vi.spyOn(TestBed.inject(Router), 'navigate').mockResolvedValue(true);
    failureOf('/api/x');
    server().expectOne('/api/x').flush(...problem(401, 'wrong_credentials'));
    expect(navigate).not.toHaveBeenCalled();
  });

  it('fetches a new token once and repeats the request with it', () => {
    let done = false;
    http().post('/api/x', { a: 1 }).subscribe(() => (done = true));
    server().expectOne('/api/x').flush(...problem(403, 'csrf_refused'));
    token = 'new';
    server().expectOne('/api/session').flush({ person: null });
    const repeated = server().expectOne('/api/x');
    expect(repeated.request.headers.get('X-XSRF-TOKEN')).toBe('new');
    expect(repeated.request.body).toEqual({ a: 1 });
    repeated.flush({});
    expect(done).toBe(true);
  });

  it('says that the line is slow after four seconds, and no longer than it is', () => {
    http().get('/api/x').subscribe();
    vi.advanceTimersByTime(3999);
    expect(line()).toBe('good');
    vi.advanceTimersByTime(1);
    expect(line()).toBe('slow');
    server().expectOne('/api/x').flush({});
    expect(line()).toBe('good');
  });
});
