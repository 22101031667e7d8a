import { expect, type Browser, type Page } from '@playwright/test';
import { appPaths } from './app-paths';
import { signIn, test } from './registry-test';
import type { RunningRegistry } from './running-registry';
import { screens, visitOf } from './screens';
import { buildWorld, type World } from './world';

/** Bytes of scripts and styles as they come over the wire, headers included. */
const firstPageAtMost = 180_000;
const laterPageAtMost = 90_000;

let world: World;

test.beforeAll(async ({ registry }) => {
  world = await buildWorld(registry);
});

test('the front page transfers at most 180 kB of script and style', async (
  { browser, registry },
) => {
  const files = await transferred(browser, registry, '/');
  expect(files.size).toBeGreaterThan(2);
  expect(sum(files), described(files)).toBeLessThanOrEqual(firstPageAtMost);
});

test('every other screen adds at most 90 kB to it', async ({ browser, registry }) => {
  test.setTimeout(300_000);
  const first = await transferred(browser, registry, '/');
  for (const path of (await appPaths()).filter((each) => each !== '/')) {
    const more = new Map([...await transferred(browser, registry, path)]
      .filter(([address]) => !first.has(address)));
    expect(more.size, `${path} has a script of its own`).toBeGreaterThan(0);
    expect.soft(sum(more), `${path}\n${described(more)}`).toBeLessThanOrEqual(laterPageAtMost);
  }
});

/** Script and style files of one cold visit until idle, with the bytes of each. */
async function transferred(
  browser: Browser, registry: RunningRegistry, path: string,
): Promise<ReadonlyMap<string, number>> {
  const screen = screens[path];
  if (!screen) throw new Error(`${path} is not among the screens`);
  const context = await browser.newContext();
  const { reader, address } = visitOf(screen, 'data', world);
  if (reader !== 'visitor') await signIn(context, registry, world[reader]);
  const page = await context.newPage();
  const sizes = collectSizes(page);
  await page.goto(registry.baseUrl + address);
  await expect(page.locator('h1').first()).toBeVisible();
  await page.waitForLoadState('networkidle');
  const files = new Map(await Promise.all(sizes));
  await context.close();
  return files;
}

function collectSizes(page: Page): Promise<readonly [string, number]>[] {
  const sizes: Promise<readonly [string, number]>[] = [];
  page.on('requestfinished', (request) => {
    if (!['script', 'stylesheet'].includes(request.resourceType())) return;
    sizes.push(request.sizes().then(({ responseBodySize, responseHeadersSize }) =>
      [request.url(), responseBodySize + responseHeadersSize] as const));
  });
  return sizes;
}

const sum = (files: ReadonlyMap<string, number>): number =>
  [...files.values()].reduce((total, size) => total + size, 0);

function described(files: ReadonlyMap<string, number>): string {
  return [...files].map(([address, size]) => `${size} ${new URL(address).pathname}`).join('\n');
}
