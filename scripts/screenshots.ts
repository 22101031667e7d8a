import { readFileSync } from 'node:fs';
import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import { chromium, type Browser, type BrowserContext } from 'playwright';

/**
 * `npm run screenshots`: every screen of a running demonstration (`npm start` in another terminal)
 * at three widths, light and dark, into screenshots/. `-- review` takes those whose name holds
 * the word only.
 */
const origin = process.env['BASE_URL'] ?? 'http://localhost:4310';
const directory = join(import.meta.dirname, '../screenshots');
const widths = [390, 768, 1440] as const;
const schemes = ['light', 'dark'] as const;
const wanted = process.argv[2] ?? '';

const accounts: readonly { email: string; password: string }[] = JSON.parse(readFileSync(
  join(import.meta.dirname, '../database/seeds/demo-accounts.json'), 'utf8'));

interface Screen {
  readonly name: string;
  readonly path: string;
  /** Part of the address of the account that looks; none for a visitor. */
  readonly as?: string;
}

const browser = await chromium.launch({ executablePath: '/usr/bin/chromium',
  args: ['--no-sandbox', '--disable-background-networking', '--disable-component-update'] });
try {
  await mkdir(directory, { recursive: true });
  const screens = (await listScreens()).filter(({ name }) => name.includes(wanted));
  for (const as of new Set(screens.map((screen) => screen.as))) {
    for (const scheme of schemes) {
      const context = await openContext(browser, as, scheme);
      for (const screen of screens.filter((each) => each.as === as)) {
        await take(context, screen, scheme);
      }
      await context.close();
    }
  }
  process.stdout.write(`${screens.length * widths.length * schemes.length} pictures in ${
    directory}\n`);
} finally {
  await browser.close();
}

async function take(context: BrowserContext, screen: Screen, scheme: string): Promise<void> {
  const page = await context.newPage();
  for (const width of widths) {
    await page.setViewportSize({ width, height: width === 390 ? 844 : 900 });
    await page.goto(origin + screen.path, { waitUntil: 'networkidle' });
    await page.locator('tn-state-message .ghost').first().waitFor({ state: 'detached' });
    await page.screenshot({ path: join(directory, `${screen.name}-${width}-${scheme}.png`),
      fullPage: true });
  }
  await page.close();
}

async function openContext(
  opened: Browser, as: string | undefined, scheme: 'light' | 'dark',
): Promise<BrowserContext> {
  const context = await opened.newContext({ colorScheme: scheme });
  if (!as) return context;
  const account = accounts.find(({ email }) => email.includes(as));
  await context.request.get(`${origin}/api/session`);
  const token = (await context.cookies()).find(({ name }) => name === 'XSRF-TOKEN')?.value ?? '';
  const answer = await context.request.post(`${origin}/api/session`, {
    data: { email: account?.email, password: account?.password },
    headers: { 'X-XSRF-TOKEN': token },
  });
  if (!answer.ok()) throw new Error(`${as} could not sign in: ${answer.status()}`);
  return context;
}

async function listScreens(): Promise<Screen[]> {
  const report = await firstNumber('/api/reports?coinType=quillhaven-crown');
  const tamsin = await openContext(browser, 'tamsin', 'light');
  const drafts = await (await tamsin.request.get(`${origin}/api/my/reports`)).json();
  await tamsin.close();
  const nell = await openContext(browser, 'nell', 'light');
  const queue = await (await nell.request.get(`${origin}/api/review/queue`)).json();
  await nell.close();
  const waiting = queue.items.find((item: { barred: string | null }) => !item.barred)?.number;
  return [
    { name: 'home', path: '/' },
    { name: 'reports', path: '/reports' },
    { name: 'reports-none', path: '/reports?text=zeppelin' },
    { name: 'report', path: `/reports/${report}` },
    { name: 'coin-types', path: '/coin-types' },
    { name: 'coin-type', path: '/coin-types/quillhaven-crown' },
    { name: 'coin-type-real', path: '/coin-types/us-dollar-morgan' },
    { name: 'handbook', path: '/handbook' },
    { name: 'handbook-tells', path: '/handbook/tells' },
    { name: 'sign-in', path: '/sign-in' },
    { name: 'register', path: '/register' },
    { name: 'not-found', path: '/no-such-page' },
    { name: 'my-reports', path: '/my/reports', as: 'tamsin' },
    { name: 'my-report', path: `/my/reports/${drafts.items[0].number}`, as: 'tamsin' },
    { name: 'filing-start', path: '/file', as: 'tamsin' },
    ...['piece', 'photos', 'measure', 'surfacing', 'send'].map((step) => ({
      name: `filing-${step}`, as: 'tamsin',
      path: `/file/0b0b0b0b-0000-4000-8000-000000000001?step=${step}` })),
    { name: 'notices', path: '/notices', as: 'tamsin' },
    { name: 'account', path: '/account', as: 'tamsin' },
    { name: 'review', path: '/review', as: 'nell' },
    { name: 'review-report', path: `/review/${waiting}`, as: 'nell' },
    { name: 'watches', path: '/watches', as: 'wren' },
    { name: 'clubs', path: '/clubs', as: 'odo' },
    { name: 'club', path: '/clubs/larkmoor', as: 'odo' },
    { name: 'mail-ledger', path: '/registry/mail', as: 'maren' },
  ];
}

async function firstNumber(path: string): Promise<string> {
  const answer = await (await fetch(origin + path)).json() as { items: { number: string }[] };
  const [first] = answer.items;
  if (!first) throw new Error('the demonstration has no public report: run npm start first');
  return first.number;
}
