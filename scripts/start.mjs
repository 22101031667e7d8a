/**
 * npm start: makes and starts all that a working registry needs, on this machine alone.
 *
 *   --empty    without the demonstration, in a database of its own, for a registry to be set up
 *
 * Read from the environment: PORT (4310); MAIL_PORT (4311) and SMTP_PORT (4312) of the mail
 * catcher; BASE_URL, MAIL_FROM, LOG_LEVEL.
 */
import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import { announcement } from './announcement.mjs';
import { Children } from './children.mjs';
import { ensureClientBuild } from './client-build.mjs';
import { addressOf, clusterVersion, ensureDatabase, startCluster } from './cluster.mjs';
import { ensurePostgres } from './debian-packages.mjs';
import { checkNode, ensurePackages } from './npm-packages.mjs';
import { dataRoot, root } from './paths.mjs';
import { PlainError } from './plain-error.mjs';
import { demandPort, freeOwnPort, portFrom } from './ports.mjs';
import { run } from './run.mjs';
import { StarterLock } from './starter-lock.mjs';
import { Stopping } from './stopping.mjs';

const began = Date.now();
const stopping = new Stopping(0);
await stopping.during(start);

async function start() {
  checkNode();
  const isEmpty = readArguments(process.argv.slice(2));
  const ports = { site: portFrom('PORT', 4310), mail: portFrom('MAIL_PORT', 4311),
    smtp: portFrom('SMTP_PORT', 4312) };
  const lock = await StarterLock.take(dataRoot,
    `Touchneedle already runs from this clone, at http://localhost:${ports.site}`);
  stopping.undoWith(() => lock.release());
  await demandPort(ports.site, 'the site', 'PORT');
  await demandPort(ports.mail, 'the pages of the mail catcher', 'MAIL_PORT');
  await demandPort(ports.smtp, 'the mail catcher', 'SMTP_PORT');
  const programs = await ensurePostgres(clusterVersion(dataRoot));
  stopping.check();
  await ensurePackages();
  stopping.check();
  await ensureClientBuild();
  stopping.check();

  const cluster = await startCluster({ programs, folder: dataRoot, port: await freeOwnPort(0) },
    lock, tellDeath);
  stopping.undoWith(() => cluster.stop());
  const places = placesFor(isEmpty);
  const environment = environmentFor(cluster, ports, places);
  const setupPath = await prepareDatabase(cluster, environment, places, isEmpty);

  const children = new Children(lock, join(dataRoot, 'logs'), tellDeath);
  stopping.undoWith(() => children.stop());
  children.start('mail catcher', ['node_modules/maildev/bin/maildev', '--ip', '127.0.0.1',
    '--web-ip', '127.0.0.1', '--smtp', String(ports.smtp), '--web', String(ports.mail),
    '--mail-directory', places.mail], { PATH: process.env.PATH });
  children.start('server', ['--import', 'tsx', 'server/main.ts'], environment);
  children.start('worker', ['--import', 'tsx', 'server/worker.ts'], environment);
  await waitForAnswer(`http://127.0.0.1:${ports.mail}/`, 'mail catcher');
  await waitForAnswer(`http://127.0.0.1:${ports.site}/api/health`, 'server');
  console.log(announcement({ ports, setupPath, isEmpty, dataRoot,
    seconds: (Date.now() - began) / 1000 }));
}

/**
 * @param {string[]} values
 * @returns {boolean} whether to start without the demonstration
 */
function readArguments(values) {
  const unknown = values.find((value) => value !== '--empty');
  if (unknown) {
    throw new PlainError(`npm start does not know ${unknown}. It knows one option: `
      + 'npm run start -- --empty, a registry without the demonstration.');
  }
  return values.includes('--empty');
}

/**
 * The demonstration and an empty registry share the cluster and nothing else.
 * @param {boolean} isEmpty
 */
function placesFor(isEmpty) {
  const suffix = isEmpty ? '-empty' : '';
  const places = { database: isEmpty ? 'touchneedle_empty' : 'touchneedle',
    photos: join(dataRoot, `photos${suffix}`), mail: join(dataRoot, `mail${suffix}`) };
  // Photos not yet published, and mails with their links, are no other user's business.
  for (const folder of [places.photos, places.mail]) {
    mkdirSync(folder, { recursive: true, mode: 0o700 });
  }
  return places;
}

/**
 * @param {import('./cluster.mjs').Cluster} cluster
 * @param {{ site: number, smtp: number }} ports
 * @param {ReturnType<typeof placesFor>} places
 * @returns {NodeJS.ProcessEnv} of the server and the worker
 */
function environmentFor(cluster, ports, places) {
  return {
    NODE_ENV: 'production',
    TOUCHNEEDLE_ENV: 'production',
    LOG_LEVEL: 'warn',
    BASE_URL: `http://localhost:${ports.site}`,
    ...process.env,
    PORT: String(ports.site),
    DATABASE_URL: addressOf(cluster, 'app', places.database),
    SESSION_SECRET: cluster.secrets.session,
    REPORT_NUMBER_KEY: cluster.secrets.number,
    MAIL_TOKEN_KEY: cluster.secrets.mail,
    SMTP_URL: `smtp://127.0.0.1:${ports.smtp}`,
    PHOTO_DIRECTORY: places.photos,
    CLIENT_DIRECTORY: join(root, 'dist/client'),
    DEMO_PICTURES_DIRECTORY: join(root, '.cache/demo-pictures'),
  };
}

/**
 * @param {import('./cluster.mjs').Cluster} cluster
 * @param {NodeJS.ProcessEnv} environment
 * @param {ReturnType<typeof placesFor>} places
 * @param {boolean} isEmpty
 * @returns {Promise<string>} path at which the first registrar is set up, '' where there is one
 */
async function prepareDatabase(cluster, environment, places, isEmpty) {
  await ensureDatabase(cluster, places.database);
  // The owner's address goes to these alone: the server and the worker own nothing.
  const env = { ...environment, DATABASE_OWNER_URL: addressOf(cluster, 'owner', places.database) };
  const script = (...values) => {
    stopping.check();
    return run(process.execPath, ['--import', 'tsx', ...values], { cwd: root, env });
  };
  console.log('Bringing the database up to date …');
  await script('database/migrate.ts');
  await script('database/seed.ts', 'catalogue');
  if (isEmpty) return (await script('database/seed.ts', 'setup-link')).trim();
  await script('database/seed.ts', 'demo');
  return '';
}

/**
 * @param {string} name
 * @param {string} words its last lines
 */
function tellDeath(name, words) {
  if (stopping.isUnderWay) return;
  console.error(`\nThe ${name} ended by itself; the rest is stopped. Its last lines:\n\n${
    words}\n`);
  void stopping.end(1);
}

/**
 * @param {string} address
 * @param {string} name
 */
async function waitForAnswer(address, name) {
  const deadline = Date.now() + 60_000;
  while (Date.now() < deadline) {
    stopping.check();
    try {
      if ((await fetch(address, { signal: AbortSignal.timeout(5_000) })).ok) return;
    } catch {
      // Not listening yet.
    }
    await delay(100);
  }
  throw new PlainError(`The ${name} did not answer at ${address} within a minute. Its log is in ${
    join(dataRoot, 'logs')}.`);
}
