import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ApiProblem } from '#shared/api-problem';
import type { ReportView } from '#shared/reports/report-view';
import { findReportView } from '#server/reports/report-view-queries';
import { addClub, addMember, addPerson, type TestClub } from '#tests/support/factories/people';
import { fileReport, publishReport, reportContent } from '#tests/support/factories/reports';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';

let app: TestApp;
let club: TestClub;
let author: TestClient;
let readers: Record<'visitor' | 'subscriber' | 'otherClub' | 'sameClub' | 'moderator' | 'registrar',
  TestClient>;

beforeAll(async () => {
  app = await startTestApp();
  const { owner } = app.store;
  club = await addClub(owner);
  const otherClub = await addClub(owner);
  const signIn = async (person: { email: string }) => app.client().signIn(person.email);
  author = await signIn(await addMember(owner, club));
  readers = {
    visitor: app.client(),
    subscriber: await signIn(await addPerson(owner, { roles: ['subscriber'] })),
    otherClub: await signIn(await addMember(owner, otherClub)),
    sameClub: await signIn(await addMember(owner, club)),
    moderator: await signIn(await addMember(owner, otherClub, 'moderator')),
    registrar: await signIn(await addPerson(owner, { isRegistrar: true })),
  };
});
afterAll(() => app.stop());

const view = (reader: TestClient, number: string, query = '') =>
  reader.get<ReportView & ApiProblem>(`/api/reports/${number}${query}`);

async function statuses(number: string): Promise<Record<string, number>> {
  return Object.fromEntries(await Promise.all(Object.entries(readers).map(
    async ([name, reader]) => [name, (await view(reader, number)).status])));
}

const nobody = { visitor: 404, subscriber: 404, otherClub: 404, sameClub: 404, moderator: 404,
  registrar: 404 };

describe('who sees a report', () => {
  it('nobody before it is published, not even on the published page its author', async () => {
    const number = await fileReport(author, reportContent(club));
    expect(await statuses(number)).toEqual(nobody);
    expect((await view(author, number)).status).toBe(404);
    expect((await author.get(`/api/my/reports/${number}`)).status).toBe(200);
  });

  it.each([
    ['club', { ...nobody, sameClub: 200, registrar: 200 }],
    ['clubs', { ...nobody, sameClub: 200, otherClub: 200, moderator: 200, registrar: 200 }],
    ['public', { visitor: 200, subscriber: 200, otherClub: 200, sameClub: 200, moderator: 200,
      registrar: 200 }],
  ] as const)('with audience %s', async (audience, expected) => {
    const number = await fileReport(author, reportContent(club, { audience }));
    await publishReport(app.store.owner, number, { audience });
    expect(await statuses(number)).toEqual(expected);
  });

  it('named clubs, beside the reporter\'s own', async () => {
    const named = await addClub(app.store.owner);
    const reader = await app.client().signIn((await addMember(app.store.owner, named)).email);
    const number = await fileReport(author, reportContent(club, { audience: 'named_clubs',
      namedClubs: [named.slug] }));
    await publishReport(app.store.owner, number, { audience: 'named_clubs' });
    expect(await statuses(number)).toEqual({ ...nobody, sameClub: 200, registrar: 200 });
    expect((await view(reader, number)).status).toBe(200);
  });

  it('those who review it and keep the registry before its embargo has ended', async () => {
    const number = await fileReport(author, reportContent(club, {
      embargoUntil: new Date(Date.now() + 3_600_000).toISOString() }));
    await publishReport(app.store.owner, number);
    expect(await statuses(number)).toEqual({ ...nobody, moderator: 200, registrar: 200 });
    await app.store.owner('report').where({ number })
      .update({ embargo_until: app.store.owner.raw(`now() - interval '1 second'`) });
    expect((await view(readers.otherClub, number)).status).toBe(200);
  });
});

describe('what a reader is told', () => {
  it('the place as coarse, and the price as a band, outside the club', async () => {
    const number = await fileReport(author, reportContent(club, { surfacing: {
      ...reportContent(club).surfacing, surfacedOn: '2026-03-14' } }));
    await publishReport(app.store.owner, number);
    const outside = (await view(readers.otherClub, number)).body;
    expect(outside.surfacing).toEqual({ channel: 'flea_market', month: '2026-03', country: 'GB',
      region: 'Cumbria', priceBand: { low: 25, high: 50, currency: 'GBP' }, detail: null,
      venue: null });
    expect(outside).toMatchObject({ reporterName: null, filedAt: null, askedAudience: null,
      mine: false });
    const inside = (await view(readers.sameClub, number)).body;
    expect(inside.surfacing.detail).toEqual({ surfacedOn: '2026-03-14', town: 'Brampton',
      price: 34, currency: 'GBP' });
    expect(inside.surfacing.venue).toBeNull();
    // Reviewers see the venue on the review page, where the look is put on record.
    expect((await view(readers.moderator, number)).body.surfacing.venue).toBeNull();
    const own = (await author.get<ReportView>(`/api/my/reports/${number}`)).body;
    expect(own.surfacing.venue).toBe('Stall 12');
    expect(own.mine).toBe(true);
  });

  it('the reporter\'s name only where the reporter chose so', async () => {
    const number = await fileReport(author, reportContent(club, { authorNamed: true }));
    await publishReport(app.store.owner, number);
    expect((await view(readers.otherClub, number)).body.reporterName).toMatch(/^Person /);
  });

  it('tells by their disclosure, and that some are held back, not which', async () => {
    const tells = [];
    for (const disclosure of ['public', 'clubs'] as const) {
      const tell = await app.store.owner('tell').where({ disclosure }).first('id');
      tells.push({ tellId: tell.id, note: '', disclosure, pins: [] });
    }
    const number = await fileReport(author, reportContent(club, { audience: 'public', tells }));
    await publishReport(app.store.owner, number, { audience: 'public' });
    const open = (await view(readers.visitor, number)).body;
    expect(open.tells.map(({ tell }) => tell.id)).toEqual([tells[0]?.tellId]);
    expect(open.someTellsHeldBack).toBe(true);
    expect(open.club).toBeNull();
    const inClubs = (await view(readers.otherClub, number)).body;
    expect(inClubs.tells.map(({ tell }) => tell.id)).toEqual(tells.map(({ tellId }) => tellId));
    expect(inClubs.someTellsHeldBack).toBe(false);
  });
});

describe('a number', () => {
  it('is taken as people type it, and said to be mistyped where it is', async () => {
    const number = await fileReport(author, reportContent(club, { audience: 'public' }));
    await publishReport(app.store.owner, number, { audience: 'public' });
    const typed = encodeURIComponent(number.toLowerCase().replaceAll('-', ' '));
    expect((await view(readers.visitor, typed)).body.number).toBe(number);
    const serial = number.slice(6, 11);
    const wrong = number.replace(serial, String((Number(serial) + 1) % 100_000).padStart(5, '0'));
    const answer = await view(readers.visitor, wrong);
    expect([answer.status, answer.body.code]).toEqual([404, 'report_number_mistyped']);
    expect((await view(readers.visitor, 'nonsense')).body.code).toBe('not_found');
  });
});

describe('versions', () => {
  it('published earlier stay readable; what was never published does not', async () => {
    const { owner } = app.store;
    const number = await fileReport(author, reportContent(club));
    await publishReport(owner, number, { at: '2026-05-01T00:00:00Z', confidence: 'suspected' });
    await owner('report').where({ number }).update({ state: 'returned' });
    const { body: { rowVersion } } = await author.get<ReportView>(`/api/my/reports/${number}`);
    await author.put(`/api/my/reports/${number}/content`, { rowVersion,
      content: reportContent(club, { pieceCount: 5 }) });
    expect((await view(readers.otherClub, number)).body).toMatchObject({ version: 1,
      pieceCount: 1 });
    expect((await view(readers.otherClub, number, '?version=2')).status).toBe(404);
    expect((await view(readers.moderator, number, '?version=2')).status).toBe(404);
    await publishReport(owner, number, { at: '2026-06-01T00:00:00Z' });
    const now = (await view(readers.otherClub, number)).body;
    expect(now).toMatchObject({ version: 2, pieceCount: 5, confidence: 'probable',
      publishedAt: '2026-06-01T00:00:00.000Z' });
    expect(now.history.map(({ version, to }) => [version, to]))
      .toEqual([[2, null], [1, '2026-06-01T00:00:00.000Z']]);
    expect((await view(readers.otherClub, number, '?version=1')).body)
      .toMatchObject({ version: 1, pieceCount: 1, confidence: 'suspected' });
  });

  it('say where a report was merged into another', async () => {
    const { owner } = app.store;
    const [number, into] = [await fileReport(author, reportContent(club)),
      await fileReport(author, reportContent(club))];
    for (const each of [number, into]) await publishReport(owner, each);
    const target = await owner('report').where({ number: into }).first('id');
    await owner('report').where({ number }).update({ state: 'merged', merged_into: target.id });
    expect((await view(readers.otherClub, number)).body).toMatchObject({ state: 'merged',
      mergedInto: into });
  });
});

it('makes the same few statements whatever hangs on the report', async () => {
  const bare = await fileReport(author, reportContent(club));
  const tells = await app.store.owner('tell').where({ disclosure: 'public' }).limit(10)
    .select('id');
  const full = await fileReport(author, reportContent(club, {
    tells: tells.map(({ id }) => ({ tellId: id, note: '', disclosure: 'public', pins: [] })),
    measurements: Array.from({ length: 20 }, () => ({ quantity: 'weight', value: 1, unit: 'g',
      resolution: null })),
  }));
  for (const number of [bare, full]) await publishReport(app.store.owner, number);
  const count = async (number: string) => {
    let statements = 0;
    await app.database.asActor({ kind: 'visitor' }, async (trx) => {
      trx.on('query', () => { statements += 1; });
      await findReportView(trx, number, 'published');
    });
    return statements;
  };
  expect(await count(full)).toBe(await count(bare));
});
