import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { addClub, addMember, addPerson, type TestClub,
  type TestPerson } from '#tests/support/factories/people';
import { fileReport, publishReport, reportContent } from '#tests/support/factories/reports';
import { MailRoom } from '#tests/support/mail-room';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';

let app: TestApp;
let room: MailRoom;
let club: TestClub;
let author: TestClient;
let person: TestPerson;

beforeAll(async () => {
  app = await startTestApp();
  room = await MailRoom.open(app);
  club = await addClub(app.store.owner);
  author = await app.client().signIn((await addMember(app.store.owner, club)).email);
});
beforeEach(async () => {
  // UTC+1 in December: seven in the morning is six in UTC (IANA tz database).
  person = await addPerson(app.store.owner,
    { roles: ['subscriber'], timeZone: 'Europe/Berlin' });
});
afterEach(() => app.store.owner('watch').update({ deleted_at: new Date() }));
afterAll(async () => {
  await room.close();
  await app.stop();
});

/** Publishes a report, and dates the alerts of it. */
async function alertAt(madeAt: string): Promise<string> {
  const number = await fileReport(author, reportContent(club, { audience: 'public' }));
  await publishReport(app.store.owner, number, { audience: 'public' });
  await room.match(number);
  await app.store.owner('alert').update({ made_at: madeAt })
    .whereIn('report_id', app.store.owner('report').select('id').where({ number }));
  return number;
}

/** Which of the reports each mail to the person is about, in the order of sending. */
async function mailsAbout(...numbers: readonly string[]): Promise<number[][]> {
  await room.send();
  return room.mailsTo(person).map(({ parsed }) => numbers
    .flatMap((number, index) => parsed.text?.includes(number) ? [index] : []));
}

const planAt = (now: string): Promise<number> => room.plan(new Date(now));

describe('a daily window', () => {
  it('opens at seven where the subscriber lives', async () => {
    await room.addWatch(person, {}, { cadence: 'daily' });
    const number = await alertAt('2026-12-02T18:00:00Z');
    expect(await planAt('2026-12-03T05:59:59Z')).toBe(0);
    expect(await planAt('2026-12-03T06:00:00Z')).toBe(1);
    expect(await planAt('2026-12-03T06:00:05Z')).toBe(0);
    expect(await planAt('2026-12-04T06:00:00Z')).toBe(0);
    expect(await mailsAbout(number)).toEqual([[0]]);
    const [mail] = room.mailsTo(person);
    expect(mail?.parsed.text).toMatch(/3 December|December 3/);
    expect(mail?.parsed.text).toMatch(/\b0?7:00/);
  });

  it('takes what came before it, and leaves what came at seven to the next day', async () => {
    await room.addWatch(person, {}, { cadence: 'daily' });
    const before = await alertAt('2026-12-03T05:59:59.999Z');
    const at = await alertAt('2026-12-03T06:00:00Z');
    expect(await planAt('2026-12-03T11:00:00Z')).toBe(1);
    expect(await mailsAbout(before, at)).toEqual([[0]]);
    expect(await planAt('2026-12-04T06:00:00Z')).toBe(1);
    expect(await mailsAbout(before, at)).toEqual([[0], [1]]);
  });

  it('collects in the next one what was matched late', async () => {
    await room.addWatch(person, {}, { cadence: 'daily' });
    const early = await alertAt('2026-12-02T10:00:00Z');
    await planAt('2026-12-03T06:00:00Z');
    // Made before the boundary, but committed only after its mail was planned.
    const late = await alertAt('2026-12-02T11:00:00Z');
    expect(await planAt('2026-12-03T06:01:00Z')).toBe(0);
    await planAt('2026-12-04T06:00:00Z');
    expect(await mailsAbout(early, late)).toEqual([[0], [1]]);
  });

  it('still makes its mail where no planner ran for days', async () => {
    await room.addWatch(person, {}, { cadence: 'daily' });
    const numbers = [await alertAt('2026-12-01T10:00:00Z'), await alertAt('2026-12-02T10:00:00Z')];
    expect(await planAt('2026-12-06T20:00:00Z')).toBe(1);
    expect(await mailsAbout(...numbers)).toEqual([[0, 1]]);
  });
});

describe('a weekly window', () => {
  it('opens on Monday at seven', async () => {
    await room.addWatch(person, {}, { cadence: 'weekly' });
    const number = await alertAt('2026-12-03T10:00:00Z');
    expect(await planAt('2026-12-06T23:00:00Z')).toBe(0);
    expect(await planAt('2026-12-07T05:59:00Z')).toBe(0);
    expect(await planAt('2026-12-07T06:00:00Z')).toBe(1);
    expect(await mailsAbout(number)).toEqual([[0]]);
  });

  it('waits while another watch of the person is due daily', async () => {
    await room.addWatch(person, { metal: ['silver'] }, { cadence: 'weekly' });
    const weekly = await alertAt('2026-12-03T10:00:00Z');
    await app.store.owner('watch').update({ paused_until: '9999-12-31' });
    await room.addWatch(person, {}, { cadence: 'daily' });
    const daily = await alertAt('2026-12-03T10:00:00Z');
    await app.store.owner('watch').update({ paused_until: null });
    await planAt('2026-12-04T06:00:00Z');
    expect(await mailsAbout(weekly, daily)).toEqual([[1]]);
    await planAt('2026-12-07T06:00:00Z');
    expect(await mailsAbout(weekly, daily)).toEqual([[1], [0]]);
  });

  it('is not widened by a daily one that falls into its week', async () => {
    await room.addWatch(person, { metal: ['silver'] }, { cadence: 'weekly' });
    await alertAt('2026-11-28T10:00:00Z');
    const thisWeek = await alertAt('2026-12-01T10:00:00Z');
    await app.store.owner('watch').update({ paused_until: '9999-12-31' });
    await room.addWatch(person, {}, { cadence: 'daily' });
    const daily = await alertAt('2026-12-02T10:00:00Z');
    await app.store.owner('watch').update({ paused_until: null });
    await planAt('2026-12-03T06:00:00Z');
    expect(await mailsAbout(thisWeek, daily)).toEqual([[1]]);
  });
});

describe('mail at once', () => {
  it('goes one a minute, without loss', async () => {
    await room.addWatch(person);
    const first = await alertAt('2026-12-03T10:00:10Z');
    expect(await planAt('2026-12-03T10:00:20Z')).toBe(1);
    const second = await alertAt('2026-12-03T10:00:30Z');
    expect(await planAt('2026-12-03T10:00:40Z')).toBe(0);
    expect(await planAt('2026-12-03T10:01:00Z')).toBe(1);
    expect(await mailsAbout(first, second)).toEqual([[0], [1]]);
  });
});

describe('planners', () => {
  it('make one mail where several run at once', async () => {
    await room.addWatch(person, {}, { cadence: 'daily' });
    const number = await alertAt('2026-12-02T18:00:00Z');
    const made = await Promise.all(
      Array.from({ length: 4 }, () => planAt('2026-12-03T06:00:00Z')));
    expect(made.toSorted()).toEqual([0, 0, 0, 1]);
    expect(await mailsAbout(number)).toEqual([[0]]);
  });

  it('reach what is due behind fifty alerts of a watch that is gone', async () => {
    const gone = await room.addWatch(person);
    await alertAt('2026-11-01T10:00:00Z');
    const { publication_id: publicationId } = await app.store.owner('alert')
      .where({ watch_id: gone }).first('publication_id');
    for (let more = 0; more < 50; more++) await fileReport(author, reportContent(club));
    await app.store.owner.raw(
      `insert into alert (report_id, watch_id, person_id, publication_id, reasons, made_at)
       select id, ?, ?, ?, '[{"kind":"all","value":""}]', ? from report where state = 'filed'`,
      [gone, person.id, publicationId, '2026-11-01T10:00:00Z']);
    await app.store.owner('watch').where({ id: gone }).update({ deleted_at: new Date() });
    await room.addWatch(person);
    const number = await alertAt('2026-12-03T10:00:00Z');
    expect(await planAt('2026-12-03T10:01:00Z')).toBe(1);
    expect(await mailsAbout(number)).toEqual([[0]]);
  });
});
