/**
 * npm start: makes and starts all that a working registry needs, on this machine alone.
 * --empty: without the demonstration, in a database of its own, for a registry to be set up.
 */
import { existsSync, mkdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import { Children } from './children.mjs';
import { ensureClientBuild } from './client-build.mjs';
import { addressOf, ensureDatabase, startCluster } from './cluster.mjs';
import { ensurePostgres } from './debian-packages.mjs';
import { checkNode, ensurePackages } from './npm-packages.mjs';
import { dataRoot, ownPort, root } from './paths.mjs';
import { exitWith, PlainError } from './plain-error.mjs';
import { demandPort } from './ports.mjs';
import { run } from './run.mjs';

const isEmpty = process.argv.includes('--empty');
const began = Date.now();
const port = Number(process.env.PORT ?? 4310);
const mailPort = Number(process.env.MAIL_PORT ?? 4311);
const smtpPort = Number(process.env.SMTP_PORT ?? 4312);

let stopAll = async () => undefined;
let isStopping = false;

/** @param {number} code */
async function stop(code) {
  if (isStopping) return;
  isStopping = true;
  await stopAll();
  process.exit(code);
}
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => void stop(0));

try {
  await start();
} catch (error) {
  await stopAll();
  exitWith(error);
}

async function start() {
  checkNode();
  const programs = await ensurePostgres();
  await demandPort(port, 'the site', 'PORT');
  await demandPort(mailPort, 'the mail catcher', 'MAIL_PORT');
  await demandPort(smtpPort, 'the mail catcher’s SMTP', 'SMTP_PORT');
  await ensurePackages();
  await ensureClientBuild();

  const place = { programs, folder: dataRoot, port: ownPort(0) };
  const cluster = await startCluster(place);
  stopAll = () => cluster.stop();
  const database = isEmpty ? 'touchneedle_empty' : 'touchneedle';
  await ensureDatabase(place, cluster.secrets, database);
  const environment = environmentFor(place, cluster.secrets, database);
  const node = (...values) => run(process.execPath, ['--import', 'tsx', ...values],
    { cwd: root, env: environment, echo: false });
  await node('database/migrate.ts');
  await node('database/seed.ts', 'catalogue');
  if (!isEmpty) await node('database/seed.ts', 'demo');
  const setupPath = isEmpty ? (await node('database/seed.ts', 'setup-link')).trim() : '';

  const children = new Children((name, log) => {
    console.error(`\nThe ${name} ended by itself. Its last words:\n${log}`);
    void stop(1);
  });
  stopAll = async () => {
    await children.stop();
    await cluster.stop();
  };
  mkdirSync(join(dataRoot, 'mail'), { recursive: true });
  children.start('mail catcher', [join(root, 'node_modules/maildev/bin/maildev'),
    '--ip', '127.0.0.1', '--web-ip', '127.0.0.1', '--smtp', String(smtpPort),
    '--web', String(mailPort), '--mail-directory', join(dataRoot, 'mail')], environment);
  children.start('server', ['--import', 'tsx', 'server/main.ts'], environment);
  children.start('worker', ['--import', 'tsx', 'server/worker.ts'], environment);
  await waitForHealth();
  announce(setupPath);
}

function environmentFor(place, secrets, database) {
  const photos = join(dataRoot, isEmpty ? 'photos-empty' : 'photos');
  mkdirSync(photos, { recursive: true });
  return {
    ...process.env,
    PORT: String(port),
    BASE_URL: process.env.BASE_URL ?? `http://localhost:${port}`,
    DATABASE_URL: addressOf(place, 'touchneedle_app', secrets.app, database),
    DATABASE_OWNER_URL: addressOf(place, 'touchneedle_owner', secrets.owner, database),
    SESSION_SECRET: secrets.session,
    REPORT_NUMBER_KEY: secrets.number,
    MAIL_TOKEN_KEY: secrets.mail,
    SMTP_URL: process.env.SMTP_URL ?? `smtp://127.0.0.1:${smtpPort}`,
    PHOTO_DIRECTORY: photos,
    CLIENT_DIRECTORY: join(root, 'dist/client'),
    DEMO_PICTURES_DIRECTORY: join(root, '.cache/demo-pictures'),
    LOG_LEVEL: process.env.LOG_LEVEL ?? 'warn',
  };
}

async function waitForHealth() {
  const deadline = Date.now() + 60_000;
  while (Date.now() < deadline && !isStopping) {
    try {
      const answer = await fetch(`http://127.0.0.1:${port}/api/health`);
      if (answer.ok) return;
    } catch { /* not listening yet */ }
    await delay(100);
  }
  if (!isStopping) throw new PlainError('The server did not answer within a minute.');
}

function announce(setupPath) {
  const lines = ['', `Touchneedle is ready (${((Date.now() - began) / 1000).toFixed(1)} s).`, '',
    `  The registry     http://localhost:${port}`,
    `  The mail catcher http://localhost:${mailPort}`,
    `  Data             ${dataRoot}`];
  if (setupPath) {
    lines.push('', '  Set up the first registrar, once, within a day, at',
      `  http://localhost:${port}${setupPath}`);
  }
  const accounts = join(root, 'database/seeds/demo-accounts.json');
  if (!isEmpty && existsSync(accounts)) {
    lines.push('', '  Demonstration accounts');
    for (const account of JSON.parse(readFileSync(accounts, 'utf8'))) {
      lines.push(`  ${account.email.padEnd(34)} ${account.password.padEnd(28)} ${account.role}${
        account.club ? `, ${account.club}` : ''}`);
    }
  }
  lines.push('', '  Ctrl-C stops everything and keeps the data.', '');
  console.log(lines.join('\n'));
}
