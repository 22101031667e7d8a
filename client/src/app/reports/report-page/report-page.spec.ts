import { reportRoutes } from '../reports.routes';
import { aCoinType, aReport } from '../testing/report-samples';
import { Screen, openScreen } from '../../ui/testing/screen';

const routes = [{ path: 'reports', children: reportRoutes }];
const address = '/api/reports/TN-26-00114-3';

async function openReport(report = aReport()): Promise<Screen> {
  const screen = await openScreen(routes, '/reports/TN-26-00114-3');
  screen.http.expectOne(address).flush(report);
  await screen.settle();
  screen.http.match('/api/coin-types/quillhaven-ten-marks').forEach((request) =>
    request.flush(aCoinType()));
  await screen.settle();
  return screen;
}

describe('ReportPage', () => {
  it('shows what the piece claims, how sure the desk is, and the place no nearer than given',
    async () => {
      const screen = await openReport();
      expect(screen.element.querySelector('h1')?.textContent).toBe('Ten marks, transfer dies');
      expect(screen.text()).toContain('Counterfeit report TN-26-00114-3');
      expect(screen.text()).toContain('probable');
      expect(screen.text()).toContain('Nobody on the desk has held it');
      expect(screen.text()).toContain('Inland region, Switzerland');
      expect(screen.text()).toContain('CHF 250 to CHF 500');
      expect(screen.text()).not.toContain('Venue');
    });

  it('holds the weight against the standard', async () => {
    const screen = await openReport();
    expect(screen.element.querySelector('tn-answer-chip')?.textContent).toContain('outside');
    expect(screen.element.querySelector('tn-deviation-bar')?.getAttribute('aria-label'))
      .toContain('16.08');
  });

  it('marks the pin of a tell chosen in the list, and the other way round', async () => {
    const screen = await openReport();
    const pin = screen.element.querySelector<HTMLButtonElement>('tn-pin-layer button');
    pin?.click();
    await screen.settle();
    expect(screen.button('obverse 12:42').getAttribute('aria-pressed')).toBe('true');
    screen.button('obverse 12:42').click();
    await screen.settle();
    expect(pin?.getAttribute('aria-pressed')).toBe('false');
    screen.button('obverse 12:42').click();
    await screen.settle();
    expect(pin?.getAttribute('aria-pressed')).toBe('true');
  });

  it('cites the version on screen', async () => {
    const screen = await openReport();
    screen.button('Cite').click();
    await screen.settle();
    const citation = screen.element.querySelector('#citation');
    expect(citation?.textContent).toContain('counterfeit report TN-26-00114-3, version 2');
    expect(citation?.textContent).toContain('/reports/TN-26-00114-3?version=2');
  });

  it('runs nothing that an account brings along', async () => {
    const screen = await openReport(aReport({ accountHtml: '<p onclick="x()">so <b>it</b></p>' }));
    const account = screen.element.querySelector('.account');
    expect(account?.querySelector('b')?.textContent).toBe('it');
    expect(account?.querySelector('[onclick]')).toBeNull();
  });

  it('says that it was retracted, why, and that tells are held back', async () => {
    const screen = await openReport(aReport({
      state: 'retracted', someTellsHeldBack: true,
      retraction: { at: '2026-11-29T10:00:00Z', reason: 'Tested in hand, it is genuine.' },
    }));
    expect(screen.text()).toContain('Retracted 29 November 2026');
    expect(screen.text()).toContain('Tested in hand, it is genuine.');
    expect(screen.text()).toContain('shown to clubs or moderators only');
  });

  it('shows of a withheld report nothing but that it is', async () => {
    const screen = await openReport(aReport({ state: 'withheld' }));
    expect(screen.text()).toContain('Withheld on legal grounds');
    expect(screen.element.querySelector('tn-report-evidence')).toBeNull();
  });

  it('asks for the version in the address', async () => {
    const screen = await openScreen(routes, '/reports/TN-26-00114-3?version=1');
    screen.http.expectOne(`${address}?version=1`).flush(aReport({ version: 1 }));
    await screen.settle();
    expect(screen.link('Read version 2').getAttribute('href')).toBe('/reports/TN-26-00114-3');
  });

  it('says that nothing is there, without a retry', async () => {
    const screen = await openScreen(routes, '/reports/TN-26-00114-3');
    expect(screen.text()).toContain('Loading');
    screen.http.expectOne(address).flush(
      { type: 'about:blank', title: '', status: 404, code: 'not_found' },
      { status: 404, statusText: 'x' });
    await screen.settle();
    expect(screen.text()).toContain('nothing here that you may see');
    expect(() => screen.button('Try again')).toThrow();
    expect(screen.link('Search the published reports')).toBeTruthy();
  });
});
