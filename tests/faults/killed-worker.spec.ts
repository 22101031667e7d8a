import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { system } from '#server/db/database';
import { startJobQueue, type RunningJobs } from '#server/jobs/job-queue';
import { addClub, addMember, addPerson, type TestClub } from '#tests/support/factories/people';
import { fileReport, publishReport, reportContent } from '#tests/support/factories/reports';
import { MailRoom } from '#tests/support/mail-room';
import type { SmtpBehaviour } from '#tests/support/smtp-catcher';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestClient } from '#tests/support/test-client';
import { startFaultRun } from './fault-run';

const run = startFaultRun('killed workers, failing SMTP', { whole: 30, sample: 3 });
const watchersARound = 12;
const root = join(import.meta.dirname, '../..');

let app: TestApp;
let room: MailRoom;
let queue: RunningJobs;
let club: TestClub;
let author: TestClient;
const children = new Set<ChildProcess>();

beforeAll(async () => {
  app = await startTestApp();
  room = await MailRoom.open(app);
  queue = await startJobQueue(app.config.databaseUrl, app.logger, 'enqueue');
  club = await addClub(app.store.owner);
  author = await app.client().signIn((await addMember(app.store.owner, club)).email);
});
afterAll(async () => {
  for (const child of children) child.kill('SIGKILL');
  await queue.stop();
  await room.close();
  await app.stop();
});

/** The real worker in a process of its own. */
function startWorker(): ChildProcess {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/worker.ts'], {
    cwd: root, stdio: 'ignore',
    env: { PATH: process.env['PATH'] ?? '', TOUCHNEEDLE_ENV: 'test', TZ: 'UTC',
      BASE_URL: app.baseUrl, DATABASE_URL: app.config.databaseUrl, SMTP_URL: room.catcher.url,
      SESSION_SECRET: app.config.sessionSecret, REPORT_NUMBER_KEY: app.config.reportNumberKey,
      MAIL_TOKEN_KEY: app.config.mailTokenKey, PHOTO_DIRECTORY: app.config.photoDirectory },
  });
  children.add(child);
  child.on('exit', () => children.delete(child));
  return child;
}

async function end(child: ChildProcess, signal: 'SIGKILL' | 'SIGTERM'): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const ended = once(child, 'exit');
  child.kill(signal);
  await ended;
}

/** A report that a dozen people of its own are waiting for, with its matching enqueued. */
async function publishToWatchers(round: number): Promise<string[]> {
  const watchers: string[] = [];
  for (let index = 0; index < watchersARound; index++) {
    const person = await addPerson(app.store.owner, { roles: ['subscriber'] });
    await room.addWatch(person, { yearFrom: 1500 + round, yearTo: 1500 + round });
    watchers.push(person.email);
  }
  const number = await fileReport(author, reportContent(club, { audience: 'public', presentedAs: {
    coinType: null, kind: 'coin', metal: 'gold', description: `Ducat of round ${round}`,
    year: 1500 + round, mintMark: '' } }));
  await publishReport(app.store.owner, number, { audience: 'public' });
  const publication = await app.store.owner('publication').join('report', 'report.id', 'report_id')
    .where({ number }).whereRaw('upper_inf(publication.during)')
    .first('report_id as reportId', 'publication.id as publicationId');
  await app.database.asActor(system, (trx) => queue.enqueue(trx, 'match-watches', publication));
  return watchers;
}

/** As if the times of claims, of retries, and of jobs whose worker is dead, had gone by. */
async function letTimePass(): Promise<void> {
  await app.store.owner('mail').where({ state: 'sending' }).update({ claimed_until: new Date(0) });
  await app.store.owner('mail').where({ state: 'ready' }).update({ not_before: new Date(0) });
  await app.store.owner('pgboss.job').where({ name: 'match-watches' })
    .whereIn('state', ['active', 'retry', 'created'])
    .update({ state: 'retry', start_after: new Date(0) });
}

async function openWork(): Promise<number> {
  const { rows: [{ open }] } = await app.store.owner.raw(`
    select (select count(*) from mail where state in ('reserved', 'ready', 'sending'))
      + (select count(*) from alert where mail_id is null)
      + (select count(*) from pgboss.job where name = 'match-watches'
          and state in ('created', 'retry', 'active')) as open`);
  return Number(open);
}

const drawBehaviour = (): SmtpBehaviour => {
  const draw = run.below(100);
  if (draw < 60) return { kind: 'accept' };
  if (draw < 70) return { kind: 'refuse', at: 'recipient', code: 451 };
  if (draw < 78) return { kind: 'refuse', at: 'body', code: 452 };
  if (draw < 88) return { kind: 'drop_at_recipient' };
  if (draw < 94) return { kind: 'drop_after_body' };
  return { kind: 'hang' };
};

describe('a worker killed at any moment, over an SMTP server that fails', () => {
  it('sends every mail that is due once, or leaves it uncertain; never twice', async () => {
    const due: string[] = [];
    let kills = 0;
    let outages = 0;
    for (let round = 0; round < run.rounds; round++) {
      due.push(...await publishToWatchers(round));
      const behaviours = new Map<string, SmtpBehaviour>();
      room.catcher.behaveAs((address, nth) => {
        const key = `${address} ${nth}`;
        const behaviour = behaviours.get(key) ?? drawBehaviour();
        behaviours.set(key, behaviour);
        return behaviour;
      });
      const isOut = run.chance(0.2);
      if (isOut) await room.catcher.stop();
      outages += isOut ? 1 : 0;
      const { length: namedBefore } = room.catcher.named;
      const { length: caughtBefore } = room.catcher.caught;
      const worker = startWorker();
      const exits = once(worker, 'exit');
      const nth = 1 + run.below(watchersARound);
      // At a recipient, at a body, or at a moment without either.
      const moment = run.below(3);
      await Promise.race([
        exits,
        new Promise((resolve) => setTimeout(resolve, 2000 + run.below(3000))),
        ...(moment === 0 ? [room.catcher.until(
          () => room.catcher.named.length >= namedBefore + nth)] : []),
        ...(moment === 1 ? [room.catcher.until(
          () => room.catcher.caught.length >= caughtBefore + nth)] : []),
      ]);
      expect([worker.exitCode, worker.signalCode], 'it ended by itself').toEqual([null, null]);
      await end(worker, 'SIGKILL');
      kills++;
      room.catcher.release();
      if (isOut) await room.catcher.start();
      await letTimePass();
    }

    room.catcher.behaveAs(() => ({ kind: 'accept' }));
    const last = startWorker();
    await expect.poll(async () => {
      // Only what waits for a time to come: the last worker's own claims are left alone.
      await app.store.owner('mail').where({ state: 'ready' }).update({ not_before: new Date(0) });
      return openWork();
    }, { timeout: 150_000, interval: 500 }).toBe(0);
    await end(last, 'SIGTERM');
    expect(last.exitCode).toBe(0);

    const mails: { address: string; state: string; message_id: string; items: number }[] =
      await app.store.owner('mail').select('address', 'state', 'message_id', app.store.owner.raw(
        '(select count(*)::integer from mail_item where mail_id = mail.id) as items'))
        .where({ kind: 'digest' });
    const seen = room.catcher.caught;
    expect(mails.map(({ address }) => address).toSorted()).toEqual(due.toSorted());
    for (const { address, state, message_id: messageId, items } of mails) {
      expect(['sent', 'uncertain'], address).toContain(state);
      expect(items, address).toBe(1);
      const bodies = seen.filter((mail) => mail.to === address);
      // Uncertain: it may have come, and it came at most once.
      if (state === 'sent') expect(bodies.length, address).toBe(1);
      else expect(bodies.length, address).toBeLessThanOrEqual(1);
      for (const body of bodies) expect(body.messageId).toBe(messageId);
    }
    expect(new Set(seen.map(({ messageId }) => messageId)).size).toBe(seen.length);
    const uncertain = mails.filter(({ state }) => state === 'uncertain');
    run.report({ kills, outages, due: due.length, sent: mails.length - uncertain.length,
      uncertain: uncertain.length,
      'uncertain that came': uncertain.filter(({ address }) =>
        seen.some(({ to }) => to === address)).length,
      bodies: seen.length, tries: room.catcher.named.length, twice: 0 });
  });
});
