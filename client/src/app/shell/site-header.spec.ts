import { DOCUMENT } from '@angular/common';
import { provideHttpClient } from '@angular/common/http';
import { provideHttpClientTesting } from '@angular/common/http/testing';
import { ComponentFixture, TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { SignedInPerson } from '#shared/accounts/session';

import { SessionStore } from '../auth/session-store';
import { BROWSER_STORAGE } from '../ui/browser-storage';
import { SiteHeader } from './site-header';

const member: SignedInPerson = {
  id: 'p1',
  email: 'margit@example.org',
  displayName: 'Margit',
  timeZone: 'UTC',
  isRegistrar: false,
  memberships: [{ club: { slug: 'larkmoor', name: 'Larkmoor Circle' }, roles: ['member'] }],
  unreadNotices: 2,
};

describe('SiteHeader', () => {
  const stored = new Map<string, string>();

  function draw(person: SignedInPerson | null) {
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        provideHttpClient(),
        provideHttpClientTesting(),
        {
          provide: BROWSER_STORAGE,
          useValue: {
            getItem: (key: string) => stored.get(key) ?? null,
            setItem: (key: string, value: string) => stored.set(key, value),
            removeItem: (key: string) => stored.delete(key),
          },
        },
      ],
    });
    TestBed.inject(SessionStore).keep({ person });
    const fixture = TestBed.createComponent(SiteHeader);
    fixture.detectChanges();
    return { fixture, element: fixture.nativeElement as HTMLElement };
  }

  function press(fixture: ComponentFixture<SiteHeader>, name: string): HTMLButtonElement {
    const buttons = (fixture.nativeElement as HTMLElement).querySelectorAll('button');
    const button = [...buttons].find(({ textContent }) => textContent?.includes(name));
    if (!button) throw new Error(`no button "${name}"`);
    button.click();
    fixture.detectChanges();
    return button;
  }

  const places = (element: HTMLElement): (string | undefined)[] =>
    [...element.querySelectorAll('.places a')].map(({ textContent }) => textContent?.trim());

  it('shows a visitor what is open to all, and the way in', () => {
    const { element } = draw(null);
    expect(places(element)).toEqual(['Reports', 'Coin types', 'Handbook']);
    expect(element.querySelector('.sign-in')?.textContent).toContain('Sign in');
  });

  it('adds the desk for a moderator alone', () => {
    expect(places(draw(member).element)).not.toContain('Review desk');
    TestBed.resetTestingModule();
    const memberships = [{ club: null, roles: ['moderator' as const] }];
    expect(places(draw({ ...member, memberships }).element)).toContain('Review desk');
  });

  it('opens the account, and Escape gives the focus back', () => {
    const { fixture, element } = draw(member);
    const opener = press(fixture, 'Larkmoor Circle');
    expect(opener.getAttribute('aria-expanded')).toBe('true');
    const panel = element.querySelector('#account-panel');
    expect(panel?.textContent).toContain('Notices: 2 new');
    expect(panel?.querySelector('a[href="/clubs/larkmoor"]')).not.toBeNull();

    panel?.querySelector('a')?.dispatchEvent(
      new KeyboardEvent('keydown', { key: 'Escape', bubbles: true }),
    );
    fixture.detectChanges();
    expect(element.querySelector('#account-panel')).toBeNull();
    expect(opener.getAttribute('aria-expanded')).toBe('false');
  });

  it('reaches everything from the phone’s menu, signed in or not', () => {
    const { fixture, element } = draw(null);
    press(fixture, 'Menu');
    const links = [...element.querySelectorAll('#places-panel a')].map((link) =>
      link.getAttribute('href')?.split('?')[0],
    );
    expect(links).toEqual(['/reports', '/coin-types', '/handbook', '/file', '/sign-in']);
  });

  it('remembers a chosen theme in this browser', () => {
    const { fixture } = draw(member);
    press(fixture, 'Larkmoor Circle');
    press(fixture, 'Dark');
    const root = TestBed.inject(DOCUMENT).documentElement;
    expect(root.getAttribute('data-theme')).toBe('dark');
    expect(stored.get('tn-theme')).toBe('dark');
    press(fixture, 'Device');
    expect(root.hasAttribute('data-theme')).toBe(false);
    expect(stored.size).toBe(0);
  });
});
