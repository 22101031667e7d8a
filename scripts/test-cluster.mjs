/**
 * A throw-away cluster for tests. Run by itself (`node scripts/test-cluster.mjs`) it stays until
 * Ctrl-C and prints what single suites need in their environment:
 *
 *   npx vitest run --config tests/vitest.config.ts --project api
 */
import { readdirSync, rmSync } from 'node:fs';
import { basename, dirname, join } from 'node:path';
import { addressOf, ensureDatabase, startCluster } from './cluster.mjs';
import { ensurePostgres } from './debian-packages.mjs';
import { testDataRoot } from './paths.mjs';
import { freeOwnPort } from './ports.mjs';
import { endLeftovers, StarterLock } from './starter-lock.mjs';
import { Stopping } from './stopping.mjs';

/** Nothing in it outlives the run, so it may be fast instead of safe. */
const settings = ['fsync=off', 'synchronous_commit=off', 'full_page_writes=off',
  'shared_buffers=256MB', 'max_wal_size=4GB', 'autovacuum_naptime=1d'];

/**
 * @param {string} programs folder of PostgreSQL's
 * @param {Stopping} stopping ends and removes it
 * @returns {Promise<import('./cluster.mjs').Cluster>}
 */
export async function startTestCluster(programs, stopping) {
  await removeLeftovers();
  const folder = `${testDataRoot}-${process.pid}`;
  const lock = await StarterLock.take(folder, 'Tests of this clone are under way');
  stopping.undoWith(() => rmSync(folder, { recursive: true, force: true }));
  const cluster = await startCluster({ programs, folder, port: await freeOwnPort(1), settings },
    lock, (name, words) => {
      console.error(`The ${name} of the tests ended by itself. Its last lines:\n\n${words}`);
      void stopping.end(1);
    });
  stopping.undoWith(() => cluster.stop());
  await ensureDatabase(cluster, 'touchneedle_test');
  return cluster;
}

/** Clusters of runs that were killed. */
async function removeLeftovers() {
  let names = [];
  try {
    names = readdirSync(dirname(testDataRoot));
  } catch {
    // No data folder yet, so nothing was left in it.
  }
  for (const name of names.filter((each) => each.startsWith(`${basename(testDataRoot)}-`))) {
    const folder = join(dirname(testDataRoot), name);
    if (await endLeftovers(folder)) rmSync(folder, { recursive: true, force: true });
  }
}

if (process.argv[1] === import.meta.filename) {
  const stopping = new Stopping(0);
  await stopping.during(async () => {
    const programs = await ensurePostgres();
    const cluster = await startTestCluster(programs, stopping);
    console.log(`export TEST_DATABASE_ADMIN_URL=${addressOf(cluster, 'owner', 'postgres')}
export TEST_DATABASE_APP_PASSWORD=${cluster.secrets.app}
export TEST_DATABASE_SUPERUSER_URL=${addressOf(cluster, 'superuser', 'postgres')}
export TEST_POSTGRES_PROGRAMS=${programs}

# Ctrl-C stops it and removes its data.`);
    // Nothing else keeps this process from its end while the cluster serves others.
    setInterval(() => undefined, 60_000);
  });
}
