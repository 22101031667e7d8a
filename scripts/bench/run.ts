import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { mkdtemp, rm } from 'node:fs/promises';
import { cpus, loadavg, tmpdir, totalmem } from 'node:os';
import { join } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import { parseArgs } from 'node:util';
import autocannon from 'autocannon';
import bcrypt from 'bcrypt';
import knex from 'knex';
import { createTestDatabase } from '#tests/support/test-database';
import { TestClient } from '#tests/support/test-client';
import { generatePeople, generateReports } from './generate';
import { listScenarios, type Found, type Scenario } from './scenarios';

const { values } = parseArgs({ options: { reports: { type: 'string', default: '100000' },
  only: { type: 'string' }, seconds: { type: 'string', default: '20' } } });
const port = 4397;
const origin = `http://127.0.0.1:${port}`;
const password = 'a sentence for the bench';
const connections = 20;

const store = await createTestDatabase();
const photoDirectory = await mkdtemp(join(tmpdir(), 'touchneedle-bench-'));
let server: ChildProcess | undefined;
try {
  const people = await generatePeople(store.owner, await bcrypt.hash(password, 5));
  const began = Date.now();
  const superuser = knex({ client: 'pg', connection: superuserAddress(store.name),
    pool: { min: 1, max: 1 } });
  await generateReports(superuser, Number(values.reports)).finally(() => superuser.destroy());
  say(`${values.reports} reports made in ${((Date.now() - began) / 1000).toFixed(0)} s.`);
  server = await startServer();
  const member = await new TestClient(origin).signIn(people.memberEmail, password);
  const moderator = await new TestClient(origin).signIn(people.moderatorEmail, password);
  const cookies = { member: member.cookieHeader(), moderator: moderator.cookieHeader() };
  const scenarios = await listScenarios(store.owner, {
    asMember: async (path) => (await member.get<Found>(path)).body,
    asModerator: async (path) => (await moderator.get<Found>(path)).body,
  });
  const { rows: [{ version }] } = await store.owner.raw('show server_version as version')
    .catch(() => store.owner.raw(`select current_setting('server_version') as version`));
  say(`${cpus().length} cores, ${Math.round(totalmem() / 2 ** 30)} GiB, Node ${
    process.versions.node}, PostgreSQL ${version}; ${connections} connections, ${
    values.seconds} s each.\n`);
  say('| What | p50 ms | p95 ms | p99 ms | target p95 | requests/s | errors | load |');
  say('|---|---|---|---|---|---|---|---|');
  let missed = 0;
  for (const scenario of scenarios) {
    if (values.only && !scenario.name.includes(values.only)) continue;
    if (scenario.isFirstTime) {
      await stopServer();
      server = await startServer();
    }
    if (!await measure(scenario, cookies[scenario.as])) missed++;
  }
  process.exitCode = missed ? 1 : 0;
} finally {
  await stopServer();
  await store.drop();
  await rm(photoDirectory, { recursive: true, force: true });
}

async function measure(scenario: Scenario, cookie: string): Promise<boolean> {
  const latencies: number[] = [];
  const options = { url: origin, connections, headers: { cookie } };
  // Once without counting: code is compiled, plans are made, pages are read.
  await autocannon({ ...options, duration: 15,
    setupClient: startingApart(scenario.warmingUp) });
  const result = await new Promise<autocannon.Result>((resolve, reject) => {
    autocannon({ ...options, duration: Number(values.seconds),
      setupClient: startingApart(scenario.paths) },
    (error: unknown, measured) => {
      if (error) reject(new Error('the load could not be put on', { cause: error }));
      else resolve(measured);
    }).on('response', (_client, _status, _bytes, milliseconds) => {
      latencies.push(milliseconds);
    });
  });
  latencies.sort((one, other) => one - other);
  const at = (share: number): number => latencies[Math.floor(latencies.length * share)] ?? 0;
  const p95 = at(0.95);
  say(`| ${scenario.name} | ${at(0.5).toFixed(0)} | ${p95.toFixed(0)} | ${at(0.99).toFixed(0)} | ${
    scenario.target} | ${result.requests.average.toFixed(0)} | ${
    result.errors + result.non2xx} | ${loadavg()[0]?.toFixed(1)} |`);
  return p95 <= scenario.target && result.non2xx === 0;
}

/** Else every connection would begin with the first path, and all ask the same at one time. */
function startingApart(paths: readonly string[]): (client: autocannon.Client) => void {
  let started = 0;
  return (client) => {
    const start = Math.floor((started++ % connections) * paths.length / connections);
    client.setRequests([...paths.slice(start), ...paths.slice(0, start)]
      .map((path) => ({ method: 'GET', path })));
  };
}

async function stopServer(): Promise<void> {
  if (!server) return;
  server.kill('SIGTERM');
  await once(server, 'exit');
  server = undefined;
}

async function startServer(): Promise<ChildProcess> {
  const child = spawn(process.execPath, ['--import', 'tsx', 'server/main.ts'], {
    stdio: ['ignore', 'inherit', 'inherit'],
    env: { ...process.env, NODE_ENV: 'production', TOUCHNEEDLE_ENV: 'production',
      PORT: String(port), BASE_URL: origin, DATABASE_URL: store.appUrl, RATE_LIMITS: 'off',
      SESSION_SECRET: 's'.repeat(32), REPORT_NUMBER_KEY: 'n'.repeat(32),
      MAIL_TOKEN_KEY: 'm'.repeat(32), PHOTO_DIRECTORY: photoDirectory, LOG_LEVEL: 'fatal' } });
  for (let tries = 0; tries < 300; tries++) {
    const isUp = await fetch(`${origin}/api/health`).then(({ ok }) => ok, () => false);
    if (isUp) return child;
    await delay(100);
  }
  throw new Error('the server did not answer within half a minute');
}

function superuserAddress(database: string): string {
  const address = new URL(process.env['TEST_DATABASE_SUPERUSER_URL'] ?? '');
  address.pathname = `/${database}`;
  return address.href;
}

function say(line: string): void {
  process.stdout.write(`${line}\n`);
}
