import { Injectable, inject, signal } from '@angular/core';
import { EMPTY, Observable, catchError, map } from 'rxjs';
import { WatchFilter } from '#shared/watches/watch-filter';

import { CatalogueApi } from '../reports/catalogue-api';
import { CatalogueNames } from './watch-words';

/** Names of the coin types and tells that watches speak of, fetched as they are needed. */
@Injectable({ providedIn: 'root' })
export class CatalogueNamesStore {
  private readonly catalogue = inject(CatalogueApi);
  private readonly known = signal<CatalogueNames>(new Map());
  private readonly asked = new Set<string>();

  readonly names = this.known.asReadonly();

  /** Until a name has come, and where it never does, the slug or id stands in its place. */
  fetchFor(filters: readonly WatchFilter[]): void {
    if (filters.some(({ tell }) => tell?.length)) this.fetchOnce('tells', this.tells());
    for (const slug of filters.flatMap(({ coinType }) => coinType ?? [])) {
      this.fetchOnce(`coin type ${slug}`, this.coinType(slug));
    }
  }

  private fetchOnce(what: string, request: Observable<readonly (readonly [string, string])[]>) {
    if (this.asked.has(what)) return;
    this.asked.add(what);
    request
      .pipe(catchError(() => EMPTY))
      .subscribe((found) => this.known.update((known) => new Map([...known, ...found])));
  }

  private tells(): Observable<readonly (readonly [string, string])[]> {
    return this.catalogue
      .tells()
      .pipe(map(({ tells }) => tells.map(({ id, name }) => [id, name] as const)));
  }

  private coinType(slug: string): Observable<readonly (readonly [string, string])[]> {
    return this.catalogue.coinType(slug).pipe(map(({ name }) => [[slug, name] as const]));
  }
}
