import { HarnessLoader } from '@angular/cdk/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { MatCheckboxHarness } from '@angular/material/checkbox/testing';
import { MatInputHarness } from '@angular/material/input/testing';
import { MatRadioButtonHarness } from '@angular/material/radio/testing';
import { Router, provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { WatchView } from '#shared/watches/watch-filter';

import { NEW_ID } from '../../ui/new-id';
import { watchRoutes } from '../watches.routes';

const crowns: WatchView = {
  id: '0b0e0000-0000-4000-8000-000000000001', name: 'Old silver',
  filter: { metal: ['silver'], yearTo: 1900 }, cadence: 'daily',
  createdAt: '2026-11-01T08:00:00.000Z', pausedUntil: null,
  nextDigestAt: '2026-12-02T06:00:00.000Z',
};
const fresh = '0b0e0000-0000-4000-8000-00000000000f';

describe('the watches', () => {
  let harness: RouterTestingHarness;
  let loader: HarnessLoader;
  let http: HttpTestingController;
  let page: HTMLElement;

  async function openWatches(
    watches: readonly WatchView[] | null, address = '/watches',
  ): Promise<void> {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([{ path: 'watches', children: watchRoutes }], withComponentInputBinding()),
        { provide: NEW_ID, useValue: () => fresh },
      ],
    });
    http = TestBed.inject(HttpTestingController);
    harness = await RouterTestingHarness.create(address);
    page = harness.fixture.nativeElement;
    loader = TestbedHarnessEnvironment.loader(harness.fixture);
    const asked = http.expectOne('/api/watches');
    if (watches) asked.flush({ items: watches });
    else asked.flush({}, { status: 500, statusText: 'Internal Server Error' });
    await harness.fixture.whenStable();
  }

  async function click(text: string): Promise<void> {
    await (await loader.getHarness(MatButtonHarness.with({ text }))).click();
  }

  async function answerSave(id: string, watch: Partial<WatchView> = {}): Promise<unknown> {
    const saved = http.expectOne({ method: 'PUT', url: `/api/watches/${id}` });
    saved.flush({ ...crowns, ...saved.request.body, id, ...watch });
    await harness.fixture.whenStable();
    return saved.request.body;
  }

  it('says what each looks for, how often it mails and when next', async () => {
    await openWatches([crowns]);
    const row = page.querySelector('tn-watch-row');
    expect(row?.textContent).toContain('Old silver');
    expect([...(row?.querySelectorAll('.tn-chip') ?? [])].map((chip) => chip.textContent?.trim()))
      .toEqual(['silver', 'years to 1900']);
    expect(row?.textContent).toContain('Mails daily');
    expect(row?.textContent).toContain('2 December 2026');
    expect(row?.querySelector('a')?.getAttribute('href')).toBe('/reports?metal=silver&yearTo=1900');
  });

  it('starts with one choice where there is none: my metals, weekly', async () => {
    await openWatches([]);
    expect(page.textContent).toContain('You watch nothing yet');
    await click('Watch these metals');
    expect(page.querySelector('[role=alert]')?.textContent).toContain('Choose one metal');
    await (await loader.getHarness(MatCheckboxHarness.with({ label: 'gold' }))).check();
    await (await loader.getHarness(MatCheckboxHarness.with({ label: 'silver' }))).check();
    await click('Watch these metals');
    expect(await answerSave(fresh)).toEqual({ name: 'Gold or silver',
      filter: { metal: ['gold', 'silver'] }, cadence: 'weekly' });
    expect(page.querySelector('tn-watch-row h3')?.textContent).toBe('Gold or silver');
  });

  it('says what went wrong and tries again', async () => {
    await openWatches(null);
    expect(page.querySelector('[role=alert]')?.textContent).toContain('went wrong');
    await click('Try again');
    http.expectOne('/api/watches').flush({ items: [crowns] });
    await harness.fixture.whenStable();
    expect(page.querySelector('tn-watch-row')).not.toBeNull();
  });

  it('makes a watch of the search in the address, with a name in words', async () => {
    await openWatches([], '/watches?text=crown&metal=gold&metal=silver&yearTo=1900&after=x');
    http.expectOne('/api/watches/preview').flush({ count: 12, more: false });
    await harness.fixture.whenStable();
    expect(page.textContent).toContain('12 published reports fit now.');
    const name = await loader.getHarness(MatInputHarness);
    expect(await name.getValue()).toBe('The words "crown", gold or silver, years to 1900');
    await name.setValue('Crowns');
    await (await loader.getHarness(MatRadioButtonHarness.with({ label: 'at once' }))).check();
    await click('Save the watch');
    expect(await answerSave(fresh)).toEqual({ name: 'Crowns', cadence: 'at_once',
      filter: { text: 'crown', metal: ['gold', 'silver'], yearTo: 1900 } });
    expect(TestBed.inject(Router).url).toBe('/watches');
    expect(page.querySelector('tn-watch-row h3')?.textContent).toBe('Crowns');
  });

  it('keeps what was typed where the server refuses it, and says why at the field', async () => {
    await openWatches([], '/watches?text=crown');
    http.expectOne('/api/watches/preview').flush({ count: 0, more: false });
    await (await loader.getHarness(MatInputHarness)).setValue('Crowns');
    await click('Save the watch');
    http.expectOne({ method: 'PUT', url: `/api/watches/${fresh}` }).flush(
      { type: 'about:blank', title: '', status: 422, code: 'invalid_input',
        fields: [{ field: 'name', code: 'too_long', parameters: { maximum: 5 } }] },
      { status: 422, statusText: 'Unprocessable Content' });
    await harness.fixture.whenStable();
    expect(await (await loader.getHarness(MatInputHarness)).getValue()).toBe('Crowns');
    expect(page.querySelector('mat-error')?.textContent).toContain('5 characters at most');
  });

  it('pauses and resumes', async () => {
    await openWatches([crowns]);
    await click('Pause');
    expect(await answerSave(crowns.id, { nextDigestAt: null })).toMatchObject(
      { pausedUntil: '9999-12-31T00:00:00Z', name: 'Old silver' });
    expect(page.textContent).toContain('Paused: no mail until you resume it.');
    await click('Resume');
    expect(await answerSave(crowns.id)).toMatchObject({ pausedUntil: null });
    expect(page.textContent).toContain('Mails daily');
  });

  it('removes one with a way back', async () => {
    await openWatches([crowns]);
    await click('Remove');
    http.expectOne({ method: 'DELETE', url: `/api/watches/${crowns.id}` }).flush(null);
    await harness.fixture.whenStable();
    expect(page.querySelector('tn-watch-row')).toBeNull();
    await click('Bring it back');
    expect(await answerSave(crowns.id)).toMatchObject({ name: 'Old silver', cadence: 'daily' });
    expect(page.querySelector('tn-watch-row h3')?.textContent).toBe('Old silver');
  });
});
