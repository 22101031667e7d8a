import { readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import type { WatchFilter } from '#shared/watches/watch-filter';
import type { DecisionKind, LeaseView, ReviewView } from '#shared/review/review';
import { composeWorker, type Worker } from '#server/compose-worker';
import { startJobQueue } from '#server/jobs/job-queue';
import { addClub, addMember, addPerson, type TestClub,
  type TestPerson } from '#tests/support/factories/people';
import { cameraJpeg } from '#tests/support/factories/pictures';
import { fileReport, reportContent, uploadPhoto } from '#tests/support/factories/reports';
import { SmtpCatcher } from '#tests/support/smtp-catcher';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';

let app: TestApp;
let catcher: SmtpCatcher;
let worker: Worker;
let club: TestClub;
let author: TestClient;
let moderator: TestClient;
let second: TestClient;

beforeAll(async () => {
  catcher = await new SmtpCatcher().start();
  app = await startTestApp({ SMTP_URL: catcher.url });
  club = await addClub(app.store.owner);
  author = await signIn(await addMember(app.store.owner, club));
  moderator = await signIn(await addMember(app.store.owner, club, 'moderator'));
  second = await signIn(await addMember(app.store.owner, await addClub(app.store.owner),
    'moderator'));
  worker = await composeWorker(app);
});
afterEach(() => app.store.owner('watch').update({ deleted_at: new Date() }));
afterAll(async () => {
  await worker.stop();
  await catcher.stop();
  await app.stop();
});

const signIn = (person: TestPerson): Promise<TestClient> => app.client().signIn(person.email);

async function decide(by: TestClient, number: string, kind: DecisionKind): Promise<void> {
  const path = `/api/review/reports/${number}`;
  const lease = await by.post<LeaseView>(`${path}/lease`);
  const { body } = await by.get<ReviewView>(path);
  const { rowVersion, version } = await app.store.owner('report').where({ number })
    .first('row_version as rowVersion', 'current_version as version');
  expect(body.lease?.token, lease.text).toBe(lease.body.token);
  const isPublishing = kind === 'publish' || kind === 'agree_public';
  const answer = await by.post(`${path}/decisions`, { leaseToken: lease.body.token, version,
    rowVersion, kind, confidence: isPublishing ? 'probable' : null,
    basis: isPublishing ? ['photographs'] : [], reason: 'The photos show it.' });
  expect(answer.status, answer.text).toBeLessThan(300);
}

async function watchOf(person: TestPerson, filter: WatchFilter = {}): Promise<TestPerson> {
  const client = await signIn(person);
  const answer = await client.put(`/api/watches/${crypto.randomUUID()}`,
    { name: 'A watch', filter, cadence: 'at_once' });
  expect(answer.status, answer.text).toBe(200);
  return person;
}

/** About which of the reports the person was mailed. */
const digestsAbout = (person: TestPerson, number: string): number =>
  catcher.mailsTo(person.email).filter(({ parsed }) => parsed.text?.includes(number)).length;

/**
 * Another person gets mail of a report published afterwards: whatever was due before it has gone.
 */
async function awaitALaterMail(): Promise<void> {
  const later = await watchOf(await addMember(app.store.owner, await addClub(app.store.owner)));
  const number = await fileReport(author, reportContent(club));
  await decide(moderator, number, 'publish');
  await catcher.until(() => digestsAbout(later, number) === 1);
}

describe('the worker', () => {
  it('mails each reader once of what is published through the desk, also when it is widened',
    async () => {
      const member = await watchOf(
        await addMember(app.store.owner, await addClub(app.store.owner)));
      const stranger = await watchOf(await addPerson(app.store.owner, { roles: ['subscriber'] }));
      const number = await fileReport(author, reportContent(club, { audience: 'public' }));
      await decide(moderator, number, 'publish');
      await catcher.until(() => digestsAbout(member, number) === 1);
      expect(digestsAbout(stranger, number)).toBe(0);
      await decide(second, number, 'agree_public');
      await catcher.until(() => digestsAbout(stranger, number) === 1);
      await awaitALaterMail();
      expect(digestsAbout(member, number)).toBe(1);
      expect(digestsAbout(stranger, number)).toBe(1);
    });

  it('tells the reporter of a decision, once', async () => {
    const reporter = await addMember(app.store.owner, club);
    const number = await fileReport(await signIn(reporter), reportContent(club));
    await decide(moderator, number, 'return');
    await catcher.until(() => digestsAbout(reporter, number) === 1);
    const [mail] = catcher.mailsTo(reporter.email);
    expect(mail?.parsed.text).toContain('The photos show it.');
    await awaitALaterMail();
    expect(digestsAbout(reporter, number)).toBe(1);
  });

  it('announces an embargoed report only once its embargo has ended', async () => {
    // Not told of the other reports, since mail at once goes out once a minute.
    const member = await watchOf(await addMember(app.store.owner, await addClub(app.store.owner)),
      { text: 'zebrawood' });
    const embargoUntil = new Date(Date.now() + 86_400_000).toISOString();
    const number = await fileReport(author,
      reportContent(club, { embargoUntil, account: '<p>In a box of zebrawood.</p>' }));
    const { id } = await app.store.owner('report').where({ number }).first('id');
    await decide(moderator, number, 'publish');
    const job = (): Promise<{ id: string; state: string; start_after: Date }> =>
      app.store.owner('pgboss.job').where({ name: 'match-watches' })
        .whereRaw(`data ->> 'reportId' = ?`, [id]).first('id', 'state', 'start_after');
    const waiting = await job();
    expect(waiting.state).toBe('created');
    expect(waiting.start_after.toISOString()).toBe(embargoUntil);
    await awaitALaterMail();
    expect(digestsAbout(member, number)).toBe(0);
    expect(await app.store.owner('alert').where({ report_id: id })).toEqual([]);

    // A day later.
    const past = new Date(Date.now() - 1000);
    await app.store.owner('report').where({ id }).update({ embargo_until: past });
    await app.store.owner.raw('select renew_report_search(?)', [id]);
    await app.store.owner('pgboss.job').where({ id: waiting.id }).update({ start_after: past });
    await catcher.until(() => digestsAbout(member, number) === 1);
    await awaitALaterMail();
    expect(digestsAbout(member, number)).toBe(1);
  });

  it('sends nothing of a report retracted between its publication and its mail', async () => {
    const member = await watchOf(await addMember(app.store.owner, await addClub(app.store.owner)));
    catcher.behaveAs((address) => address === member.email
      ? { kind: 'drop_at_recipient' } : { kind: 'accept' });
    const number = await fileReport(author, reportContent(club));
    await decide(moderator, number, 'publish');
    await catcher.until(() => catcher.named.includes(member.email));
    const { id } = await app.store.owner('report').where({ number }).first('id');
    await app.store.owner('report').where({ id }).update({ state: 'retracted' });
    await app.store.owner.raw('select renew_report_search(?)', [id]);
    catcher.behaveAs(() => ({ kind: 'accept' }));
    await expect.poll(async () => {
      await app.store.owner('mail').where({ person_id: member.id, state: 'ready' })
        .update({ not_before: new Date(0) });
      const mail = await app.store.owner('mail').where({ person_id: member.id }).first('state');
      return mail.state;
    }, { timeout: 30_000 }).toBe('dropped');
    expect(digestsAbout(member, number)).toBe(0);
  });
});

describe('the daily clean-up', () => {
  it('is scheduled, and removes old sessions and photos that nothing shows', async () => {
    const schedule = await app.store.owner('pgboss.schedule').where({ name: 'clean-up' })
      .first('cron');
    expect(schedule.cron).toMatch(/^\d+ \d+ \* \* \*$/);
    const unused = await uploadPhoto(author, await cameraJpeg());
    const fresh = await uploadPhoto(author, await cameraJpeg());
    const used = await uploadPhoto(author, await cameraJpeg());
    await fileReport(author, reportContent(club, { photos: [{ photoId: used, side: 'obverse',
      circle: { x: 0.5, y: 0.5, radius: 0.4 }, uprightDegrees: 0, caption: '' }] }));
    await app.store.owner('photo').whereIn('id', [unused, used])
      .update({ created_at: new Date(Date.now() - 8 * 86_400_000) });
    const visitor = await signIn(await addMember(app.store.owner, club));
    await app.store.owner('session').insert({ sid: 'ended', sess: '{}', expire: new Date(0) });
    const filesBefore = await countFiles();

    const queue = await startJobQueue(app.config.databaseUrl, app.logger, 'enqueue');
    await queue.boss.send('clean-up', {});
    await queue.stop();
    await expect.poll(() => app.store.owner('pgboss.job').where({ name: 'clean-up' })
      .first('state').then((job) => job?.state), { timeout: 30_000 }).toBe('completed');

    expect((await author.get(`/api/photos/${unused}`)).status).toBe(404);
    expect((await author.get(`/api/photos/${fresh}`)).status).toBe(200);
    expect((await author.get(`/api/photos/${used}`)).status).toBe(200);
    expect(await countFiles()).toBeLessThan(filesBefore);
    expect(await app.store.owner('session').where({ sid: 'ended' })).toEqual([]);
    expect((await visitor.get<{ person: unknown }>('/api/session')).body.person).not.toBeNull();
  });
});

async function countFiles(): Promise<number> {
  const entries = await readdir(join(app.config.photoDirectory, 'kept'),
    { recursive: true, withFileTypes: true });
  return entries.filter((entry) => entry.isFile()).length;
}
