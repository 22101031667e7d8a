import { randomUUID } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ApiProblem } from '#shared/api-problem';
import type { DraftView, FiledReport, ReportContent } from '#shared/reports/report-content';
import type { MyReport, MyReportContent, ReportView } from '#shared/reports/report-view';
import type { Page } from '#shared/paging';
import { addClub, addMember, addPerson, type TestClub,
  type TestPerson } from '#tests/support/factories/people';
import { cameraJpeg } from '#tests/support/factories/pictures';
import { facePlace, fileReport, publishReport, reportContent,
  uploadPhoto } from '#tests/support/factories/reports';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';

let app: TestApp;
let club: TestClub;
let member: TestPerson;
let client: TestClient;

beforeAll(async () => {
  app = await startTestApp();
  club = await addClub(app.store.owner);
  member = await addMember(app.store.owner, club);
  client = await app.client().signIn(member.email);
});
afterAll(() => app.stop());

const file = (content: unknown, id: string = randomUUID(), by: TestClient = client) =>
  by.post<ApiProblem & FiledReport>('/api/reports', { id, content });

describe('filing', () => {
  it('keeps everything that was filed, and gives a number', async () => {
    const photoId = await uploadPhoto(client, await cameraJpeg());
    const pin = { id: randomUUID(), photoId, place: facePlace(3.25, 0.9), note: 'raised' };
    const edge = { id: randomUUID(), photoId: '', note: '',
      place: { side: 'edge' as const, angleDegrees: 90.5, heightFraction: 0.5 } };
    edge.photoId = await uploadPhoto(client, await cameraJpeg());
    const [tell, other] = await app.store.owner('tell').select('id', 'disclosure')
      .where({ disclosure: 'public' }).orderBy('position').limit(2);
    const content = reportContent(club, {
      photos: [
        { photoId, side: 'obverse', circle: { x: 0.5, y: 0.5, radius: 0.4 }, uprightDegrees: 12.5,
          caption: 'in daylight' },
        { photoId: edge.photoId, side: 'edge', circle: null, uprightDegrees: 0, caption: '' },
      ],
      tells: [
        { tellId: tell.id, note: 'seen under a lens', disclosure: 'public', pins: [pin] },
        { tellId: other.id, note: '', disclosure: 'moderators', pins: [edge] },
      ],
      measurements: [{ quantity: 'weight', value: 24.9, unit: 'g', resolution: 0.01 },
        { quantity: 'magnetic', value: 0, unit: '1', resolution: null }],
      authorNamed: true,
      embargoUntil: '2030-01-01T00:00:00.000Z',
    });
    const filed = await file(content);
    expect(filed.status).toBe(201);
    expect(filed.body).toEqual({ number: expect.stringMatching(/^TN-\d\d-\d{5}-[0-9A-Z]$/),
      state: 'filed' });
    expect(filed.headers.get('location')).toBe(`/api/my/reports/${filed.body.number}`);
    const kept = await client.get<MyReportContent>(
      `/api/my/reports/${filed.body.number}/content`);
    expect(kept.body.content).toEqual(content);
    expect(kept.body).toMatchObject({ version: 1, rowVersion: 1 });
  });

  it('makes one report of the same request sent twice, also at once', async () => {
    const id = randomUUID();
    const answers = await Promise.all([1, 2, 3].map(() => file(reportContent(club), id)));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 200, 201]);
    expect(new Set(answers.map(({ body }) => body.number)).size).toBe(1);
    expect(await app.store.owner('report').where({ id }).count({ count: '*' }).first())
      .toEqual({ count: 1 });
    expect(await app.store.owner('audit_entry').where({ subject_id: id, act: 'report_filed' }))
      .toHaveLength(1);
    expect(await app.store.owner('notice').where({ report_id: id, person_id: member.id }))
      .toHaveLength(1);
  });

  it('gives neighbours numbers that tell nothing of their order', async () => {
    const numbers = [];
    for (let i = 0; i < 4; i += 1) numbers.push(await fileReport(client, reportContent(club)));
    const serials = numbers.map((number) => Number(number.split('-')[2]));
    const steps = serials.slice(1).map((serial, i) => Math.abs(serial - (serials[i] ?? 0)));
    expect(new Set(serials).size).toBe(4);
    expect(steps.every((step) => step === 1)).toBe(false);
  });

  it('takes the draft away with the filing', async () => {
    const id = randomUUID();
    await client.put(`/api/drafts/${id}`, { revision: 0, content: { club: club.slug } });
    await file(reportContent(club), id);
    expect((await client.get(`/api/drafts/${id}`)).status).toBe(404);
    const late = await client.put<ApiProblem>(`/api/drafts/${id}`,
      { revision: 0, content: { club: club.slug } });
    expect(late.status).toBe(409);
    expect(late.body.parameters).toMatchObject({ revision: 0,
      number: expect.stringMatching(/^TN-/) });
  });

  it('refuses paper money by a code of its own', async () => {
    const content = reportContent(club);
    const answer = await file({ ...content,
      presentedAs: { ...content.presentedAs, kind: 'paper_money' } });
    expect(answer.status).toBe(422);
    expect(answer.body).toMatchObject({ code: 'paper_money_not_taken',
      fields: [{ field: 'content.presentedAs.kind' }] });
  });

  it.each<[string, string, (content: ReportContent) => ReportContent]>([
    ['club', 'not_a_member', (content) => ({ ...content, club: 'no-such-club' })],
    ['presentedAs.coinType', 'unknown', (content) => ({ ...content,
      presentedAs: { ...content.presentedAs, coinType: 'no-such-type' } })],
    ['presentedAs.description', 'required', (content) => ({ ...content,
      presentedAs: { ...content.presentedAs, coinType: null } })],
    ['surfacing.surfacedOn', 'in_the_future', (content) => ({ ...content,
      surfacing: { ...content.surfacing, surfacedOn: '2999-01' } })],
    ['surfacing.surfacedOn', 'not_a_date', (content) => ({ ...content,
      surfacing: { ...content.surfacing, surfacedOn: '2025-02-30' } })],
    ['surfacing.country', 'unknown', (content) => ({ ...content,
      surfacing: { ...content.surfacing, country: 'QQ' } })],
    ['surfacing.currency', 'required', (content) => ({ ...content,
      surfacing: { ...content.surfacing, currency: null } })],
    ['namedClubs', 'required', (content) => ({ ...content, audience: 'named_clubs' })],
    ['namedClubs.0', 'unknown', (content) => ({ ...content, audience: 'named_clubs',
      namedClubs: ['nowhere'] })],
    ['photos.0.photoId', 'unknown', (content) => ({ ...content, photos: [{
      photoId: randomUUID(), side: 'obverse', circle: null, uprightDegrees: 0, caption: '' }] })],
    ['tells.0.tellId', 'unknown', (content) => ({ ...content, tells: [{ tellId: 'no-such-tell',
      note: '', disclosure: 'clubs', pins: [] }] })],
    ['measurements.0.unit', 'wrong_unit', (content) => ({ ...content, measurements: [{
      quantity: 'weight', value: 1, unit: 'mm', resolution: null }] })],
    ['components.1.kind', 'repeated', (content) => ({ ...content,
      components: [...content.components, ...content.components] })],
    ['pieceCount', 'too_small', (content) => ({ ...content, pieceCount: 0 })],
  ])('names %s as the field at fault (%s)', async (field, code, change) => {
    const answer = await file(change(reportContent(club)));
    expect(answer.status).toBe(422);
    expect(answer.body.fields).toContainEqual(
      expect.objectContaining({ field: `content.${field}`, code }));
  });

  it('takes no photo of somebody else', async () => {
    const other = await app.client().signIn((await addMember(app.store.owner, club)).email);
    const photoId = await uploadPhoto(other, await cameraJpeg(60, 80));
    const answer = await file(reportContent(club, { photos: [
      { photoId, side: 'obverse', circle: null, uprightDegrees: 0, caption: '' }] }));
    expect(answer.status).toBe(422);
  });

  it('does not disclose a tell more widely than the taxonomy does', async () => {
    const tell = await app.store.owner('tell').where({ disclosure: 'clubs' }).first('id');
    const number = await fileReport(client, reportContent(club, { tells: [
      { tellId: tell.id, note: '', disclosure: 'public', pins: [] }] }));
    const mine = await client.get<ReportView>(`/api/my/reports/${number}`);
    expect(mine.body.tells.map(({ disclosure }) => disclosure)).toEqual(['clubs']);
  });

  it('keeps the few elements of the account and drops the rest', async () => {
    const number = await fileReport(client, reportContent(club, {
      account: '<p onclick="x()">Bought <b>cheap</b><script>x()</script>'
        + '<img src=x onerror=x()><a href="https://example.org">there</a></p>' }));
    const mine = await client.get<ReportView>(`/api/my/reports/${number}`);
    expect(mine.body.accountHtml).toBe('<p>Bought <strong>cheap</strong>there</p>');
  });

  it('is for members of the club alone', async () => {
    const subscriber = await addPerson(app.store.owner, { club, roles: ['subscriber'] });
    const asSubscriber = await app.client().signIn(subscriber.email);
    expect((await file(reportContent(club), randomUUID(), asSubscriber)).status).toBe(403);
    const visitor = app.client();
    await visitor.get('/api/session');
    expect((await file(reportContent(club), randomUUID(), visitor)).status).toBe(401);
  });
});

describe('what was filed', () => {
  it('is listed for its author, page by page, and for nobody else', async () => {
    const author = await addMember(app.store.owner, club);
    const mine = await app.client().signIn(author.email);
    const numbers = [];
    for (let i = 0; i < 3; i += 1) numbers.push(await fileReport(mine, reportContent(club)));
    const first = await mine.get<Page<MyReport>>('/api/my/reports?limit=2');
    expect(first.body.items.map(({ number }) => number)).toEqual([numbers[2], numbers[1]]);
    const second = await mine.get<Page<MyReport>>(
      `/api/my/reports?limit=2&after=${first.body.next}`);
    expect(second.body.items.map(({ number }) => number)).toEqual([numbers[0]]);
    expect(second.body.next).toBeNull();
    for (const path of ['', '/content']) {
      expect((await client.get(`/api/my/reports/${numbers[0]}${path}`)).status).toBe(404);
    }
  });

  it('can be taken back until it is decided', async () => {
    const number = await fileReport(client, reportContent(club));
    const withdraw = (rowVersion: number) =>
      client.post<ApiProblem>(`/api/my/reports/${number}/withdrawal`, { rowVersion });
    expect((await withdraw(7)).body).toMatchObject({ code: 'stale_version',
      parameters: { rowVersion: 1 } });
    expect((await withdraw(1)).body).toEqual({ number, state: 'withdrawn' });
    expect((await withdraw(2)).body.code).toBe('already_decided');

    const published = await fileReport(client, reportContent(club));
    await publishReport(app.store.owner, published);
    const late = await client.post<ApiProblem>(`/api/my/reports/${published}/withdrawal`,
      { rowVersion: 2 });
    expect(late.body.code).toBe('already_decided');
  });

  it('is filed again with changes once it was returned, as a new version', async () => {
    const number = await fileReport(client, reportContent(club));
    const change = (rowVersion: number, content: ReportContent) => client.put<ApiProblem>(
      `/api/my/reports/${number}/content`, { rowVersion, content });
    expect((await change(1, reportContent(club))).body.code).toBe('already_decided');
    await app.store.owner('report').where({ number })
      .update({ state: 'returned', row_version: 2, decided_at: new Date() });
    expect((await change(1, reportContent(club))).body.code).toBe('stale_version');
    const named = await addClub(app.store.owner);
    const content = reportContent(club, { pieceCount: 3, audience: 'named_clubs',
      namedClubs: [named.slug] });
    expect((await change(2, content)).body).toEqual({ number, state: 'filed' });
    const kept = await client.get<MyReportContent>(`/api/my/reports/${number}/content`);
    expect(kept.body).toEqual({ content, version: 2, rowVersion: 3 });
    const versions = await app.store.owner('report_version')
      .join('report', 'report.id', 'report_version.report_id').where({ number })
      .orderBy('version').select('version', 'piece_count');
    expect(versions).toEqual([{ version: 1, piece_count: 1 }, { version: 2, piece_count: 3 }]);
  });
});

describe('drafts', () => {
  it('are kept by revision, and a late save loses nothing', async () => {
    const id = randomUUID();
    const save = (revision: number, account: string) => client.put<DraftView & ApiProblem>(
      `/api/drafts/${id}`, { revision, content: { account } });
    expect((await save(0, 'one')).body).toMatchObject({ id, revision: 1 });
    expect((await save(1, 'two')).body.revision).toBe(2);
    // The answer to the same save was lost.
    expect((await save(1, 'two')).body.revision).toBe(2);
    const stale = await save(1, 'other');
    expect(stale.status).toBe(409);
    expect(stale.body).toMatchObject({ code: 'stale_version', parameters: { revision: 2 } });
    expect((await client.get<DraftView>(`/api/drafts/${id}`)).body.content)
      .toEqual({ account: 'two' });
  });

  it('hold any part of a report, but not anything', async () => {
    const put = (content: unknown) => client.put<ApiProblem>(`/api/drafts/${randomUUID()}`,
      { revision: 0, content });
    expect((await put({ photos: [{ side: 'obverse' }], tells: [{ pins: [{ place: {
      side: 'obverse', clockHours: 3 } }] }], surfacing: { price: null } })).status).toBe(200);
    expect((await put({ colour: 'red' })).body.fields)
      .toEqual([{ field: 'content.colour', code: 'unknown_field' }]);
  });

  it('are their author\'s alone', async () => {
    const id = randomUUID();
    await client.put(`/api/drafts/${id}`, { revision: 0, content: {} });
    const other = await app.client().signIn(
      (await addMember(app.store.owner, club, 'moderator', 'secretary')).email);
    expect((await other.get(`/api/drafts/${id}`)).status).toBe(404);
    expect((await other.get<{ items: unknown[] }>('/api/drafts')).body.items).toEqual([]);
    await other.delete(`/api/drafts/${id}`);
    expect((await client.get(`/api/drafts/${id}`)).status).toBe(200);
    expect((await client.delete(`/api/drafts/${id}`)).status).toBe(204);
  });
});
