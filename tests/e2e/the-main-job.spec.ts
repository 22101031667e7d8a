import { expect, type Browser, type Page } from '@playwright/test';
import exifr from 'exifr';
import { photoAddress, renditionSizes, type RenditionSize } from '#shared/reports/photo';
import type { ReportView } from '#shared/reports/report-view';
import { addClub, addMember, addPerson, type TestPerson } from '#tests/support/factories/people';
import { cameraJpeg, coloursOnTop } from '#tests/support/factories/pictures';
import { testPassword } from '#tests/support/test-client';
import { signIn, test } from './registry-test';
import type { RunningRegistry } from './running-registry';

/** From a member's photos to the subscriber's mailbox, as people do it, in one registry. */
test.describe.configure({ mode: 'serial' });

let member: TestPerson;
let moderator: TestPerson;
let secondModerator: TestPerson;
let subscriber: TestPerson;
let number = '';

test.beforeAll(async ({ registry }) => {
  const { owner } = registry.store;
  const club = await addClub(owner);
  member = await addMember(owner, await addClub(owner));
  moderator = await addMember(owner, club, 'moderator');
  secondModerator = await addMember(owner, await addClub(owner), 'moderator');
  subscriber = await addPerson(owner, { club, roles: ['subscriber'] });
});

test('a subscriber watches silver, at once', async ({ browser, registry }) => {
  const page = await pageOf(browser, registry, subscriber);
  await page.goto(`${registry.baseUrl}/watches?metal=silver`);
  await expect(page.getByLabel('Name of the watch')).toHaveValue('Silver');
  await page.getByRole('radio', { name: 'at once' }).check();
  await page.getByRole('button', { name: 'Save the watch' }).click();
  await expect(page.getByRole('heading', { name: 'Silver', exact: true })).toBeVisible();
  await page.context().close();
});

test('a member files a report: photos from a camera, a pin set by keyboard', async (
  { browser, registry },
) => {
  const photos = [await cameraJpeg(1200, 1600), await cameraJpeg(1200, 1600)];
  const before = await exifr.gps(photos[0] ?? Buffer.alloc(0));
  expect(before.latitude, 'the photos do carry a position').toBeCloseTo(51.5);

  const page = await pageOf(browser, registry, member);
  await page.goto(`${registry.baseUrl}/file`);
  await page.getByRole('button', { name: 'Start a report' }).click();

  await page.getByLabel('Presented as').fill('Quillhaven crown');
  await takeFirstOption(page, /Quillhaven crown/);
  await page.getByLabel('Date on the piece').fill('1891');
  await page.getByRole('button', { name: /^Next/ }).click();

  await page.getByLabel('Photos', { exact: true }).setInputFiles(photos.map((buffer, at) =>
    ({ name: `camera-${at}.jpg`, mimeType: 'image/jpeg', buffer })));
  const thumbs = page.getByRole('list', { name: 'Photos of this report' });
  await expect(thumbs.getByRole('listitem')).toHaveCount(2, { timeout: 60_000 });
  await expect(thumbs.getByRole('button')).toContainText(['obverse', 'reverse']);
  await thumbs.getByRole('button').first().click();
  await setPinByKeyboard(page);
  await page.getByRole('button', { name: /^Next/ }).click();

  await page.getByRole('group', { name: /weight/i }).first().getByLabel('Reading').fill('24.9');
  await page.getByRole('button', { name: /^Next/ }).click();

  await page.getByLabel('It came to light at or through').selectOption({ label: 'coin show' });
  await page.getByLabel('Month', { exact: true }).fill('2026-10');
  await page.getByLabel('Country').selectOption({ label: 'United Kingdom' });
  await page.getByLabel('Region').fill('Cumbria');
  await page.getByLabel('What there is to say about it').fill('It lay among other crowns.');
  await page.getByRole('button', { name: /^Next/ }).click();

  await page.getByLabel('Once published, it is for').selectOption({ label: 'everyone' });
  await expect(page.getByText('Everything that is needed is there.')).toBeVisible();
  await page.getByRole('button', { name: 'Send for review' }).click();
  await expect(page.getByRole('heading', { name: 'Sent for review' })).toBeVisible();
  number = /TN-\d\d-\d{5,6}-[0-9A-Z]/.exec(await page.locator('main').innerText())?.[0] ?? '';
  expect(number).not.toBe('');
  await page.context().close();
});

test('a moderator publishes it to the clubs, from the queue', async ({ browser, registry }) => {
  const page = await browser.newPage();
  await page.goto(`${registry.baseUrl}/review`);
  // Not signed in yet: the way leads through the form and back.
  await page.getByLabel('E-mail address').fill(moderator.email);
  await page.getByLabel('Password', { exact: true }).fill(testPassword);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  const row = page.getByRole('listitem').filter({ hasText: number });
  await expect(row).toContainText('public asked');
  await row.getByRole('link').click();
  await page.getByRole('button', { name: 'Claim for 15 minutes' }).click();
  await expect(page.getByRole('timer')).toContainText(/1[45]:\d\d/);
  await page.getByLabel('Outcome').selectOption({ label: 'Publish' });
  await page.getByRole('radio', { name: 'probable' }).check();
  await page.getByRole('checkbox', { name: 'photographs' }).check();
  await page.getByRole('checkbox', { name: 'the tells named' }).check();
  await page.getByLabel('Reason, sent to the reporter').fill('The pits agree with a cast piece.');
  await page.getByRole('button', { name: 'Publish to clubs, ask for a second' }).click();
  await expect(page.getByRole('status').filter({ hasText: 'Published to the clubs' }))
    .toBeVisible();
  await page.context().close();
});

test('the subscriber is mailed once, with the reason and the way out', async (
  { browser, registry },
) => {
  const { mailbox } = registry;
  await expect.poll(() => mailbox.mailsTo(subscriber.email).length, { timeout: 45_000 }).toBe(1);
  const [mail] = mailbox.mailsTo(subscriber.email);
  if (!mail) throw new Error('the mail is gone');
  const html = String(mail.html);
  for (const part of [mail.text ?? '', html]) {
    expect(part).toContain(number);
    expect(part).toMatch(/silver/i);
    expect(part).toMatch(/not proof that a piece is genuine/);
  }
  expect(html, 'a picture for the clubs has no public address')
    .not.toMatch(/<img[^>]+\/api\/photos/);
  const headers = new Map(mail.headerLines.map(({ key, line }) => [key, line]));
  expect(headers.get('list-unsubscribe')).toContain(`${registry.baseUrl}/unsubscribe/`);
  expect(headers.get('list-unsubscribe-post')).toContain('List-Unsubscribe=One-Click');

  const link = new RegExp(`${registry.baseUrl}/reports/${number}[^\\s"<>]*`).exec(html)?.[0];
  const page = await pageOf(browser, registry, subscriber);
  await page.goto(link ?? 'about:blank');
  await expect(page.getByRole('heading', { level: 1 })).toContainText(/crown/i);
  await expect(page.locator('main')).toContainText('probable');
  await page.context().close();
});

test('the reporter hears of it by mail and on screen', async ({ browser, registry }) => {
  await expect.poll(() => registry.mailbox.mailsTo(member.email).length, { timeout: 45_000 })
    .toBe(1);
  const [mail] = registry.mailbox.mailsTo(member.email);
  expect(mail?.text).toContain('The pits agree with a cast piece.');
  const page = await pageOf(browser, registry, member);
  await page.goto(`${registry.baseUrl}/notices`);
  await expect(page.locator('main')).toContainText(number);
  await page.context().close();
});

test('a visitor sees nothing before a second moderator agrees', async ({ browser, registry }) => {
  const { photos } = await reportAs(registry, subscriber);
  const visitor = registry.client();
  expect((await visitor.get(`/api/reports/${number}`)).status).toBe(404);
  for (const { id } of photos) {
    expect((await visitor.download(photoAddress(id, 'large', 'jpeg'))).status).toBe(404);
  }

  const page = await pageOf(browser, registry, secondModerator);
  await page.goto(`${registry.baseUrl}/review/${number}`);
  await page.getByRole('button', { name: 'Claim for 15 minutes' }).click();
  await page.getByLabel('Outcome').selectOption({ label: 'Agree: show it to everyone' });
  await page.getByRole('radio', { name: 'suspected' }).check();
  await page.getByRole('checkbox', { name: 'photographs' }).check();
  await page.getByLabel('Reason, sent to the reporter').fill('Agreed, with less certainty.');
  await page.getByRole('button', { name: 'Show it to everyone' }).click();
  await expect(page.getByRole('status').filter({ hasText: 'Now shown to everyone' }))
    .toBeVisible();
  await page.context().close();

  const visiting = await browser.newPage();
  await visiting.goto(`${registry.baseUrl}/reports/${number}`);
  await expect(visiting.getByRole('heading', { level: 1 })).toContainText(/crown/i);
  await expect(visiting.locator('main'), 'the lower confidence stands').toContainText('suspected');
  await expect(visiting.locator('main')).toContainText('Counterfeit report');
  await visiting.context().close();
  expect(registry.mailbox.mailsTo(subscriber.email), 'not mailed twice').toHaveLength(1);
});

test('what is served carries no position and stands upright', async ({ browser, registry }) => {
  const { photos } = await reportAs(registry);
  expect(photos).toHaveLength(2);
  const visitor = registry.client();
  for (const { id, width, height } of photos) {
    expect(height, 'the master is upright').toBeGreaterThan(width);
    for (const size of Object.keys(renditionSizes) as RenditionSize[]) {
      for (const format of ['webp', 'jpeg'] as const) {
        const { status, bytes } = await visitor.download(photoAddress(id, size, format));
        expect(status).toBe(200);
        const { red, blue } = await coloursOnTop(bytes);
        expect(red, `${size}.${format} has its upper half on top`).toBeGreaterThan(blue + 100);
        expectNoMetadata(bytes);
        if (format === 'jpeg') expect(await exifr.gps(bytes)).toBeUndefined();
      }
    }
  }
  await expectNoMetadataOnPage(browser, `${registry.baseUrl}/reports/${number}`);
});

async function setPinByKeyboard(page: Page): Promise<void> {
  const search = page.getByLabel('Add a tell');
  await search.fill('pit');
  await takeFirstOption(page, /pit/i);
  await page.getByRole('button', { name: 'Add a pin without tapping' }).focus();
  await page.keyboard.press('Enter');
  const clock = page.getByLabel('clock', { exact: true });
  const before = await clock.inputValue();
  await page.getByRole('button', { name: /^Pin 1/ }).focus();
  for (let press = 0; press < 5; press += 1) await page.keyboard.press('ArrowRight');
  await expect(clock).not.toHaveValue(before);
}

/** By keyboard, once the answer to what was typed has come. */
async function takeFirstOption(page: Page, words: RegExp): Promise<void> {
  await expect(page.getByRole('listbox').getByRole('option').first()).toContainText(words);
  await page.keyboard.press('ArrowDown');
  await page.keyboard.press('Enter');
}

async function pageOf(
  browser: Browser, registry: RunningRegistry, person: TestPerson,
): Promise<Page> {
  const context = await browser.newContext();
  await signIn(context, registry, person.email);
  return context.newPage();
}

async function reportAs(registry: RunningRegistry, person?: TestPerson): Promise<ReportView> {
  const client = registry.client();
  if (person) await client.signIn(person.email);
  const { status, body } = await client.get<ReportView>(`/api/reports/${number}`);
  expect(status).toBe(200);
  return body;
}

/** Every picture that the page itself fetches, looked at as it came. */
async function expectNoMetadataOnPage(browser: Browser, address: string): Promise<void> {
  const page = await browser.newPage();
  const pictures: Promise<Buffer>[] = [];
  page.on('response', (response) => {
    if (response.url().includes('/api/photos/') && response.ok()) pictures.push(response.body());
  });
  await page.goto(address);
  await expect.poll(() => pictures.length, 'obverse and reverse').toBeGreaterThanOrEqual(2);
  for (const bytes of await Promise.all(pictures)) expectNoMetadata(bytes);
  await page.context().close();
}

/** No block of metadata of JPEG or WebP: where none is, no reader of any kind finds a position. */
function expectNoMetadata(bytes: Buffer): void {
  for (const mark of ['Exif\0\0', 'EXIF', 'XMP ', 'http://ns.adobe.com/xap', 'Photoshop 3.0']) {
    expect(bytes.includes(mark), `metadata "${mark}"`).toBe(false);
  }
}
