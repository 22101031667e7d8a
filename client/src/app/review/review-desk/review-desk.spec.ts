import { LiveAnnouncer } from '@angular/cdk/a11y';
import { HarnessLoader } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { Router, provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { QueueAnswer } from '#shared/review/review';

import { reviewRoutes } from '../review.routes';
import { queueAnswer, queueItem } from '../review-factory';

describe('the review queue', () => {
  let harness: RouterTestingHarness;
  let loader: HarnessLoader;
  let http: HttpTestingController;
  let page: HTMLElement;

  async function openQueue(address = '/review'): Promise<void> {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: 'review', children: reviewRoutes }], withComponentInputBinding()),
      ],
    });
    http = TestBed.inject(HttpTestingController);
    harness = await RouterTestingHarness.create(address);
    page = harness.fixture.nativeElement;
    loader = TestbedHarnessEnvironment.loader(harness.fixture);
    http.expectOne('/api/clubs').flush({ items: [{ slug: 'saltmarsh', name: 'Saltmarsh' }] });
  }

  async function answer(queue: QueueAnswer): Promise<void> {
    http.expectOne(({ url }) => url === '/api/review/queue').flush(queue);
    await harness.fixture.whenStable();
  }

  function links(): HTMLAnchorElement[] {
    return [...page.querySelectorAll<HTMLAnchorElement>('[role=listitem] a')];
  }

  function press(key: string, target: Element = page.ownerDocument.body): void {
    target.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true }));
  }

  it('shows what waits with its flags, and who may not decide', async () => {
    await openQueue();
    expect(page.querySelector('[role=status]')?.textContent).toContain('Loading');
    await answer(queueAnswer(
      queueItem({ flags: ['public_asked'] }),
      queueItem({ number: 'TN-26-00122-4', title: 'Larkmoor half 1936', barred: 'own_report' }),
    ));
    expect(links().map((link) => link.getAttribute('href')))
      .toEqual(['/review/TN-26-00121-K', '/review/TN-26-00122-4']);
    expect(links()[0]?.textContent).toContain('public asked');
    expect(links()[1]?.textContent).toContain('others decide');
    expect(page.querySelector('h1')?.textContent).toContain('Waiting');
  });

  it('takes its filters from the address and hands them to the server', async () => {
    await openQueue('/review?flag=second_voice&club=saltmarsh&coinType=quillhaven-crown');
    const { request } = http.expectOne(({ url }) => url === '/api/review/queue');
    expect(request.params.get('flag')).toBe('second_voice');
    expect(request.params.get('club')).toBe('saltmarsh');
    expect(request.params.get('coinType')).toBe('quillhaven-crown');
  });

  it('writes a chosen club into the address and asks again', async () => {
    await openQueue();
    await answer(queueAnswer(queueItem()));
    const select = page.querySelector<HTMLSelectElement>('select');
    if (!select) throw new Error('the club cannot be chosen');
    select.value = 'saltmarsh';
    select.dispatchEvent(new Event('change'));
    await harness.fixture.whenStable();
    expect(TestBed.inject(Router).url).toBe('/review?club=saltmarsh');
    expect(http.expectOne(({ url }) => url === '/api/review/queue').request.params.get('club'))
      .toBe('saltmarsh');
  });

  it('leads on where nothing waits, and out of filters that fit nothing', async () => {
    await openQueue();
    await answer(queueAnswer());
    expect(page.textContent).toContain('Nothing waits');
    expect(page.querySelector('a[href="/reports"]')).not.toBeNull();
    await harness.navigateByUrl('/review?flag=lot');
    await answer(queueAnswer());
    expect(page.textContent).toContain('Nothing waits that fits these filters');
  });

  it('says what went wrong and tries again', async () => {
    await openQueue();
    http.expectOne(({ url }) => url === '/api/review/queue')
      .flush({}, { status: 503, statusText: 'Service Unavailable' });
    await harness.fixture.whenStable();
    expect(page.querySelector('[role=alert]')?.textContent).toContain('does not answer');
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Try again' }))).click();
    await answer(queueAnswer(queueItem()));
    expect(links()).toHaveLength(1);
  });

  it('moves by j, k and arrows, and rests while something is typed', async () => {
    await openQueue();
    await answer(queueAnswer(queueItem(), queueItem({ number: 'TN-26-00122-4' })));
    page.ownerDocument.body.append(page);
    press('j');
    expect(page.ownerDocument.activeElement).toBe(links()[0]);
    press('ArrowDown', links()[0]);
    expect(page.ownerDocument.activeElement).toBe(links()[1]);
    press('k');
    expect(page.ownerDocument.activeElement).toBe(links()[0]);
    const select = page.querySelector('select');
    if (!select) throw new Error('there is no field to type in');
    press('j', select);
    expect(page.ownerDocument.activeElement).toBe(links()[0]);
  });

  it('opens an announced help on the keys, where they can be switched off', async () => {
    await openQueue();
    await answer(queueAnswer(queueItem()));
    const announce = vi.spyOn(TestBed.inject(LiveAnnouncer), 'announce');
    press('?');
    await harness.fixture.whenStable();
    expect(announce).toHaveBeenCalledWith('Help on the keys is open.');
    expect(page.querySelector('[aria-controls=key-help]')?.getAttribute('aria-expanded'))
      .toBe('true');
    const off = page.querySelector<HTMLInputElement>('tn-key-help input');
    off?.click();
    press('?');
    await harness.fixture.whenStable();
    expect(page.querySelector('tn-key-help')).not.toBeNull();
    off?.click();
  });
});
