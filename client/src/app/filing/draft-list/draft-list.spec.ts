import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ComponentFixture, TestBed } from '@angular/core/testing';
import { Router, provideRouter } from '@angular/router';
import { beforeEach, describe, expect, it, vi } from 'vitest';

import { BROWSER_STORAGE } from '../../ui/browser-storage';
import { NEW_ID } from '../../ui/new-id';
import { draftOf } from '../filing-content';
import { draftView, filingContent } from '../filing-factory';
import { KeptDrafts } from '../kept-drafts';
import { DraftList } from './draft-list';

describe('DraftList', () => {
  let fixture: ComponentFixture<DraftList>;
  let http: HttpTestingController;
  let page: HTMLElement;
  let stored: Map<string, string>;

  beforeEach(() => {
    stored = new Map();
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([]),
        { provide: NEW_ID, useValue: () => 'new-1' },
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
    http = TestBed.inject(HttpTestingController);
  });

  async function open(): Promise<void> {
    fixture = TestBed.createComponent(DraftList);
    page = fixture.nativeElement;
    await fixture.whenStable();
  }

  function button(words: string): HTMLButtonElement | undefined {
    return [...page.querySelectorAll('button')].find((each) => each.textContent?.includes(words));
  }

  it('lists what is begun, to be carried on', async () => {
    await open();
    expect(page.querySelector('[role=status]')?.textContent).toContain('Loading');
    http.expectOne('/api/drafts').flush({ items: [draftView()] });
    await fixture.whenStable();
    const link = page.querySelector('li a');
    expect(link?.getAttribute('href')).toBe('/file/draft-1');
    expect(link?.textContent).toBe('quillhaven crown 1887');
  });

  it('leads on where nothing is begun, to a report with an id of its own', async () => {
    await open();
    http.expectOne('/api/drafts').flush({ items: [] });
    await fixture.whenStable();
    expect(page.textContent).toContain('No report is begun');
    const navigate = vi.spyOn(TestBed.inject(Router), 'navigate').mockResolvedValue(true);
    button('Start a report')?.click();
    expect(navigate).toHaveBeenCalledWith(['/file', 'new-1']);
  });

  it('says why the drafts cannot be shown, and still starts a new one', async () => {
    await open();
    http.expectOne('/api/drafts').flush(null, { status: 500, statusText: 'Broken' });
    await fixture.whenStable();
    expect(page.querySelector('[role=alert]')?.textContent).toContain('cannot be shown');
    expect(button('Start a report')).toBeDefined();
    button('Try again')?.click();
    http.expectOne('/api/drafts').flush({ items: [] });
  });

  it('shows what waits in this browser for the server', async () => {
    TestBed.inject(KeptDrafts).keep('offline-1', {
      revision: 0, content: draftOf(filingContent()), keptAt: '2026-11-27T10:42:00Z' });
    await open();
    http.expectOne('/api/drafts').flush({ items: [] });
    await fixture.whenStable();
    expect(page.querySelector('[aria-labelledby=kept] a')?.getAttribute('href'))
      .toBe('/file/offline-1');
  });

  it('brings a removed draft back', async () => {
    await open();
    http.expectOne('/api/drafts').flush({ items: [draftView()] });
    await fixture.whenStable();
    button('Remove')?.click();
    http.expectOne({ method: 'DELETE', url: '/api/drafts/draft-1' }).flush(null);
    http.expectOne('/api/drafts').flush({ items: [] });
    await fixture.whenStable();
    button('Bring it back')?.click();
    const request = http.expectOne({ method: 'PUT', url: '/api/drafts/draft-1' });
    expect(request.request.body).toEqual({ revision: 0, content: draftView().content });
  });
});
