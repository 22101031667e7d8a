import { HarnessLoader } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { HttpErrorResponse, provideHttpClient } from '@angular/common/http';
import { HttpTestingController, TestRequest,
  provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatCheckboxHarness } from '@angular/material/checkbox/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatRadioButtonHarness } from '@angular/material/radio/testing';
import { provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { Subject } from 'rxjs';
import { ReviewView } from '#shared/review/review';

import { DESK_CLOCK } from '../desk-clock';
import { queueAnswer, queueItem, reviewView } from '../review-factory';
import { reviewRoutes } from '../review.routes';

const address = '/api/review/reports/TN-26-00121-K';
const start = Date.parse('2026-12-01T12:00:00.000Z');
const lease = { token: '7', expiresAt: '2026-12-01T12:15:00.000Z', version: 3 };
const waiting = queueAnswer(queueItem(), queueItem({ number: 'TN-26-00122-4' }));
const words = 'Seam and pits agree with the family.';

describe('the review desk', () => {
  let harness: RouterTestingHarness;
  let loader: HarnessLoader;
  let http: HttpTestingController;
  let page: HTMLElement;
  let now: number;
  const seconds = new Subject<void>();

  async function openReport(view: ReviewView | HttpErrorResponse): Promise<void> {
    now = start;
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: 'review', children: reviewRoutes }], withComponentInputBinding()),
        { provide: DESK_CLOCK, useValue: { now: () => now, seconds } },
      ],
    });
    http = TestBed.inject(HttpTestingController);
    harness = await RouterTestingHarness.create('/review/TN-26-00121-K');
    page = harness.fixture.nativeElement;
    loader = TestbedHarnessEnvironment.loader(harness.fixture);
    http.expectOne('/api/clubs').flush({ items: [] });
    http.expectOne('/api/review/queue').flush(waiting);
    await answerReview(view);
  }

  async function answerReview(view: ReviewView | HttpErrorResponse): Promise<void> {
    const asked = http.expectOne(address);
    if (view instanceof HttpErrorResponse) {
      asked.flush(view.error, { status: view.status, statusText: view.statusText });
    } else {
      asked.flush(view, { headers: { Date: new Date(start).toUTCString() } });
    }
    await harness.fixture.whenStable();
  }

  async function claimReport(): Promise<void> {
    await click(/^Claim for/);
    http.expectOne(`${address}/lease`)
      .flush(lease, { headers: { Date: new Date(start).toUTCString() } });
    http.expectOne('/api/review/queue').flush(waiting);
    await harness.fixture.whenStable();
  }

  async function click(text: RegExp | string): Promise<void> {
    await (await loader.getHarness(MatButtonHarness.with({ text }))).click();
  }

  // The harness of a native select reads option.label, which happy-dom does not have.
  function outcome(): HTMLSelectElement {
    const select = page.querySelector<HTMLSelectElement>('tn-decision-form select');
    if (!select) throw new Error('no outcome can be chosen');
    return select;
  }

  function outcomes(): string[] {
    return [...outcome().options].map((option) => option.textContent?.trim() ?? '');
  }

  async function choose(kind: string): Promise<void> {
    expect(outcomes()).toContain(kind);
    outcome().selectedIndex = outcomes().indexOf(kind);
    outcome().dispatchEvent(new Event('change'));
    await harness.fixture.whenStable();
  }

  async function writeReason(): Promise<void> {
    await (await reason()).setValue(words);
  }

  function reason(): Promise<MatInputHarness> {
    return loader.getHarness(MatInputHarness.with({ selector: 'textarea' }));
  }

  function pass(minutes: number): Promise<void> {
    now += minutes * 60_000;
    seconds.next();
    return harness.fixture.whenStable().then(() => undefined);
  }

  function refuse(request: TestRequest, code: string): Promise<void> {
    request.flush({ type: 'about:blank', title: '', status: 409, code },
      { status: 409, statusText: 'Conflict' });
    return harness.fixture.whenStable().then(() => undefined);
  }

  it('lays out the evidence with private detail, and the reporter in counts', async () => {
    await openReport(reviewView());
    expect(page.querySelector('h1')?.textContent).toContain('Quillhaven crown 1887');
    expect(page.textContent).toContain('25.40 g');
    expect(page.textContent).toContain('Harbour Hall fair');
    expect(page.textContent).toContain('Leipzig, Saxony, Germany');
    expect(page.textContent).toContain('2 reports filed: 1 published, 1 returned.');
  });

  it('says in words why a moderator may not decide, and shows no form', async () => {
    await openReport(reviewView({ barred: 'own_report' }));
    expect(page.querySelector('aside')?.textContent).toContain('your own report');
    expect(page.querySelector('tn-decision-form')).toBeNull();
    expect(page.querySelector('tn-claim-box')).toBeNull();
  });

  it('shows an error without a retry where the report is not theirs to see', async () => {
    await openReport(new HttpErrorResponse({ status: 404, statusText: 'Not Found',
      error: { type: 'about:blank', title: '', status: 404, code: 'not_found' } }));
    expect(page.querySelector('[role=alert]')?.textContent).toContain('nothing here');
    expect(await loader.getHarnessOrNull(MatButtonHarness.with({ text: 'Try again' }))).toBeNull();
  });

  it('holds "confirmed" back until the piece and one test stand beside it', async () => {
    await openReport(reviewView({}, { askedAudience: 'public' }));
    await claimReport();
    await choose('Publish');
    await (await loader.getHarness(MatRadioButtonHarness.with({ label: /confirmed/ }))).check();
    const tick = async (label: string) =>
      (await loader.getHarness(MatCheckboxHarness.with({ label }))).check();
    await tick('photographs');
    expect(page.querySelector('#basis-error')?.textContent).toContain('piece in hand');
    await tick('the piece in hand');
    expect(page.querySelector('#basis-error')?.textContent).toContain('objective test');
    await writeReason();
    await click('Publish to clubs, ask for a second');
    http.expectNone(`${address}/decisions`);
    await tick('weight outside its limits');
    expect(page.querySelector('#basis-error')?.textContent?.trim()).toBe('');
    await click('Publish to clubs, ask for a second');
    const sent = http.expectOne(`${address}/decisions`);
    expect(sent.request.body).toEqual({ leaseToken: '7', version: 3, rowVersion: 5,
      kind: 'publish', confidence: 'confirmed',
      basis: ['photographs', 'piece_in_hand', 'weight_outside'], reason: words });
    sent.flush(reviewView({ stage: null }, { askedAudience: 'public' }));
    await harness.fixture.whenStable();
    expect(page.querySelector('aside')?.textContent).toContain('another club is asked');
    expect(page.querySelector('aside a[href="/review/TN-26-00122-4"]')).not.toBeNull();
  });

  it('asks for a reason and sends none without it', async () => {
    await openReport(reviewView());
    await claimReport();
    await choose('Decline');
    await click('Decline the report');
    http.expectNone(`${address}/decisions`);
    expect(page.querySelector('mat-error')?.textContent).toContain('This is needed');
  });

  it('keeps the text when the claim runs out, and sends it after a new claim', async () => {
    await openReport(reviewView());
    await claimReport();
    expect(page.querySelector('[role=timer]')?.textContent).toContain('15:00');
    await choose('Return with notes');
    await writeReason();
    await pass(14);
    expect(page.querySelector('[role=timer]')?.textContent).toContain('1:00');
    await pass(1);
    expect(page.querySelector('[role=alert]')?.textContent).toContain('Your text is kept');
    expect(await (await reason()).getValue()).toBe(words);
    await click('Claim it to decide');
    http.expectOne(`${address}/lease`).flush(
      { ...lease, token: '8', expiresAt: '2026-12-01T12:30:00.000Z' },
      { headers: { Date: new Date(now).toUTCString() } });
    await harness.fixture.whenStable();
    await click('Return to the reporter');
    expect(http.expectOne(`${address}/decisions`).request.body)
      .toMatchObject({ leaseToken: '8', kind: 'return', confidence: null, basis: [],
        reason: words });
  });

  it('keeps the text when the report changed, and shows the newer version', async () => {
    await openReport(reviewView());
    await claimReport();
    await choose('Return with notes');
    await writeReason();
    await click('Return to the reporter');
    await refuse(http.expectOne(`${address}/decisions`), 'stale_version');
    expect(page.querySelector('[role=alert]')?.textContent).toContain('The report changed');
    await click('Load the newer version');
    await answerReview(reviewView({ lease: { ...lease, version: 4 } },
      { version: 4, rowVersion: 6 }));
    expect(page.textContent).toContain('You looked at version 3; this is version 4.');
    expect(await (await reason()).getValue()).toBe(words);
    await click('Return to the reporter');
    expect(http.expectOne(`${address}/decisions`).request.body)
      .toMatchObject({ version: 4, rowVersion: 6, reason: words });
  });

  it('keeps the text of each report apart while others are opened', async () => {
    await openReport(reviewView());
    await claimReport();
    await choose('Return with notes');
    await writeReason();
    await harness.navigateByUrl('/review/TN-26-00122-4');
    http.expectOne('/api/review/reports/TN-26-00122-4')
      .flush(reviewView({}, { number: 'TN-26-00122-4' }));
    await harness.fixture.whenStable();
    expect(await (await reason()).getValue()).toBe('');
    await harness.navigateByUrl('/review/TN-26-00121-K');
    await answerReview(reviewView({ lease }));
    expect(await (await reason()).getValue()).toBe(words);
  });

  it('offers the second moderator public or not, and nothing else', async () => {
    await openReport(reviewView({ stage: 'second' },
      { state: 'published', audience: 'clubs', askedAudience: 'public' }));
    expect(outcomes()).toEqual(['Choose…', 'Agree: show it to everyone',
      'Not public: leave it with the clubs']);
  });

  it('lets a moderator step back for a conflict of interest', async () => {
    await openReport(reviewView());
    await click(/conflict of interest/);
    await click('Declare it and step back');
    http.expectOne(`${address}/conflict`).flush(null);
    await answerReview(reviewView({ barred: 'conflict_of_interest' }));
    expect(page.querySelector('aside')?.textContent).toContain('another moderator will decide');
  });
});
