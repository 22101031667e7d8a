/**
 * npm test: sets up what the tests need, runs every stage, and ends with the line
 * `N passed, N failed` over all of them, by the runners' own reports.
 *
 *   --only NAME    this stage alone, or all whose name begins with the word (may be repeated)
 *   --filter TEXT  only spec files whose path holds TEXT; together with --only
 *   --all          the long runs of the faults whole, instead of a seeded sample
 *
 * Every run has a throw-away cluster of its own. What the suites are given in their environment:
 *
 *   TEST_DATABASE_ADMIN_URL      the owner's role, which may create databases and extensions
 *   TEST_DATABASE_APP_PASSWORD   of the role touchneedle_app, which owns nothing
 *   TEST_DATABASE_SUPERUSER_URL  for faults only: cuts the connections of others
 *   TEST_POSTGRES_PROGRAMS       folder of postgres, pg_dump and the rest, of the cluster's version
 *   TEST_FAULTS=all              with --all
 */
import { addressOf } from './cluster.mjs';
import { ensureChromium, ensurePostgres } from './debian-packages.mjs';
import { checkNode, ensurePackages } from './npm-packages.mjs';
import { PlainError } from './plain-error.mjs';
import { Stopping } from './stopping.mjs';
import { startTestCluster } from './test-cluster.mjs';
import { stages } from './test-stages.mjs';

const stopping = new Stopping(130);

/** @returns {Promise<number>} exit code */
async function test() {
  const { only, filter, isWhole } = readArguments(process.argv.slice(2));
  const isAsked = ({ name }) => !only.length
    || only.some((word) => name === word || name.startsWith(`${word} `));
  const needsBuild = stages.some((stage) => stage.needsBuild && isAsked(stage));
  const chosen = stages.filter((stage) => isAsked(stage)
    || (stage.name === 'build' && needsBuild));
  checkNode();
  const programs = await ensurePostgres();
  if (chosen.some((stage) => stage.needsBrowser)) await ensureChromium();
  stopping.check();
  await ensurePackages();
  stopping.check();
  const cluster = await startTestCluster(programs, stopping);
  const env = {
    ...process.env,
    NODE_ENV: 'test',
    TZ: 'UTC',
    NO_COLOR: '1',
    TEST_DATABASE_ADMIN_URL: addressOf(cluster, 'owner', 'postgres'),
    TEST_DATABASE_APP_PASSWORD: cluster.secrets.app,
    TEST_DATABASE_SUPERUSER_URL: addressOf(cluster, 'superuser', 'postgres'),
    TEST_POSTGRES_PROGRAMS: programs,
    ...(isWhole ? { TEST_FAULTS: 'all' } : {}),
  };
  return runStages(chosen, env, filter);
}

/**
 * @param {import('./test-stages.mjs').Stage[]} chosen
 * @param {NodeJS.ProcessEnv} env
 * @param {string | undefined} filter
 * @returns {Promise<number>} exit code
 */
async function runStages(chosen, env, filter) {
  const began = Date.now();
  let passed = 0;
  const failed = [];
  const skipped = [];
  for (const stage of chosen) {
    stopping.check();
    const stageBegan = Date.now();
    console.log(`${stage.name} …`);
    const isInVain = stage.needsBuild && failed.some(({ title }) => title === 'build');
    const tally = isInVain ? { passed: 0, skipped: [], failed: [
      { title: stage.name, message: 'Not run: the client it drives could not be built.' }] }
      : await stage.run(env, filter);
    stopping.check();
    for (const { title, message } of tally.failed) console.log(`\n✗ ${title}\n${message}\n`);
    console.log(`${stage.name}: ${tally.passed} passed, ${tally.failed.length} failed, ${
      tally.skipped.length} skipped in ${seconds(stageBegan)} s`);
    passed += tally.passed;
    failed.push(...tally.failed);
    skipped.push(...tally.skipped);
  }
  console.log(`\nAll stages took ${seconds(began)} s.`);
  for (const title of skipped) console.log(`skipped: ${title}`);
  for (const { title } of failed) console.log(`failed: ${title}`);
  console.log(`${passed} passed, ${failed.length} failed${
    skipped.length ? `, ${skipped.length} skipped` : ''}`);
  return failed.length || !passed ? 1 : 0;
}

/** @param {number} since in milliseconds */
const seconds = (since) => ((Date.now() - since) / 1000).toFixed(1);

/** @param {string[]} values */
function readArguments(values) {
  const found = { only: [], filter: undefined, isWhole: false };
  for (let at = 0; at < values.length; at++) {
    const [option, value] = [values[at], values[at + 1]];
    if (option === '--all') found.isWhole = true;
    else if (option === '--only' && value) found.only.push(values[++at]);
    else if (option === '--filter' && value) found.filter = values[++at];
    else throw new PlainError(`npm test does not know ${option}, or it lacks its value.`);
  }
  const stranger = found.only.find((word) => !stages.some(({ name }) =>
    name === word || name.startsWith(`${word} `)));
  if (stranger) {
    throw new PlainError(`There is no stage ${stranger}. The stages: ${
      stages.map(({ name }) => name).join(', ')}.`);
  }
  return found;
}

await stopping.during(async () => {
  const code = await test();
  // Only after this work has ended, which the end waits for.
  setImmediate(() => void stopping.end(code));
}, () => console.log('The tests could not be set up.\n0 passed, 1 failed'));
