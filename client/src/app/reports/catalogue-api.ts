import { HttpClient, HttpParams } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { EMPTY, Observable, catchError, expand, map, mergeMap, reduce, shareReplay,
  throwError } from 'rxjs';
import { CoinTypeSummary, CoinTypeView, TaxonomyView } from '#shared/catalogue/coin-type-view';
import { Page } from '#shared/paging';

export interface CoinTypeQuery {
  readonly text?: string;
  readonly kind?: string;
  readonly metal?: string;
  readonly after?: string;
}

/** Coin types with their standards, and the tells. */
@Injectable({ providedIn: 'root' })
export class CatalogueApi {
  private readonly http = inject(HttpClient);
  private taxonomy: Observable<TaxonomyView> | null = null;
  private names: Observable<ReadonlyMap<string, string>> | null = null;

  coinTypes(query: CoinTypeQuery): Observable<Page<CoinTypeSummary>> {
    let params = new HttpParams();
    for (const [name, value] of Object.entries(query)) {
      if (value) params = params.set(name, String(value));
    }
    return this.http.get<Page<CoinTypeSummary>>('/api/coin-types', { params });
  }

  coinType(slug: string): Observable<CoinTypeView> {
    return this.http.get<CoinTypeView>(`/api/coin-types/${encodeURIComponent(slug)}`);
  }

  /** The tells that the reader may see; asked once a visit. */
  tells(): Observable<TaxonomyView> {
    this.taxonomy ??= this.http.get<TaxonomyView>('/api/tells').pipe(
      // A failure must not stay for the rest of the visit.
      catchError((error: unknown) => {
        this.taxonomy = null;
        return throwError(() => error);
      }),
      shareReplay({ bufferSize: 1, refCount: false }),
    );
    return this.taxonomy;
  }

  /** Names of all coin types by slug; asked once a visit. */
  coinTypeNames(): Observable<ReadonlyMap<string, string>> {
    this.names ??= this.coinTypes({}).pipe(
      expand(({ next }) => (next ? this.coinTypes({ after: next }) : EMPTY)),
      mergeMap(({ items }) => items),
      map(({ slug, name }) => [slug, name] as const),
      reduce((names, [slug, name]) => names.set(slug, name), new Map<string, string>()),
      catchError((error: unknown) => {
        this.names = null;
        return throwError(() => error);
      }),
      shareReplay({ bufferSize: 1, refCount: false }),
    );
    return this.names;
  }
}
