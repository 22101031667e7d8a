import { randomUUID } from 'node:crypto';
import pg from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { ApiProblem } from '#shared/api-problem';
import type { DraftView, FiledReport } from '#shared/reports/report-content';
import type { ReportSearchAnswer } from '#shared/reports/report-view';
import { composeWorker, type Worker } from '#server/compose-worker';
import { system } from '#server/db/database';
import { startJobQueue, type RunningJobs } from '#server/jobs/job-queue';
import { addClub, addMember, addPerson, type TestClub } from '#tests/support/factories/people';
import { fileReport, publishReport, reportContent } from '#tests/support/factories/reports';
import { SmtpCatcher } from '#tests/support/smtp-catcher';
import { startTestApp, type TestApp } from '#tests/support/test-app';
import type { TestAnswer, TestClient } from '#tests/support/test-client';
import { startFaultRun } from './fault-run';

const run = startFaultRun('dead database', { whole: 40, sample: 6 });

let app: TestApp;
let catcher: SmtpCatcher;
let worker: Worker;
let queue: RunningJobs;
let killer: pg.Client;
let club: TestClub;
let author: TestClient;
let authorId: string;
const figures = { cuts: 0, connections: 0, requests: 0, refused: 0 };

beforeAll(async () => {
  catcher = await new SmtpCatcher().start();
  app = await startTestApp({ SMTP_URL: catcher.url });
  killer = new pg.Client({ connectionString: app.config.databaseUrl,
    application_name: 'the axe' });
  await killer.connect();
  club = await addClub(app.store.owner);
  const member = await addMember(app.store.owner, club);
  authorId = member.id;
  author = await app.client().signIn(member.email);
  queue = await startJobQueue(app.config.databaseUrl, app.logger, 'enqueue');
  worker = await composeWorker(app);
});
afterAll(async () => {
  await worker.stop();
  await queue.stop();
  await killer.end();
  await catcher.stop();
  await app.stop();
});

/** Ends every connection of the application, whatever it is doing. */
async function cutConnections(): Promise<void> {
  const { rowCount } = await killer.query(
    `select pg_terminate_backend(pid) from pg_stat_activity
      where usename = current_user and datname = current_database() and pid <> pg_backend_pid()`);
  figures.cuts++;
  figures.connections += rowCount ?? 0;
}

/** Cuts now and then until `work` has ended; the pause between two cuts is the seed's. */
async function whileCutting<Result>(work: Promise<Result>): Promise<Result> {
  let isOver = false;
  const cutting = (async () => {
    while (!isOver) {
      await new Promise((resolve) => setTimeout(resolve, 50 + run.below(200)));
      await cutConnections();
    }
  })();
  try {
    return await work;
  } finally {
    isOver = true;
    await cutting;
  }
}

/** Repeats as the client does: 503 is the only answer of the server that asks for it. */
async function untilAnswered<Body>(
  send: () => Promise<TestAnswer<Body & Partial<ApiProblem>>>,
): Promise<TestAnswer<Body & Partial<ApiProblem>>> {
  for (;;) {
    const answer = await send();
    figures.requests++;
    if (answer.status < 500) return answer;
    figures.refused++;
    const cause = app.log.findLast(({ msg }) => msg === 'unexpected error');
    expect([answer.status, answer.body.code], JSON.stringify(cause)).toEqual([503, 'unavailable']);
    expect(answer.headers.get('content-type')).toContain('application/problem+json');
    expect(answer.headers.get('retry-after')).toBe('5');
    await new Promise((resolve) => setTimeout(resolve, 10 + run.below(60)));
  }
}

describe('an API whose database connections are cut at any moment', () => {
  it('loses no draft, files no report twice, and answers 503 at worst', async () => {
    for (let round = 0; round < run.rounds; round++) {
      const draftId = randomUUID();
      const reportId = randomUUID();
      const account = `<p>Round ${round}.</p>`;
      await whileCutting(Promise.all([
        (async () => {
          for (let revision = 0; revision < 4; revision++) {
            const save = { revision, content: { account: `${account}${revision}` } };
            const saved = await untilAnswered(
              () => author.put<DraftView>(`/api/drafts/${draftId}`, save));
            expect(saved.status, saved.text).toBe(200);
            expect(saved.body.revision).toBe(revision + 1);
          }
        })(),
        (async () => {
          const filed = await untilAnswered(() => author.post<FiledReport>('/api/reports',
            { id: reportId, content: reportContent(club, { account }) }));
          expect([200, 201], filed.text).toContain(filed.status);
          const again = await untilAnswered(() => author.post<FiledReport>('/api/reports',
            { id: reportId, content: reportContent(club, { account }) }));
          expect(again.body.number).toBe(filed.body.number);
        })(),
        untilAnswered(() => author.get<ReportSearchAnswer>('/api/reports')),
      ]));
      const kept = await untilAnswered(() => author.get<DraftView>(`/api/drafts/${draftId}`));
      expect(kept.body).toMatchObject({ revision: 4, content: { account: `${account}3` } });
    }
    const reports = await app.store.owner('report').where({ author_id: authorId });
    expect(reports).toHaveLength(run.rounds);
    const versions = await app.store.owner('report_version')
      .whereIn('report_id', reports.map(({ id }) => id));
    expect(versions).toHaveLength(run.rounds);
    const drafts = await app.store.owner('draft').where({ author_id: authorId });
    expect(drafts).toHaveLength(run.rounds);
    expect(app.log.filter(({ msg }) => msg === 'unexpected error')).toEqual([]);
    // Each refusal is on record with its cause.
    const recorded = app.log.filter(({ msg }) => msg === 'unavailable');
    expect(recorded.length).toBeGreaterThanOrEqual(figures.refused);
    for (const line of recorded) expect(line['err']).toBeTruthy();
    run.report(figures);
  });
});

describe('a worker whose database connections are cut at any moment', () => {
  it('survives, and mails each reader once or leaves it uncertain', async () => {
    const due: string[] = [];
    const rounds = Math.ceil(run.rounds / 4);
    for (let round = 0; round < rounds; round++) {
      for (let index = 0; index < 5; index++) {
        const person = await addPerson(app.store.owner, { roles: ['subscriber'] });
        await app.store.owner('watch').insert({ id: randomUUID(), person_id: person.id,
          name: 'A year', cadence: 'at_once',
          filter: JSON.stringify({ yearFrom: 1500 + round, yearTo: 1500 + round }) });
        due.push(person.email);
      }
      const number = await fileReport(author, reportContent(club, { audience: 'public',
        presentedAs: { coinType: null, kind: 'coin', metal: 'gold', description: 'Ducat',
          year: 1500 + round, mintMark: '' } }));
      await publishReport(app.store.owner, number, { audience: 'public' });
      const publication = await app.store.owner('publication')
        .join('report', 'report.id', 'report_id').where({ number })
        .whereRaw('upper_inf(publication.during)')
        .first('report_id as reportId', 'publication.id as publicationId');
      await app.database.asActor(system,
        (trx) => queue.enqueue(trx, 'match-watches', publication));
      const cuts = 1 + run.below(6);
      for (let cut = 0; cut < cuts; cut++) {
        await new Promise((resolve) => setTimeout(resolve, run.below(600)));
        await cutConnections();
      }
    }
    const states = async (): Promise<string[]> => {
      // As if the times of retries had gone by; of claims, those that are long over.
      await app.store.owner('mail').where({ state: 'ready' }).update({ not_before: new Date(0) });
      await app.store.owner('pgboss.job').where({ name: 'match-watches', state: 'retry' })
        .update({ start_after: new Date(0) });
      return app.store.owner('mail').where({ kind: 'digest' }).pluck('state');
    };
    await expect.poll(async () => (await states())
      .filter((state) => state === 'sent' || state === 'uncertain').length,
    { timeout: 150_000, interval: 500 }).toBe(due.length);
    const mails = await app.store.owner('mail').where({ kind: 'digest' })
      .select('address', 'state');
    expect(mails.map(({ address }) => address).toSorted()).toEqual(due.toSorted());
    for (const { address, state } of mails) {
      const bodies = catcher.mailsTo(address).length;
      if (state === 'sent') expect(bodies, address).toBe(1);
      else expect(bodies, address).toBeLessThanOrEqual(1);
    }
    run.report({ ...figures, due: due.length, bodies: catcher.caught.length,
      uncertain: mails.filter(({ state }) => state === 'uncertain').length });
  });
});
