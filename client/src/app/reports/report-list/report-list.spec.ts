import { MatCheckboxHarness } from '@angular/material/checkbox/testing';

import { reportRoutes } from '../reports.routes';
import { aSearchAnswer } from '../testing/report-samples';
import { Screen, openScreen } from '../../ui/testing/screen';

const routes = [
  { path: 'reports', children: reportRoutes },
  { path: 'watches', children: [] },
];

async function openList(query: string, answer = aSearchAnswer()): Promise<Screen> {
  const screen = await openScreen(routes, `/reports${query}`);
  screen.http.expectOne((request) => request.url === '/api/reports').flush(answer);
  await screen.settle();
  return screen;
}

describe('ReportList', () => {
  it('says that it loads, then shows the cards and how many there are', async () => {
    const screen = await openScreen(routes, '/reports');
    expect(screen.text()).toContain('Loading');
    screen.http.expectOne('/api/reports').flush(
      aSearchAnswer({ total: { count: 10_000, more: true } }));
    await screen.settle();
    expect(screen.text()).toContain('10,000+ reports');
    expect(screen.text()).toContain('TN-26-00114-3');
  });

  it('asks the server for the filters of the address and marks them', async () => {
    const screen = await openScreen(routes, '/reports?metal=gold&yearTo=1910&text=crown');
    const request = screen.http.expectOne(({ url }) => url === '/api/reports').request;
    expect(request.params.getAll('metal')).toEqual(['gold']);
    expect(request.params.get('yearTo')).toBe('1910');
    expect(request.params.get('text')).toBe('crown');
  });

  it('puts a chosen filter into the address and takes it out by its chip', async () => {
    const screen = await openList('?metal=gold');
    const silver = await screen.loader.getHarness(
      MatCheckboxHarness.with({ label: /^silver/ }));
    await silver.check();
    await screen.settle();
    expect(screen.router.url).toBe('/reports?metal=gold&metal=silver');
    screen.button('Take away Metal: gold').click();
    await screen.settle();
    expect(screen.router.url).toBe('/reports?metal=silver');
  });

  it('offers the words as they were typed where a slip was mended', async () => {
    const screen = await openList('?text=crwon',
      aSearchAnswer({ mended: { from: 'crwon', to: 'crown' } }));
    expect(screen.text()).toContain('Showing results for crown');
    expect(screen.link('Search for “crwon” instead').getAttribute('href'))
      .toBe('/reports?text=crwon&exact=1');
    expect(screen.link('Watch this search').getAttribute('href')).toBe('/watches?text=crown');
  });

  it('goes to the report where the words are its number', async () => {
    const screen = await openList('?text=tn26001143',
      aSearchAnswer({ number: 'TN-26-00114-3' }));
    expect(screen.router.url).toBe('/reports/TN-26-00114-3');
  });

  it('says kindly that a number is mistyped', async () => {
    const screen = await openList('?text=TN-26-00114-4',
      aSearchAnswer({ items: [], numberMistyped: true }));
    expect(screen.text()).toContain('a slip in it');
  });

  it('leads on where nothing fits, and does not call it genuine', async () => {
    const screen = await openList('?metal=gold',
      aSearchAnswer({ items: [], total: { count: 0, more: false } }));
    expect(screen.text()).toContain('No published report fits');
    expect(screen.text()).toContain('not proof that a piece is genuine');
    expect(screen.link('Watch this search').getAttribute('href')).toBe('/watches?metal=gold');
  });

  it('offers to try again after a failure', async () => {
    const screen = await openScreen(routes, '/reports');
    screen.http.expectOne('/api/reports').flush(
      { type: 'about:blank', title: '', status: 500, code: 'unexpected' },
      { status: 500, statusText: 'x' });
    await screen.settle();
    screen.button('Try again').click();
    screen.http.expectOne('/api/reports').flush(aSearchAnswer());
    await screen.settle();
    expect(screen.text()).toContain('TN-26-00114-3');
  });
});
