import { HarnessLoader } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { DeferBlockBehavior, TestBed } from '@angular/core/testing';
import { MatAutocompleteHarness } from '@angular/material/autocomplete/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatFormFieldHarness } from '@angular/material/form-field/testing';
import { MatInputHarness, MatNativeSelectHarness } from '@angular/material/input/testing';
import { Router, provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { SignedInPerson } from '#shared/accounts/session';
import { FileRequest } from '#shared/reports/report-content';

import { SessionStore } from '../../auth/session-store';
import { BROWSER_STORAGE } from '../../ui/browser-storage';
import { FilingContent } from '../filing-content';
import { draftView, filingContent } from '../filing-factory';
import { changeRoutes, filingRoutes } from '../filing.routes';

const member: SignedInPerson = {
  id: 'person-1', email: 'ada@larkmoor.example', displayName: 'Ada Marsh', timeZone: 'UTC',
  isRegistrar: false, unreadNotices: 0,
  memberships: [{ club: { slug: 'larkmoor', name: 'Larkmoor' }, roles: ['member'] }],
};
const absent = { status: 404, statusText: 'Not Found' };
const broken = { status: 500, statusText: 'Broken' };

describe('the filing form', () => {
  let harness: RouterTestingHarness;
  let http: HttpTestingController;
  let loader: HarnessLoader;
  let page: HTMLElement;

  beforeEach(() => {
    TestBed.configureTestingModule({
      deferBlockBehavior: DeferBlockBehavior.Playthrough,
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter(
          [
            { path: 'file', children: filingRoutes },
            { path: 'my/reports/:number/change', children: changeRoutes },
          ],
          withComponentInputBinding(),
        ),
        { provide: BROWSER_STORAGE, useValue: null },
      ],
    });
    http = TestBed.inject(HttpTestingController);
    TestBed.inject(SessionStore).keep({ person: member });
  });

  async function open(address: string): Promise<void> {
    harness = await RouterTestingHarness.create(address);
    page = harness.fixture.nativeElement;
    loader = TestbedHarnessEnvironment.loader(harness.fixture);
  }

  async function openStep(step: string, content: FilingContent = filingContent()): Promise<void> {
    await open(`/file/draft-1?step=${step}`);
    http.expectOne('/api/drafts/draft-1').flush(draftView(1, content));
    await settle();
  }

  /** A step's code comes by a promise of its own after the page is stable. */
  async function settle(): Promise<void> {
    await harness.fixture.whenStable();
    await Promise.all(
      (await harness.fixture.getDeferBlocks()).map(() => harness.fixture.whenStable()));
    await harness.fixture.whenStable();
  }

  const heading = () => page.querySelector('h1')?.textContent?.trim();
  const button = (text: string | RegExp) => loader.getHarness(MatButtonHarness.with({ text }));
  const input = (label: string) => loader.getHarness(MatInputHarness.with({ label }));

  async function choose(label: string, value: string): Promise<void> {
    const field = await loader.getHarness(MatFormFieldHarness.with({ floatingLabelText: label }));
    const select = await field.getControl(MatNativeSelectHarness);
    if (!select) throw new Error(`${label} is no select`);
    const host = await select.host();
    await host.setInputValue(value);
    await host.dispatchEvent('change');
    await settle();
  }

  it('opens a draft that the server does not have as a new one, at its first step', async () => {
    await open('/file/draft-1');
    http.expectOne('/api/drafts/draft-1').flush(null, absent);
    await settle();
    expect(heading()).toBe('The piece');
    expect(page.textContent).toContain('Step 1 of 5');
    expect(await (await input('Presented as')).getValue()).toBe('');
  });

  it('says so where the draft cannot be fetched, and tries again', async () => {
    await open('/file/draft-1');
    http.expectOne('/api/drafts/draft-1').flush(null, broken);
    await settle();
    expect(page.querySelector('[role=alert]')?.textContent).toContain('cannot be opened');
    await (await button('Try again')).click();
    http.expectOne('/api/drafts/draft-1').flush(draftView());
    await settle();
    expect(heading()).toBe('The piece');
  });

  it('leads from step to step, each at an address of its own', async () => {
    await openStep('measure');
    expect(heading()).toBe('Measurements');
    await (await button(/^Next/)).click();
    await settle();
    expect(heading()).toBe('Where and when');
    expect(TestBed.inject(Router).url).toBe('/file/draft-1?step=surfacing');
    expect(page.querySelector('[aria-current=step]')?.textContent).toContain('Where and when');
  });

  it('finds the coin type by its name', async () => {
    await openStep('piece', filingContent({
      presentedAs: { ...filingContent().presentedAs, coinType: null } }));
    const search = await loader.getHarness(MatAutocompleteHarness);
    await search.enterText('florin');
    const request = await vi.waitFor(() => http.expectOne(({ url, params }) =>
      url === '/api/coin-types' && params.get('text') === 'florin'));
    request.flush({ next: null, items: [{ slug: 'quillhaven-florin', name: 'Florin',
      issuer: 'Quillhaven', kind: 'coin', metal: 'silver' }] });
    await vi.waitFor(async () => expect(await search.isOpen()).toBe(true));
    await search.selectOption({ text: /Florin/ });
    expect(page.querySelector('.tn-chip')?.textContent).toBe('Florin');
  });

  it('refuses paper money in kind words, in the search as in the description', async () => {
    await openStep('piece', filingContent({
      presentedAs: { ...filingContent().presentedAs, coinType: null } }));
    await (await input('Presented as')).setValue('a banknote of 1914');
    expect(page.querySelector('[role=alert]')?.textContent).toContain('no paper money');
    await (await button(/describe it/)).click();
    expect(await (await input('Presented as, in your words')).getValue())
      .toBe('a banknote of 1914');
    expect(page.querySelector('[role=alert]')?.textContent).toContain('Thank you');
  });

  it('says what is missing, and leads to the field', async () => {
    await openStep('send', filingContent({ surfacing: {
      ...filingContent().surfacing, country: '' } }));
    expect(await (await button('Send for review')).isDisabled()).toBe(true);
    await (await button('The country')).click();
    await settle();
    expect(heading()).toBe('Where and when');
    expect(page.querySelector('#field-country')).not.toBeNull();
  });

  it('says in words who will see it, for each audience', async () => {
    await openStep('send');
    const who = () => page.querySelector('.who')?.textContent;
    expect(who()).toContain('members and subscribers of all clubs');
    await choose('Once published, it is for', 'public');
    expect(who()).toContain('once a second moderator, of another club');
    await choose('Once published, it is for', 'named_clubs');
    http.expectOne('/api/clubs').flush({ items: [
      { slug: 'larkmoor', name: 'Larkmoor' }, { slug: 'saltmarsh', name: 'Saltmarsh' }] });
    await settle();
    const boxes = [...page.querySelectorAll('#field-namedClubs label')];
    expect(boxes.map((label) => label.textContent?.trim())).toEqual(['Saltmarsh']);
    expect(page.querySelector('.missing')?.textContent).toContain('At least one club');
  });

  it('sends the draft under its own id and shows number and what comes next', async () => {
    await openStep('send');
    const send = await button('Send for review');
    await send.click();
    await send.click();
    const request = http.expectOne('/api/reports');
    const body = request.request.body as FileRequest;
    expect(body.id).toBe('draft-1');
    expect(body.content.surfacing.channel).toBe('coin_show');
    request.flush({ number: 'TN-26-00121-K', state: 'filed' });
    await settle();
    expect(heading()).toBe('Sent for review');
    expect(page.textContent).toContain('TN-26-00121-K');
    expect(page.textContent).toContain('told by mail');
  });

  it('keeps the answers and names the step where the server does not accept one', async () => {
    await openStep('send');
    await (await button('Send for review')).click();
    http.expectOne('/api/reports').flush({ type: 'about:blank', title: '', status: 422,
      code: 'invalid_input', fields: [{ field: 'content.surfacing.region', code: 'too_long' }] },
    { status: 422, statusText: 'Unprocessable' });
    await settle();
    const alert = page.querySelector('[role=alert]');
    expect(alert?.textContent).toContain('This is too long.');
    await (await button('Where and when')).click();
    await settle();
    expect(heading()).toBe('Where and when');
  });

  it('opens a returned report for change and sends it with the version that it read', async () => {
    await open('/my/reports/TN-26-00121-K/change?step=send');
    http.expectOne('/api/my/reports/TN-26-00121-K/content')
      .flush({ content: filingContent(), rowVersion: 7, version: 1 });
    await settle();
    await (await button('Send for review')).click();
    const request = http.expectOne('/api/my/reports/TN-26-00121-K/content');
    expect(request.request.method).toBe('PUT');
    expect(request.request.body).toMatchObject({ rowVersion: 7 });
    request.flush({ number: 'TN-26-00121-K', state: 'filed' });
    await settle();
    expect(page.textContent).toContain('filed as a new version');
  });
});
