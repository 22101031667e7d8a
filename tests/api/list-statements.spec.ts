import { randomUUID } from 'node:crypto';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { addClub, addMember, addPerson, type TestClub } from '#tests/support/factories/people';
import { fileReport, publishReport, reportContent } from '#tests/support/factories/reports';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';

let app: TestApp;
let club: TestClub;
let author: TestClient;
let authorId: string;
let reader: TestClient;
const lists: readonly (readonly [string, () => TestClient])[] = [
  ['/api/reports?limit=50', () => reader],
  ['/api/review/queue?limit=50', () => reader],
  ['/api/my/reports?limit=50', () => author],
  ['/api/drafts', () => author],
  ['/api/notices', () => author],
  ['/api/watches', () => author],
  ['/api/coin-types?limit=50', () => reader],
  ['/api/clubs', () => reader],
  ['/api/registry/mail?limit=50', () => reader],
];
const counts = new Map<string, { rows: number; statements: number }[]>();

let statements = 0;
const original = pg.Client.prototype.query;
beforeAll(async () => {
  // Every statement of the application passes here, whichever pool it comes from.
  pg.Client.prototype.query = function count(this: pg.Client, ...values: unknown[]) {
    statements++;
    return Reflect.apply(original, this, values);
  } as typeof original;
  app = await startTestApp();
  const { owner } = app.store;
  club = await addClub(owner);
  const member = await addMember(owner, club);
  authorId = member.id;
  author = await app.client().signIn(member.email);
  const moderator = await addPerson(owner, { club, roles: ['member', 'moderator', 'secretary'],
    isRegistrar: true });
  reader = await app.client().signIn(moderator.email);
  await addRows(1);
  await measure();
  await addRows(49);
  await measure();
}, 120_000);
afterAll(async () => {
  pg.Client.prototype.query = original;
  await app.stop();
});

async function addRows(count: number): Promise<void> {
  const { owner } = app.store;
  for (let at = 0; at < count; at++) {
    await publishReport(owner, await fileReport(author, reportContent(club)));
    await fileReport(author, reportContent(club));
    await author.put(`/api/drafts/${randomUUID()}`, { revision: 0, content: {} });
    await author.put(`/api/watches/${randomUUID()}`,
      { name: 'All', filter: {}, cadence: 'weekly' });
    await addMember(owner, club);
    await addClub(owner);
    await owner('mail').insert({ cause: randomUUID(), kind: 'notice', person_id: authorId,
      address: 'a@example.org' });
  }
}

async function measure(): Promise<void> {
  for (const [path, client] of [...lists, [`/api/clubs/${club.slug}`, () => reader] as const]) {
    // The first call fills what is kept in memory; the second is what readers get.
    await client().get(path);
    statements = 0;
    const { status, body } = await client().get<{ items?: unknown[]; members?: unknown[] }>(path);
    expect(status, path).toBe(200);
    const rows = (body.items ?? body.members ?? []).length;
    const kept = counts.get(path) ?? [];
    counts.set(path, [...kept, { rows, statements }]);
  }
}

describe('a list asks the database as often for fifty rows as for one', () => {
  it('on every list', () => {
    expect(counts.size).toBe(lists.length + 1);
    for (const [path, [few, many]] of counts) {
      expect(many?.rows, path).toBeGreaterThanOrEqual(49);
      if (path !== '/api/coin-types?limit=50') expect(few?.rows, path).toBeLessThan(6);
      expect(few?.statements, path).toBeGreaterThan(0);
      expect(many?.statements, path).toBe(few?.statements);
    }
  });
});
