import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { Type } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { Router, provideRouter } from '@angular/router';
import { vi } from 'vitest';
import { AccountLinkView } from '#shared/accounts/session';

import { OWN_TIME_ZONE } from '../ui/time-zone';
import { AccountLink } from './account-link/account-link';
import { Unsubscribe } from './unsubscribe/unsubscribe';

const invitation: AccountLinkView = {
  kind: 'invitation',
  email: 'new@example.org',
  club: { slug: 'larkmoor', name: 'Larkmoor Circle' },
  roles: ['member'],
  needsPassword: true,
};

async function open<Screen>(screen: Type<Screen>, path: string, answer: object | number) {
  TestBed.configureTestingModule({
    providers: [
      provideRouter([]),
      provideHttpClient(),
      provideHttpClientTesting(),
      { provide: OWN_TIME_ZONE, useValue: 'Europe/Berlin' },
    ],
  });
  const navigate = vi.spyOn(TestBed.inject(Router), 'navigateByUrl').mockResolvedValue(true);
  const fixture = TestBed.createComponent(screen);
  fixture.componentRef.setInput('token', 'a token');
  fixture.detectChanges();
  const server = TestBed.inject(HttpTestingController);
  const request = server.expectOne({ method: 'GET', url: path });
  if (typeof answer === 'number') {
    request.flush(
      { type: 'about:blank', title: '', status: answer, code: 'link_used_or_expired' },
      { status: answer, statusText: 'refused' },
    );
  } else {
    request.flush(answer);
  }
  await fixture.whenStable();
  const loader = TestbedHarnessEnvironment.loader(fixture);
  return {
    server,
    navigate,
    loader,
    element: fixture.nativeElement as HTMLElement,
    stable: () => fixture.whenStable(),
    press: async (text: string) =>
      (await loader.getHarness(MatButtonHarness.with({ text }))).click(),
  };
}

describe('AccountLink', () => {
  const path = '/api/account-links/a%20token';

  it('asks an invited newcomer for name and password, and sends no address', async () => {
    const { loader, press, server, element, navigate } = await open(AccountLink, path, invitation);
    expect(element.querySelector('h1')?.textContent).toBe('Invitation of Larkmoor Circle');
    const [name, password] = await loader.getAllHarnesses(MatInputHarness);
    await name?.setValue('Anna');
    await password?.setValue('four unrelated words');
    await press('Save and sign in');
    const request = server.expectOne({ method: 'POST', url: path });
    expect(request.request.body).toEqual({
      displayName: 'Anna',
      password: 'four unrelated words',
      timeZone: 'Europe/Berlin',
    });
    request.flush({ person: null });
    expect(navigate).toHaveBeenCalledWith('/sign-in');
  });

  it('asks one who has an account for nothing but the yes', async () => {
    const known = { ...invitation, needsPassword: false };
    const { loader, press, server } = await open(AccountLink, path, known);
    expect(await loader.getAllHarnesses(MatInputHarness)).toHaveLength(0);
    await press('Accept the invitation');
    const { request } = server.expectOne({ method: 'POST', url: path });
    expect(request.body).toEqual({ timeZone: 'Europe/Berlin' });
  });

  it('refuses a short password before it is sent', async () => {
    const reset = { ...invitation, kind: 'reset' as const, club: null, roles: [] };
    const { loader, press, server, element } = await open(AccountLink, path, reset);
    await (await loader.getHarness(MatInputHarness)).setValue('short');
    await press('Save and sign in');
    expect(element.textContent).toContain('Twelve characters at least.');
    server.expectNone({ method: 'POST', url: path });
  });

  it('says that a link is spent, and how to get another', async () => {
    const { element } = await open(AccountLink, path, 404);
    expect(element.querySelector('[role=alert]')?.textContent).toContain('used already');
    expect(element.querySelector('a[href="/forgotten-password"]')).not.toBeNull();
  });
});

describe('Unsubscribe', () => {
  const path = '/api/unsubscribe/a%20token';

  it('stops nothing until the button is pressed', async () => {
    const view = { watches: [{ name: 'Crowns before 1900' }], stopped: false };
    const { server, element, press, stable } = await open(Unsubscribe, path, view);
    expect(element.textContent).toContain('Crowns before 1900');
    server.expectNone({ method: 'POST', url: path });
    await press('Stop all digests');
    server.expectOne({ method: 'POST', url: path }).flush({ ...view, stopped: true });
    await stable();
    expect(element.querySelector('[role=status]')?.textContent).toContain('No digest comes');
  });
});
