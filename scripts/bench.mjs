/**
 * npm run bench: the server under load over 100,000 generated reports, in a throw-away cluster.
 *
 *   npm run bench -- --reports 10000   fewer reports, for a quick look
 *   npm run bench -- --only search     one of search, queue, page
 */
import { spawn } from 'node:child_process';
import { addressOf } from './cluster.mjs';
import { ensurePostgres } from './debian-packages.mjs';
import { checkNode, ensurePackages } from './npm-packages.mjs';
import { root } from './paths.mjs';
import { Stopping } from './stopping.mjs';
import { startTestCluster } from './test-cluster.mjs';

const stopping = new Stopping(130);
await stopping.during(async () => {
  checkNode();
  const programs = await ensurePostgres();
  await ensurePackages();
  const cluster = await startTestCluster(programs, stopping);
  const child = spawn(process.execPath, ['--import', 'tsx', 'scripts/bench/run.ts',
    ...process.argv.slice(2)], { cwd: root, stdio: 'inherit', env: {
    ...process.env,
    TZ: 'UTC',
    TEST_DATABASE_ADMIN_URL: addressOf(cluster, 'owner', 'postgres'),
    TEST_DATABASE_SUPERUSER_URL: addressOf(cluster, 'superuser', 'postgres'),
    TEST_DATABASE_APP_PASSWORD: cluster.secrets.app,
  } });
  stopping.undoWith(() => { child.kill('SIGTERM'); });
  const code = await new Promise((resolve) => child.on('exit', (status) => resolve(status ?? 1)));
  // Only after this work has ended, which the end waits for.
  setImmediate(() => void stopping.end(code));
});
