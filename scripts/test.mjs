/**
 * npm test: sets up what the tests need, runs every suite, and ends with `N passed, N failed` over
 * all of them by the runners' own reports.
 *
 *   --only NAME    one stage (may be given several times)
 *   --filter TEXT  spec files whose path holds TEXT
 *   --all          the long runs of the faults whole, instead of a seeded sample
 *
 * The suites find the test cluster in TEST_DATABASE_ADMIN_URL (a role that may create databases)
 * and TEST_DATABASE_APP_PASSWORD.
 */
import { rmSync } from 'node:fs';
import { ensureClientBuild } from './client-build.mjs';
import { addressOf, ensureDatabase, startCluster } from './cluster.mjs';
import { ensureChromium, ensurePostgres } from './debian-packages.mjs';
import { checkNode, ensurePackages } from './npm-packages.mjs';
import { dataRoot, ownPort } from './paths.mjs';
import { exitWith } from './plain-error.mjs';

const values = process.argv.slice(2);
const valuesOf = (name) => values.flatMap((value, at) => value === name ? [values[at + 1]] : []);
const only = valuesOf('--only');
const [filter] = valuesOf('--filter');

let stopCluster = async () => undefined;
for (const signal of ['SIGINT', 'SIGTERM']) {
  process.on(signal, () => void stopCluster().then(() => process.exit(1)));
}

try {
  process.exitCode = await test();
} catch (error) {
  await stopCluster();
  exitWith(error);
}

async function test() {
  checkNode();
  const programs = await ensurePostgres();
  await ensureChromium();
  await ensurePackages();
  const { stages } = await import('./test-stages.mjs');
  const chosen = stages.filter(({ name }) => !only.length || only.includes(name));
  if (chosen.some(({ name }) => ['e2e', 'api'].includes(name))) await ensureClientBuild();

  // Nothing in it outlives the run, so it may be fast instead of safe.
  const place = { programs, folder: `${dataRoot}-test`, port: ownPort(1),
    settings: ['fsync=off', 'synchronous_commit=off', 'full_page_writes=off',
      'shared_buffers=256MB'] };
  rmSync(`${place.folder}/cluster`, { recursive: true, force: true });
  const cluster = await startCluster(place);
  stopCluster = () => cluster.stop();
  await ensureDatabase(place, cluster.secrets, 'touchneedle_admin');
  const env = {
    ...process.env,
    NODE_ENV: 'test',
    TZ: 'UTC',
    TEST_DATABASE_ADMIN_URL: addressOf(place, 'touchneedle_owner', cluster.secrets.owner,
      'touchneedle_admin'),
    TEST_DATABASE_APP_PASSWORD: cluster.secrets.app,
    ...(values.includes('--all') ? { TEST_FAULTS: 'all' } : {}),
  };
  const total = { passed: 0, failed: [], skipped: [] };
  for (const stage of chosen) {
    const began = Date.now();
    process.stdout.write(`${stage.name} … `);
    const tally = await stage.run(env, filter);
    console.log(`${tally.passed} passed, ${tally.failed.length} failed, ${
      tally.skipped.length} skipped (${((Date.now() - began) / 1000).toFixed(0)} s)`);
    for (const failure of tally.failed) console.log(`\n✗ ${failure}\n`);
    total.passed += tally.passed;
    total.failed.push(...tally.failed);
    total.skipped.push(...tally.skipped);
  }
  await cluster.stop();
  for (const title of total.skipped) console.log(`skipped: ${title}`);
  console.log(`${total.passed} passed, ${total.failed.length} failed`);
  return total.failed.length || !total.passed ? 1 : 0;
}
