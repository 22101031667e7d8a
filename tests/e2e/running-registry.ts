import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { existsSync } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { createServer, type AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { TestClient } from '#tests/support/test-client';
import { createTestDatabase, type TestDatabase } from '#tests/support/test-database';
import { Mailbox } from './mailbox';

const root = join(import.meta.dirname, '../..');
const clientDirectory = process.env['CLIENT_DIRECTORY'] ?? join(root, 'dist/client');
const startSeconds = 60;

export interface RunningRegistry {
  readonly baseUrl: string;
  readonly store: TestDatabase;
  readonly mailbox: Mailbox;
  /** What server and worker logged, for the message of a failure. */
  readonly log: readonly string[];
  client(): TestClient;
  stop(): Promise<void>;
}

/** Server and worker as they are started for users, over a database and a mailbox of their own. */
export async function startRegistry(): Promise<RunningRegistry> {
  if (!existsSync(join(clientDirectory, 'index.html'))) {
    throw new Error(`No client is built in ${clientDirectory}: run the browser tests by npm test.`);
  }
  const store = await createTestDatabase();
  const mailbox = new Mailbox();
  const photoDirectory = await mkdtemp(join(tmpdir(), 'touchneedle-e2e-'));
  const port = await freePort();
  const baseUrl = `http://127.0.0.1:${port}`;
  const env = {
    ...process.env,
    TOUCHNEEDLE_ENV: 'test',
    PORT: String(port),
    BASE_URL: baseUrl,
    DATABASE_URL: store.appUrl,
    SESSION_SECRET: 's'.repeat(32),
    REPORT_NUMBER_KEY: 'n'.repeat(32),
    MAIL_TOKEN_KEY: 'm'.repeat(32),
    SMTP_URL: await mailbox.start(),
    PHOTO_DIRECTORY: photoDirectory,
    CLIENT_DIRECTORY: clientDirectory,
    RATE_LIMITS: 'off',
  };
  const log: string[] = [];
  const children = ['server/main.ts', 'server/worker.ts'].map((file) => startChild(file, env, log));
  const stop = async (): Promise<void> => {
    await Promise.all(children.map(stopChild));
    await mailbox.stop();
    await store.drop();
    await rm(photoDirectory, { recursive: true, force: true });
  };
  try {
    await untilHealthy(baseUrl, children);
  } catch (error) {
    await stop();
    throw new Error(`The registry did not start.\n${log.join('')}`, { cause: error });
  }
  return { baseUrl, store, mailbox, log, client: () => new TestClient(baseUrl), stop };
}

function startChild(file: string, env: NodeJS.ProcessEnv, log: string[]): ChildProcess {
  const child = spawn(process.execPath, ['--import', 'tsx', file],
    { cwd: root, env, stdio: ['ignore', 'pipe', 'pipe'] });
  for (const stream of [child.stdout, child.stderr]) {
    stream.on('data', (lines: Buffer) => log.push(lines.toString()));
  }
  return child;
}

async function stopChild(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const ended = once(child, 'exit');
  child.kill('SIGTERM');
  const patience = setTimeout(() => child.kill('SIGKILL'), 10_000);
  await ended;
  clearTimeout(patience);
}

async function untilHealthy(baseUrl: string, children: readonly ChildProcess[]): Promise<void> {
  const giveUp = Date.now() + startSeconds * 1000;
  for (;;) {
    if (children.some(({ exitCode }) => exitCode !== null)) throw new Error('a process ended');
    const answer = await fetch(`${baseUrl}/api/health`).catch(() => undefined);
    if (answer?.ok) return;
    if (Date.now() > giveUp) throw new Error(`not healthy after ${startSeconds} s`);
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.on('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address() as AddressInfo;
      probe.close(() => resolve(port));
    });
  });
}
