import { AxeBuilder } from '@axe-core/playwright';
import { expect, type Browser, type BrowserContext, type Page } from '@playwright/test';
import { appPaths } from './app-paths';
import { signIn, test } from './registry-test';
import type { RunningRegistry } from './running-registry';
import { screens, visitOf, type Reader, type Screen } from './screens';
import { buildWorld, type World } from './world';

/** WCAG 2.2 AA, by axe: every path of the routes, in each of its states, light and dark. */
const tags = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
const problem = { type: 'about:blank', title: '', status: 500, code: 'unexpected' };

let world: World;
// One for each reader: signing in and fetching the same scripts sixty times would take minutes.
const contexts = new Map<string, Promise<BrowserContext>>();

test.beforeAll(async ({ registry }) => {
  world = await buildWorld(registry);
});

test.afterAll(async () => {
  for (const context of contexts.values()) await (await context).close();
});

test('every path of the routes is visited, and no other', async () => {
  expect(Object.keys(screens).sort()).toEqual([...await appPaths()].sort());
});

for (const [path, screen] of Object.entries(screens)) {
  test(`${path} with data`, async ({ browser, registry }) => {
    const { page, asked } = await open('data', screen, browser, registry);
    await expect(page.locator('tn-state-message')).toHaveCount(0);
    if (screen.asksNothing) expect(asked).toEqual([]);
    else expect(asked.length, 'it asks the server').toBeGreaterThan(0);
    await expectAccessible(page);
    await page.close();
  });

  const { empty } = screen;
  if (empty) {
    test(`${path} without data`, async ({ browser, registry }) => {
      const { page } = await open('empty', screen, browser, registry);
      await expect(page.locator('main')).toContainText(empty.says);
      await expectAccessible(page);
      await page.close();
    });
  }

  if (!screen.asksNothing) {
    test(`${path} when the server fails`, async ({ browser, registry }) => {
      const { page } = await open('error', screen, browser, registry);
      await expect(page.getByRole('alert').first()).toBeVisible();
      await expectAccessible(page);
      await page.close();
    });
  }
}

async function open(
  state: 'data' | 'empty' | 'error', screen: Screen, browser: Browser, registry: RunningRegistry,
): Promise<{ page: Page; asked: readonly string[] }> {
  const { reader, address } = visitOf(screen, state, world);
  const page = await (await contextOf(reader, browser, registry)).newPage();
  const asked: string[] = [];
  page.on('request', (request) => {
    const { pathname } = new URL(request.url());
    if (pathname.startsWith('/api/') && pathname !== '/api/session') asked.push(pathname);
  });
  const answers = state === 'empty' ? screen.empty?.answers : undefined;
  // Routing switches the browser's cache off: only where an answer is to be replaced.
  if (answers || state === 'error') {
    await page.route('**/api/**', (route) => {
      const { pathname } = new URL(route.request().url());
      const answer = answers?.[pathname];
      if (answer) return route.fulfill({ json: answer });
      if (state !== 'error' || pathname === '/api/session') return route.continue();
      return route.fulfill({ status: 500, json: problem, contentType: 'application/problem+json' });
    });
  }
  await page.goto(registry.baseUrl + address);
  await expect(page.locator('h1, [role=alert]').first()).toBeVisible();
  await page.waitForLoadState('networkidle');
  return { page, asked };
}

function contextOf(
  reader: Reader, browser: Browser, registry: RunningRegistry,
): Promise<BrowserContext> {
  const context = contexts.get(reader) ?? newContext(reader, browser, registry);
  contexts.set(reader, context);
  return context;
}

async function newContext(
  reader: Reader, browser: Browser, registry: RunningRegistry,
): Promise<BrowserContext> {
  const context = await browser.newContext();
  if (reader !== 'visitor') await signIn(context, registry, world[reader]);
  return context;
}

async function expectAccessible(page: Page): Promise<void> {
  await page.emulateMedia({ colorScheme: 'light', reducedMotion: 'reduce' });
  expect(findings(await new AxeBuilder({ page }).withTags(tags).analyze())).toEqual([]);
  // Dark differs in its colours and in nothing else that axe looks at.
  await page.emulateMedia({ colorScheme: 'dark', reducedMotion: 'reduce' });
  // Painted once, or axe may read colours of both.
  await page.evaluate(() => new Promise((done) =>
    requestAnimationFrame(() => requestAnimationFrame(done))));
  expect(findings(await new AxeBuilder({ page }).withRules(['color-contrast']).analyze()))
    .toEqual([]);
}

function findings({ violations }: Awaited<ReturnType<AxeBuilder['analyze']>>): string[] {
  return violations.flatMap(({ id, nodes }) =>
    nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')}: ${failureSummary}`));
}
