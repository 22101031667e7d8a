import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { MatButtonHarness } from '@angular/material/button/testing';
import { Router, provideRouter } from '@angular/router';
import { vi } from 'vitest';
import { ReportCard, ReportSearchAnswer } from '#shared/reports/report-view';

import { Home } from './home';

const newest = '/api/reports?limit=4';
const card: ReportCard = {
  number: 'TN-26-00117-Y',
  title: 'Quillhaven crown, cast',
  coinType: { slug: 'quillhaven-crown', name: 'Crown of Quillhaven' },
  kind: 'coin',
  metal: 'silver',
  year: 1887,
  mintMark: null,
  confidence: 'confirmed',
  methodId: 'cast',
  tells: ['a', 'b', 'c', 'd'].map((id) => ({ id, name: `tell ${id}` })),
  channel: 'inherited_lot',
  country: 'DE',
  region: 'North coast',
  surfacedMonth: '2026-10',
  publishedAt: '2026-11-27T09:00:00Z',
  audience: 'clubs',
  pieceCount: 3,
  photos: [],
};

describe('Home', () => {
  function open() {
    TestBed.configureTestingModule({
      providers: [provideRouter([]), provideHttpClient(), provideHttpClientTesting()],
    });
    const fixture = TestBed.createComponent(Home);
    fixture.detectChanges();
    const server = TestBed.inject(HttpTestingController);
    return {
      fixture,
      element: fixture.nativeElement as HTMLElement,
      async answer(items: readonly ReportCard[]): Promise<void> {
        const body: ReportSearchAnswer = {
          items, next: null, total: { count: items.length, more: false }, facets: null,
          mended: null, number: null, numberMistyped: false,
        };
        server.expectOne(newest).flush(body);
        await fixture.whenStable();
      },
      async fail(): Promise<void> {
        server.expectOne(newest).flush(null, { status: 500, statusText: 'broken' });
        await fixture.whenStable();
      },
    };
  }

  it('shows the newest reports with all that a card owes its reader', async () => {
    const { element, answer } = open();
    expect(element.querySelector('[role=status]')?.textContent).toBe('Loading…');
    await answer([card]);
    const text = element.querySelector('tn-report-card')?.textContent?.replace(/\s+/g, ' ') ?? '';
    expect(text).toContain('presented as Crown of Quillhaven 1887');
    expect(text).toContain('and 1 more');
    expect(text).toContain('inherited lot · North coast, Germany · October 2026 · 3 pieces');
    expect(text).toContain('confirmed');
    expect(text).toContain('clubs only');
    expect(text).toContain('Counterfeit report TN-26-00117-Y');
    expect(element.querySelector('tn-report-card a')?.getAttribute('href')).toBe(
      '/reports/TN-26-00117-Y',
    );
  });

  it('leads on where nothing is published', async () => {
    const { element, answer } = open();
    await answer([]);
    expect(element.textContent).toContain('Nothing is published yet');
    expect(element.querySelector('tn-state-message a')?.getAttribute('href')).toBe('/file');
  });

  it('loads again after a failure', async () => {
    const { fixture, element, answer, fail } = open();
    await fail();
    const loader = TestbedHarnessEnvironment.loader(fixture);
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Try again' }))).click();
    await answer([card]);
    expect(element.querySelectorAll('tn-report-card')).toHaveLength(1);
  });

  it('hands the words to the search, and no empty ones', async () => {
    const { fixture, element, answer } = open();
    await answer([card]);
    const navigate = vi.spyOn(TestBed.inject(Router), 'navigate').mockResolvedValue(true);
    const field = element.querySelector<HTMLInputElement>('input[type=search]');
    const search = TestbedHarnessEnvironment.loader(fixture).getHarness(
      MatButtonHarness.with({ text: 'Search' }),
    );
    if (field) field.value = '  crown 1887 ';
    await (await search).click();
    expect(navigate).toHaveBeenLastCalledWith(['/reports'], {
      queryParams: { text: 'crown 1887' },
    });
    if (field) field.value = ' ';
    await (await search).click();
    expect(navigate).toHaveBeenLastCalledWith(['/reports'], { queryParams: {} });
  });
});
