import { HttpClient } from '@angular/common/http';
import { Injectable, computed, inject, signal } from '@angular/core';
import { toObservable } from '@angular/core/rxjs-interop';
import { Observable, filter, first, map, of, tap } from 'rxjs';
import { ClubRole, Role } from '#shared/access/audience';
import { ClubSummary, SessionView, SignInRequest, SignedInPerson } from '#shared/accounts/session';

/** Who is signed in. `undefined` until the server has answered, `null` for a visitor. */
@Injectable({ providedIn: 'root' })
export class SessionStore {
  private readonly http = inject(HttpClient);
  private readonly known = signal<SignedInPerson | null | undefined>(undefined);
  private readonly known$ = toObservable(this.known);

  readonly person = this.known.asReadonly();
  readonly isSignedIn = computed(() => !!this.known());
  readonly isKnown = computed(() => this.known() !== undefined);
  readonly clubs = computed<readonly ClubSummary[]>(() =>
    (this.known()?.memberships ?? []).flatMap(({ club }) => club ?? []),
  );
  readonly isRegistrar = computed(() => this.known()?.isRegistrar ?? false);

  /** True where the person holds the role in any club (`registrar`: in the registry). */
  hasRole(role: Role): boolean {
    return role === 'registrar' ? this.isRegistrar() : this.holdsInAnyClub(role);
  }

  /** The clubs in which the person holds the role. */
  clubsAs(role: ClubRole): readonly ClubSummary[] {
    const memberships = this.known()?.memberships ?? [];
    return memberships.flatMap(({ club, roles }) => (club && roles.includes(role) ? club : []));
  }

  /** Emits once, as soon as it is known who is signed in. */
  whenKnown(): Observable<SignedInPerson | null> {
    // The observable follows the signal by an effect: just after signing in it still says "nobody",
    // and the guard of the page asked for would lead back to the sign-in.
    const known = this.known();
    if (known !== undefined) return of(known);
    return this.known$.pipe(
      filter((person) => person !== undefined),
      first(),
    );
  }

  load(): Observable<SignedInPerson | null> {
    return this.http.get<SessionView>('/api/session').pipe(map((view) => this.keep(view)));
  }

  signIn(request: SignInRequest): Observable<SignedInPerson | null> {
    return this.http
      .post<SessionView>('/api/session', request)
      .pipe(map((view) => this.keep(view)));
  }

  signOut(): Observable<unknown> {
    return this.http.delete('/api/session').pipe(tap(() => this.known.set(null)));
  }

  signOutEverywhere(): Observable<unknown> {
    return this.http.delete('/api/sessions').pipe(tap(() => this.known.set(null)));
  }

  /** Takes over a session that another answer brought, such as the use of an account link. */
  keep(view: SessionView): SignedInPerson | null {
    this.known.set(view.person);
    return view.person;
  }

  /** Read notices leave the count in the header at once. */
  keepUnreadNotices(unreadNotices: number): void {
    this.known.update((person) => (person ? { ...person, unreadNotices } : person));
  }

  /** Where the server cannot say who is there, the page goes on as a visitor's. */
  assumeVisitor(): void {
    this.known.update((person) => person ?? null);
  }

  private holdsInAnyClub(role: ClubRole): boolean {
    return (this.known()?.memberships ?? []).some(({ roles }) => roles.includes(role));
  }
}
