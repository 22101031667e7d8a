import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { SignedInPerson } from '#shared/accounts/session';

import { safeReturnAddress } from './return-address';
import { requireMember, requireRole, requireSignIn } from './role-guards';
import { SessionStore } from './session-store';

@Component({ selector: 'tn-screen', template: '<p i18n>the screen</p>' })
class Screen {}
@Component({ selector: 'tn-door', template: '<p i18n>sign in here</p>' })
class Door {}
@Component({ selector: 'tn-nothing', template: '<p i18n>nothing here</p>' })
class Nothing {}
@Component({ selector: 'tn-roles', template: '<p i18n>ask a secretary</p>' })
class Roles {}

const moderator: SignedInPerson = {
  id: 'p1',
  email: 'mod@example.org',
  displayName: 'Mod',
  timeZone: 'UTC',
  isRegistrar: false,
  memberships: [
    { club: { slug: 'larkmoor', name: 'Larkmoor' }, roles: ['member', 'moderator'] },
    { club: { slug: 'saltmarsh', name: 'Saltmarsh' }, roles: ['member'] },
  ],
  unreadNotices: 0,
};

describe('signing in and the guards', () => {
  beforeEach(() =>
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([
          { path: 'desk', component: Screen, canActivate: [requireRole('moderator')] },
          { path: 'ledger', component: Screen, canActivate: [requireRole('registrar')] },
          { path: 'mine', component: Screen, canActivate: [requireSignIn] },
          { path: 'file', component: Screen, canActivate: [requireMember] },
          { path: 'handbook/roles', component: Roles },
          { path: 'sign-in', component: Door },
          { path: '**', component: Nothing },
        ]),
      ],
    }),
  );

  async function visit(path: string, person: SignedInPerson | null): Promise<string> {
    const harness = await RouterTestingHarness.create();
    const session = TestBed.inject(SessionStore);
    const arrival = harness.navigateByUrl(path);
    session.load().subscribe();
    TestBed.inject(HttpTestingController).expectOne('/api/session').flush({ person });
    await arrival;
    return harness.routeNativeElement?.textContent ?? '';
  }

  it.each([
    ['/desk', moderator, 'the screen'],
    ['/ledger', moderator, 'nothing here'],
    ['/mine', moderator, 'the screen'],
    ['/file', moderator, 'the screen'],
    ['/file', { ...moderator, memberships: [] }, 'ask a secretary'],
    ['/file', null, 'sign in here'],
    ['/desk', null, 'sign in here'],
    ['/mine', null, 'sign in here'],
  ])('on %s leads to the right place', async (path, person, text) => {
    expect(await visit(path, person)).toBe(text);
  });

  it('opens the page asked for in the same breath as the sign-in', async () => {
    const harness = await RouterTestingHarness.create();
    const session = TestBed.inject(SessionStore);
    session.keep({ person: null });
    await harness.navigateByUrl('/desk');
    expect(harness.routeNativeElement?.textContent).toBe('sign in here');
    session.keep({ person: moderator });
    await harness.navigateByUrl('/desk');
    expect(harness.routeNativeElement?.textContent).toBe('the screen');
  });

  it('knows the clubs of a role', () => {
    const session = TestBed.inject(SessionStore);
    session.keep({ person: moderator });
    expect(session.clubsAs('moderator').map(({ slug }) => slug)).toEqual(['larkmoor']);
    expect(session.hasRole('moderator')).toBe(true);
    expect(session.hasRole('registrar')).toBe(false);
  });

  it('is a visitor’s page again after signing out', () => {
    const session = TestBed.inject(SessionStore);
    session.keep({ person: moderator });
    session.signOut().subscribe();
    TestBed.inject(HttpTestingController)
      .expectOne({ method: 'DELETE', url: '/api/session' })
      .flush(null);
    expect(session.isSignedIn()).toBe(false);
  });
});

describe('safeReturnAddress', () => {
  it.each([
    ['/reports?text=crown', '/reports?text=crown'],
    ['//elsewhere.example', '/'],
    ['/\\elsewhere.example', '/'],
    ['https://elsewhere.example', '/'],
    ['/sign-in?returnTo=/x', '/'],
    ['/password/abc', '/'],
    ['/registry/mail', '/registry/mail'],
    [undefined, '/'],
  ])('of %s is %s', (asked, answer) => {
    expect(safeReturnAddress(asked)).toBe(answer);
  });
});
