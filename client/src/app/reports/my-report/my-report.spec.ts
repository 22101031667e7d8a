import { myReportRoutes } from '../reports.routes';
import { aMyReport, aReport } from '../testing/report-samples';
import { Screen, openScreen } from '../../ui/testing/screen';

const routes = [{ path: 'my/reports', children: myReportRoutes }];

async function openOwn(
  report: Parameters<typeof aReport>[0],
  row: Parameters<typeof aMyReport>[0],
): Promise<Screen> {
  const screen = await openScreen(routes, '/my/reports/TN-26-00114-3');
  answerOwn(screen, report, row);
  await screen.settle();
  return screen;
}

function answerOwn(
  screen: Screen,
  report: Parameters<typeof aReport>[0],
  row: Parameters<typeof aMyReport>[0],
): void {
  screen.http.expectOne('/api/my/reports/TN-26-00114-3').flush(
    aReport({ coinType: null, mine: true, confidence: null, publishedAt: null, ...report }));
  screen.http.expectOne('/api/my/reports').flush({ items: [aMyReport(row)], next: null });
}

describe('MyReports', () => {
  it('says where each stands, what the desk wrote and whose turn it is', async () => {
    const screen = await openScreen(routes, '/my/reports');
    screen.http.expectOne('/api/my/reports').flush({
      items: [
        aMyReport({ state: 'returned', lastReason: 'Please weigh it.' }),
        aMyReport({ number: 'TN-26-00115-1', inReview: true }),
      ],
      next: null,
    });
    await screen.settle();
    expect(screen.text()).toContain('Your turn');
    expect(screen.text()).toContain('Please weigh it.');
    expect(screen.text()).toContain('in review');
    expect(screen.link('Change and file again').getAttribute('href'))
      .toBe('/my/reports/TN-26-00114-3/change');
  });

  it('leads to the first report where there is none', async () => {
    const screen = await openScreen(routes, '/my/reports');
    screen.http.expectOne('/api/my/reports').flush({ items: [], next: null });
    await screen.settle();
    expect(screen.text()).toContain('You have filed nothing yet');
  });
});

describe('MyReportPage', () => {
  it('shows the reason of a return and offers the change', async () => {
    const screen = await openOwn({ state: 'returned' },
      { state: 'returned', lastReason: 'Please weigh it.' });
    expect(screen.text()).toContain('Please weigh it.');
    expect(screen.link('Change and file again')).toBeTruthy();
  });

  it('withdraws only after it was said that this cannot be undone', async () => {
    const screen = await openOwn({ state: 'filed' }, { state: 'filed' });
    screen.button('Withdraw…').click();
    await screen.settle();
    expect(screen.text()).toContain('cannot be undone');
    screen.button('Withdraw for good').click();
    const request = screen.http.expectOne('/api/my/reports/TN-26-00114-3/withdrawal');
    expect(request.request.body).toEqual({ rowVersion: 5 });
    request.flush(null, { status: 204, statusText: 'x' });
    answerOwn(screen, { state: 'withdrawn' }, { state: 'withdrawn' });
    await screen.settle();
    expect(screen.text()).toContain('You took it back');
    expect(() => screen.button('Withdraw')).toThrow();
  });

  it('says why a withdrawal came too late', async () => {
    const screen = await openOwn({ state: 'filed' }, { state: 'filed' });
    screen.button('Withdraw…').click();
    await screen.settle();
    screen.button('Withdraw for good').click();
    screen.http.expectOne('/api/my/reports/TN-26-00114-3/withdrawal').flush(
      { type: 'about:blank', title: '', status: 409, code: 'already_decided' },
      { status: 409, statusText: 'x' });
    answerOwn(screen, { state: 'declined' }, { state: 'declined' });
    await screen.settle();
    expect(screen.element.querySelector('[role=alert]')?.textContent).toContain('decided already');
  });
});
