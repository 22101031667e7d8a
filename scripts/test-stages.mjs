import { join } from 'node:path';
import { ensureClientBuild } from './client-build.mjs';
import { root } from './paths.mjs';
import { runToEnd } from './run.mjs';
import { freshReport, readPlaywrightReport, readVitestReport } from './test-reports.mjs';

/**
 * @typedef {import('./test-reports.mjs').Tally} Tally
 * @typedef {{ name: string, needsBuild?: boolean, needsBrowser?: boolean,
 *   run: (env: NodeJS.ProcessEnv, filter?: string) => Promise<Tally> }} Stage
 */

const bin = (name) => join(root, 'node_modules/.bin', name);

/**
 * A check without a report of its own counts as one test.
 * @returns {Stage}
 */
const check = (name, command, values) => ({
  name,
  async run(env) {
    const { code, output } = await runToEnd(bin(command), values, { cwd: root, env });
    return { passed: code === 0 ? 1 : 0, skipped: [],
      failed: code === 0 ? [] : [{ title: name, message: output.trim() }] };
  },
});

/**
 * @param {string} name of the project in tests/vitest.config.ts
 * @returns {Stage}
 */
const vitest = (name) => ({
  name,
  async run(env, filter) {
    const file = freshReport(name);
    const ended = await runToEnd(bin('vitest'), ['run', '--config', 'tests/vitest.config.ts',
      '--project', name, '--reporter=default', '--reporter=json', `--outputFile.json=${file}`,
      ...(filter ? [filter] : [])], { cwd: root, env });
    return readVitestReport(name, file, ended);
  },
});

/** @type {Stage} */
const client = {
  name: 'client',
  async run(env, filter) {
    const file = freshReport('client');
    const ended = await runToEnd(bin('ng'), ['test', '--no-watch', '--reporters=default',
      '--reporters=json', `--output-file=${file}`,
      ...(filter ? [`--include=client/src/**/*${filter}*/**/*.spec.ts`,
        `--include=client/src/**/*${filter}*.spec.ts`] : [])],
    { cwd: root, env: { ...env, CI: '1', NG_CLI_ANALYTICS: 'false' } });
    return readVitestReport('client', file, ended);
  },
};

/** @type {Stage} */
const build = {
  name: 'build',
  async run() {
    try {
      await ensureClientBuild();
      return { passed: 1, failed: [], skipped: [] };
    } catch (error) {
      return { passed: 0, failed: [{ title: 'build', message: error.message }], skipped: [] };
    }
  },
};

/** @type {Stage} */
const browser = {
  name: 'e2e',
  needsBuild: true,
  needsBrowser: true,
  async run(env, filter) {
    const file = freshReport('e2e');
    const ended = await runToEnd(bin('playwright'), ['test', '--config',
      'tests/playwright.config.ts', '--reporter=json', ...(filter ? [filter] : [])],
    { cwd: root, env: { ...env, PLAYWRIGHT_JSON_OUTPUT_FILE: file } });
    return readPlaywrightReport('e2e', file, ended);
  },
};

/** In the order in which they run: what fails soonest and costs least goes first. */
export const stages = [
  check('lint', 'eslint', ['.', '--max-warnings', '0']),
  check('types server', 'tsc', ['-p', 'server/tsconfig.json', '--noEmit']),
  check('types tests', 'tsc', ['-p', 'tests/tsconfig.json', '--noEmit']),
  // The specs' configuration takes in the application's files as well.
  check('types client', 'ngc', ['-p', 'client/tsconfig.spec.json', '--noEmit']),
  build,
  client,
  vitest('unit'),
  vitest('standards'),
  vitest('migrations'),
  vitest('api'),
  vitest('jobs'),
  vitest('faults'),
  browser,
];
