import { coinTypeRoutes } from '../reports.routes';
import { aCoinType, aSearchAnswer } from '../testing/report-samples';
import { openScreen } from '../../ui/testing/screen';

const routes = [{ path: 'coin-types', children: coinTypeRoutes }];
const address = '/coin-types/quillhaven-ten-marks';

describe('CoinTypePage', () => {
  it('states the standard with its limits and how far its source may be trusted', async () => {
    const screen = await openScreen(routes, address);
    expect(screen.text()).toContain('Loading');
    screen.http.expectOne(`/api${address}`).flush(aCoinType());
    const search = screen.http.expectOne(({ url }) => url === '/api/reports');
    expect(search.request.params.get('coinType')).toBe('quillhaven-ten-marks');
    search.flush(aSearchAnswer());
    await screen.settle();
    const row = screen.element.querySelector('.standard tbody tr')?.textContent ?? '';
    expect(row).toContain('16.8 g');
    expect(row).toContain('16.7–16.9 g');
    expect(row).toContain('from memory, unconfirmed');
    expect(screen.text()).toContain('protected though not current: Austria, Switzerland');
    expect(screen.text()).toContain('TN-26-00114-3');
  });

  it('lays dates down and mints across', async () => {
    const screen = await openScreen(routes, address);
    screen.http.expectOne(`/api${address}`).flush(aCoinType());
    await screen.settle();
    const rows = [...screen.element.querySelectorAll('.dates tr')].map((row) =>
      [...row.children].map((cell) => cell.textContent?.trim()));
    expect(rows).toEqual([
      ['Year', 'no mark', 'H'],
      ['1903', 'struck', 'none on record'],
      ['1904', 'none on record', 'never struck'],
    ]);
  });

  it('leads on where there is no standard and no report', async () => {
    const screen = await openScreen(routes, address);
    screen.http.expectOne(`/api${address}`).flush(
      aCoinType({ standard: [], issues: [], legalStatus: [], reportCount: 0 }));
    screen.http.expectOne(({ url }) => url === '/api/reports').flush(aSearchAnswer({ items: [] }));
    await screen.settle();
    expect(screen.text()).toContain('no one standard');
    expect(screen.text()).toContain('says nothing about the piece before you');
    expect(screen.link('Watch this type').getAttribute('href'))
      .toBe('/watches?coinType=quillhaven-ten-marks');
  });

  it('keeps the standard on screen where the reports cannot be loaded', async () => {
    const screen = await openScreen(routes, address);
    screen.http.expectOne(`/api${address}`).flush(aCoinType());
    screen.http.expectOne(({ url }) => url === '/api/reports').flush(
      { type: 'about:blank', title: '', status: 503, code: 'unavailable' },
      { status: 503, statusText: 'x' });
    await screen.settle();
    expect(screen.text()).toContain('16.8 g');
    expect(screen.button('Try again')).toBeTruthy();
  });
});
