import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { ApiProblem } from '#shared/api-problem';
import type { NoticeView } from '#shared/accounts/session';
import type { ReportView } from '#shared/reports/report-view';
import type { DecisionRequest, LeaseView, QueueAnswer, ReviewView } from '#shared/review/review';
import { addClub, addMember, type TestClub } from '#tests/support/factories/people';
import { fileReport, reportContent } from '#tests/support/factories/reports';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestAnswer, TestClient } from '#tests/support/test-client';

let app: TestApp;
let club: TestClub;
let other: TestClub;
let author: TestClient;
let moderator: TestClient;
let colleague: TestClient;
let second: TestClient;
let number: string;

beforeAll(async () => {
  app = await startTestApp();
  const { owner } = app.store;
  [club, other] = [await addClub(owner), await addClub(owner)];
  const open = async (person: { email: string }) => app.client().signIn(person.email);
  author = await open(await addMember(owner, club, 'moderator'));
  moderator = await open(await addMember(owner, club, 'moderator'));
  colleague = await open(await addMember(owner, club, 'moderator'));
  second = await open(await addMember(owner, other, 'moderator'));
});
afterAll(() => app.stop());
beforeEach(async () => { number = await fileReport(author, reportContent(club)); });

const base = (of: string): string => `/api/review/reports/${of}`;
const claim = (client: TestClient, of = number) =>
  client.post<LeaseView & ApiProblem>(`${base(of)}/lease`);
const see = async (client: TestClient, of = number): Promise<ReviewView> =>
  (await client.get<ReviewView>(base(of))).body;

async function decide(
  client: TestClient, decision: Partial<DecisionRequest>, of = number,
): Promise<TestAnswer<ReviewView & ApiProblem>> {
  const lease = await claim(client, of);
  const { report } = await see(client, of);
  const publishes = decision.kind === 'publish' || decision.kind === 'agree_public'
    || decision.kind === undefined;
  return client.post(`${base(of)}/decisions`, {
    leaseToken: lease.body.token ?? '1', version: report?.version ?? 1,
    rowVersion: report?.rowVersion ?? 1, kind: 'publish',
    confidence: publishes ? 'probable' : null, basis: publishes ? ['photographs'] : [],
    reason: 'It is plain to see.', ...decision,
  });
}

const reportRow = (of = number) => app.store.owner('report').where({ number: of }).first();

describe('a lease', () => {
  it('is held by one, kept when renewed, and free again when it has run out', async () => {
    const first = await claim(moderator);
    expect(first.status).toBe(200);
    expect((await claim(moderator)).body.token).toBe(first.body.token);
    const refused = await claim(second);
    expect([refused.status, refused.body.code]).toEqual([409, 'lease_taken']);
    await app.store.owner('review_lease').update({ expires_at: new Date(Date.now() - 1000) });
    const taken = await claim(second);
    expect(taken.status).toBe(200);
    expect(taken.body.token).not.toBe(first.body.token);
    const late = await moderator.post<ApiProblem>(`${base(number)}/decisions`, {
      leaseToken: first.body.token, version: 1, rowVersion: 1, kind: 'decline',
      confidence: null, basis: [], reason: 'Too late.' });
    expect([late.status, late.body.code]).toEqual([409, 'lease_needed']);
    expect((await reportRow()).state).toBe('filed');
  });

  it('given up is free at once', async () => {
    await claim(moderator);
    expect((await moderator.delete(`${base(number)}/lease`)).status).toBe(204);
    expect((await claim(second)).status).toBe(200);
  });
});

describe('a decision', () => {
  it('on another version than was looked at keeps nothing and says so', async () => {
    const answer = await decide(moderator, { rowVersion: 99 });
    expect([answer.status, answer.body.code]).toEqual([409, 'stale_version']);
    expect(await app.store.owner('decision')
      .where({ report_id: (await reportRow()).id })).toEqual([]);
  });

  it('is never on one’s own report, whatever the code says', async () => {
    expect((await see(author)).barred).toBe('own_report');
    const refused = await claim(author);
    expect([refused.status, refused.body.code]).toEqual([403, 'own_report']);
    const { id, author_id: authorId } = await reportRow();
    await expect(app.store.owner('decision').insert({ report_id: id, version: 1,
      row_version_seen: 1, kind: 'decline', moderator_id: authorId, club_id: club.id,
      lease_token: 1, reason: 'x' })).rejects.toThrow(/own report/);
  });

  it('is not where a conflict was declared', async () => {
    expect((await moderator.post(`${base(number)}/conflict`, { note: 'My cousin’s.' })).status)
      .toBe(204);
    expect((await claim(moderator)).body.code).toBe('conflict_of_interest');
    expect((await claim(second)).status).toBe(200);
  });

  it.each([
    [{ confidence: 'confirmed', basis: ['photographs'] }, 'confirmed_needs_piece'],
    [{ confidence: 'confirmed', basis: ['piece_in_hand'] }, 'confirmed_needs_test'],
    [{ confidence: 'probable', basis: [] }, 'required'],
  ] as const)('to publish needs what its confidence stands on: %j', async (wrong, code) => {
    const answer = await decide(moderator, wrong);
    expect(answer.status).toBe(422);
    expect(answer.body.fields).toContainEqual(expect.objectContaining({ field: 'basis', code }));
  });

  it.each([['decline', 'declined'], ['unresolved', 'unresolved'], ['return', 'returned']] as const)(
    'to %s tells the reporter once, on screen and by mail', async (kind, state) => {
      expect((await decide(moderator, { kind, reason: 'Look at the edge.' })).status).toBe(200);
      expect((await reportRow()).state).toBe(state);
      const { body } = await author.get<{ items: NoticeView[] }>('/api/notices');
      expect(body.items[0]).toMatchObject({ kind: `report_${state}`, report: { number },
        parameters: { reason: 'Look at the edge.' } });
      const mails = await app.store.owner('mail').where({ kind: 'notice' })
        .whereRaw(`parameters ->> 'number' = ?`, [number]);
      expect(mails).toHaveLength(1);
      expect((await claim(second)).body.code).toBe('already_decided');
    });

  it('stands in the audit log', async () => {
    await decide(moderator, {});
    const acts = await app.store.owner('audit_entry').where({ subject_id: (await reportRow()).id })
      .orderBy('seq').pluck('act');
    expect(acts).toContain('decision_publish');
    expect(acts).toContain('evidence_viewed');
  });
});

describe('a returned report', () => {
  it('comes back as a new version, marked as changed', async () => {
    await decide(moderator, { kind: 'return' });
    const mine = await author.get<{ rowVersion: number }>(`/api/my/reports/${number}/content`);
    const changed = await author.put(`/api/my/reports/${number}/content`,
      { rowVersion: mine.body.rowVersion, content: reportContent(club, { pieceCount: 2 }) });
    expect(changed.status).toBe(200);
    const { body } = await second.get<QueueAnswer>('/api/review/queue?flag=returned_and_changed');
    const item = body.items.find((each) => each.number === number);
    expect(item?.version).toBe(2);
    expect((await decide(second, {})).status).toBe(200);
  });
});

describe('public audience', () => {
  let open: string;
  beforeEach(async () => {
    open = await fileReport(author, reportContent(club, { audience: 'public' }));
  });
  const visit = () => app.client().get<ReportView>(`/api/reports/${open}`);

  it('waits for a second moderator of another club; the lower confidence stands', async () => {
    await decide(moderator, { confidence: 'probable' }, open);
    expect((await visit()).status).toBe(404);
    expect((await second.get(`/api/reports/${open}`)).status).toBe(200);
    expect((await see(moderator, open)).barred).toBe('already_spoken');
    const same = await claim(colleague, open);
    expect([same.status, same.body.code]).toEqual([403, 'second_voice_same_club']);
    expect((await decide(second, { kind: 'agree_public', confidence: 'suspected',
      basis: ['tells_named'] }, open)).status).toBe(200);
    const page = await visit();
    expect(page.body).toMatchObject({ audience: 'public', confidence: 'suspected',
      basis: ['tells_named'] });
    expect(JSON.stringify(page.body)).not.toMatch(/Stall 12|Brampton/);
  });

  it('refused by the second leaves it with the clubs', async () => {
    await decide(moderator, {}, open);
    expect((await decide(second, { kind: 'refuse_public' }, open)).status).toBe(200);
    expect((await visit()).status).toBe(404);
    expect((await second.get(`/api/reports/${open}`)).status).toBe(200);
    expect((await see(second, open)).stage).toBeNull();
  });

  it('on one voice is refused by the database itself', async () => {
    await decide(moderator, {}, open);
    const { id } = await reportRow(open);
    await expect(app.store.owner.transaction(async (trx) => {
      await trx('publication').where({ report_id: id }).update({ ended_as: 'widened',
        during: trx.raw(`tstzrange(lower(during), now() + interval '1 second')`) });
      await trx('publication').insert({ report_id: id, version: 1, audience: 'public',
        confidence: 'probable', basis: ['photographs'],
        during: trx.raw(`tstzrange(now() + interval '1 second', null)`) });
    })).rejects.toThrow(/two moderators of two clubs/);
  });
});

describe('the queue', () => {
  it('holds what waits, the oldest first, and pages by key', async () => {
    const first = await second.get<QueueAnswer>('/api/review/queue?limit=2');
    expect(first.body.items).toHaveLength(2);
    expect(first.body.next).not.toBeNull();
    const times = first.body.items.map(({ filedAt }) => filedAt);
    expect([...times].sort()).toEqual(times);
    const next = await second.get<QueueAnswer>(
      `/api/review/queue?limit=2&after=${first.body.next}`);
    const seen = new Set(first.body.items.map((item) => item.number));
    expect(next.body.items.some((item) => seen.has(item.number))).toBe(false);
  });

  it('never shows another club’s own report', async () => {
    const own = await fileReport(author, reportContent(club, { audience: 'club' }));
    const numbers = async (client: TestClient): Promise<string[]> =>
      (await client.get<QueueAnswer>('/api/review/queue?limit=50')).body.items
        .map((item) => item.number);
    expect(await numbers(moderator)).toContain(own);
    expect(await numbers(second)).not.toContain(own);
    expect((await second.get(base(own))).status).toBe(404);
    expect((await claim(second, own)).status).toBe(404);
  });

  it('says why the reader may not decide', async () => {
    const { body } = await author.get<QueueAnswer>('/api/review/queue?limit=50');
    expect(body.items.find((item) => item.number === number)?.barred).toBe('own_report');
  });
});
