import { HttpClient } from '@angular/common/http';
import { Injectable, inject } from '@angular/core';
import { Observable, map } from 'rxjs';
import { ClubRole } from '#shared/access/audience';
import { ClubSummary, ClubView } from '#shared/accounts/session';

export interface NewClub {
  readonly name: string;
  readonly slug: string;
  readonly postalAddress: string;
  readonly timeZone: string;
  readonly secretaryEmail: string;
}

/** Clubs, their members, roles and invitations. Every change answers the club as it is then. */
@Injectable({ providedIn: 'root' })
export class ClubsApi {
  private readonly http = inject(HttpClient);

  clubs(): Observable<readonly ClubSummary[]> {
    return this.http
      .get<{ readonly items: readonly ClubSummary[] }>('/api/clubs')
      .pipe(map(({ items }) => items));
  }

  club(slug: string): Observable<ClubView> {
    return this.http.get<ClubView>(this.path(slug));
  }

  add(club: NewClub): Observable<ClubView> {
    return this.http.post<ClubView>('/api/clubs', club);
  }

  change(
    slug: string,
    change: Partial<Pick<NewClub, 'name' | 'postalAddress' | 'timeZone'>>,
  ): Observable<ClubView> {
    return this.http.patch<ClubView>(this.path(slug), change);
  }

  invite(slug: string, email: string, roles: readonly ClubRole[]): Observable<ClubView> {
    return this.http.post<ClubView>(`${this.path(slug)}/invitations`, { email, roles });
  }

  withdrawInvitation(slug: string, id: string): Observable<unknown> {
    return this.http.delete(`${this.path(slug)}/invitations/${encodeURIComponent(id)}`);
  }

  /** An empty list ends the membership. */
  setRoles(slug: string, personId: string, roles: readonly ClubRole[]): Observable<ClubView> {
    return this.http.put<ClubView>(
      `${this.path(slug)}/members/${encodeURIComponent(personId)}/roles`,
      { roles },
    );
  }

  private path(slug: string): string {
    return `/api/clubs/${encodeURIComponent(slug)}`;
  }
}
