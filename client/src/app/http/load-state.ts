import { Observable, catchError, map, of, startWith } from 'rxjs';
import { ApiProblem } from '#shared/api-problem';

import { problemOf } from './api-failure';

/** What a screen shows of a request: waiting, the data, or the problem. */
export type LoadState<Data> =
  | { readonly state: 'loading' }
  | { readonly state: 'ready'; readonly data: Data }
  | { readonly state: 'failed'; readonly problem: ApiProblem };

/** Turns one request into the states of a screen; never errors. */
export function loadState<Data>(request: Observable<Data>): Observable<LoadState<Data>> {
  return request.pipe(
    map((data): LoadState<Data> => ({ state: 'ready', data })),
    catchError((error: unknown) =>
      of<LoadState<Data>>({ state: 'failed', problem: problemOf(error) }),
    ),
    startWith<LoadState<Data>>({ state: 'loading' }),
  );
}
