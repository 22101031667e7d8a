import { AxeBuilder } from '@axe-core/playwright';
import { expect, type BrowserContext, type Page } from '@playwright/test';
import { appPaths } from './app-paths';
import { signIn, test } from './registry-test';
import { screens, visitOf, type Screen } from './screens';
import { buildWorld, type World } from './world';

/** WCAG 2.2 AA, by axe: every path of the routes, in each of its states, light and dark. */
const tags = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
const problem = { type: 'about:blank', title: '', status: 500, code: 'unexpected' };

let world: World;

test.beforeAll(async ({ registry }) => {
  world = await buildWorld(registry);
});

test('every path of the routes is visited, and no other', async () => {
  expect(Object.keys(screens).sort()).toEqual([...await appPaths()].sort());
});

for (const [path, screen] of Object.entries(screens)) {
  test(`${path} with data`, async ({ browser, registry }) => {
    const { context, page, asked } = await open('data', screen, browser.newContext(), registry);
    await expect(page.locator('tn-state-message')).toHaveCount(0);
    if (screen.asksNothing) expect(asked).toEqual([]);
    await expectAccessible(page);
    await context.close();
  });

  if (screen.empty) {
    test(`${path} without data`, async ({ browser, registry }) => {
      const { context, page } = await open('empty', screen, browser.newContext(), registry);
      await expectAccessible(page);
      await context.close();
    });
  }

  if (!screen.asksNothing) {
    test(`${path} when the server fails`, async ({ browser, registry }) => {
      const { context, page } = await open('error', screen, browser.newContext(), registry);
      await expect(page.getByRole('alert').first()).toBeVisible();
      await expectAccessible(page);
      await context.close();
    });
  }
}

async function open(
  state: 'data' | 'empty' | 'error', screen: Screen, contextMade: Promise<BrowserContext>,
  registry: Parameters<typeof signIn>[1],
): Promise<{ context: BrowserContext; page: Page; asked: readonly string[] }> {
  const context = await contextMade;
  const { reader, address } = visitOf(screen, state, world);
  if (reader !== 'visitor') await signIn(context, registry, world[reader]);
  const asked: string[] = [];
  await context.route('**/api/**', async (route) => {
    const { pathname } = new URL(route.request().url());
    if (pathname === '/api/session') return route.continue();
    asked.push(pathname);
    const answer = state === 'empty' ? screen.empty?.answers?.[pathname] : undefined;
    if (answer) return route.fulfill({ json: answer });
    if (state !== 'error') return route.continue();
    return route.fulfill({ status: 500, json: problem, contentType: 'application/problem+json' });
  });
  const page = await context.newPage();
  await page.goto(registry.baseUrl + address);
  await expect(page.locator('h1, [role=alert]').first()).toBeVisible();
  await page.waitForLoadState('networkidle');
  return { context, page, asked };
}

async function expectAccessible(page: Page): Promise<void> {
  await page.emulateMedia({ colorScheme: 'light', reducedMotion: 'reduce' });
  expect(findings(await new AxeBuilder({ page }).withTags(tags).analyze())).toEqual([]);
  // Dark differs in its colours and in nothing else that axe looks at.
  await page.emulateMedia({ colorScheme: 'dark', reducedMotion: 'reduce' });
  expect(findings(await new AxeBuilder({ page }).withRules(['color-contrast']).analyze()))
    .toEqual([]);
}

function findings({ violations }: Awaited<ReturnType<AxeBuilder['analyze']>>): string[] {
  return violations.flatMap(({ id, nodes }) =>
    nodes.map(({ target, failureSummary }) => `${id}: ${target.join(' ')}: ${failureSummary}`));
}
