import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './paths.mjs';
import { runToEnd } from './run.mjs';

const reports = join(root, '.cache/test-reports');

/**
 * What a stage counted, by the runner's own report.
 * @typedef {{ passed: number, failed: string[], skipped: string[] }} Tally
 * @typedef {{ name: string, run: (env: NodeJS.ProcessEnv, filter?: string) => Promise<Tally> }}
 *   Stage
 */

const bin = (name) => join(root, 'node_modules/.bin', name);

/** A check without a report of its own counts as one test. */
const check = (name, command, values) => ({
  name,
  async run(env) {
    const { code, output } = await runToEnd(command, values, { cwd: root, env });
    return code === 0 ? { passed: 1, failed: [], skipped: [] }
      : { passed: 0, failed: [`${name}\n${output}`], skipped: [] };
  },
});

const vitest = (name) => ({
  name,
  async run(env, filter) {
    const file = freshReport(name);
    const { code, output } = await runToEnd(bin('vitest'), ['run', '--config',
      'tests/vitest.config.ts', '--project', name, '--reporter=default', '--reporter=json',
      `--outputFile.json=${file}`, ...(filter ? [filter] : [])], { cwd: root, env });
    return readVitestReport(name, file, code, output);
  },
});

/** @type {Stage[]} */
export const stages = [
  check('lint', bin('eslint'), ['.', '--max-warnings', '0']),
  check('types of the server', bin('tsc'), ['-p', 'server/tsconfig.json', '--noEmit']),
  check('types of the tests', bin('tsc'), ['-p', 'tests/tsconfig.json', '--noEmit']),
  check('types of the client', bin('ngc'), ['-p', 'client/tsconfig.app.json', '--noEmit']),
  {
    name: 'client',
    async run(env) {
      const file = freshReport('client');
      const { code, output } = await runToEnd(process.execPath,
        [join(root, 'node_modules/@angular/cli/bin/ng.js'), 'test', '--no-watch',
          '--reporters=default', '--reporters=json', `--output-file=${file}`],
        { cwd: root, env: { ...env, CI: '1', NG_CLI_ANALYTICS: 'false' } });
      return readVitestReport('client', file, code, output);
    },
  },
  vitest('unit'), vitest('standards'), vitest('migrations'), vitest('api'), vitest('jobs'),
  vitest('faults'),
  {
    name: 'e2e',
    async run(env, filter) {
      const file = freshReport('e2e');
      const { code, output } = await runToEnd(bin('playwright'), ['test', '--config',
        'tests/playwright.config.ts', '--reporter=json', ...(filter ? [filter] : [])],
      { cwd: root, env: { ...env, PLAYWRIGHT_JSON_OUTPUT_NAME: file } });
      return readPlaywrightReport(file, code, output);
    },
  },
];

function freshReport(name) {
  mkdirSync(reports, { recursive: true });
  const file = join(reports, `${name}.json`);
  rmSync(file, { force: true });
  return file;
}

/** @returns {Tally} */
function readVitestReport(name, file, code, output) {
  if (!existsSync(file)) return unreported(name, output);
  const tally = { passed: 0, failed: [], skipped: [] };
  for (const suite of JSON.parse(readFileSync(file, 'utf8')).testResults) {
    const where = suite.name.replace(`${root}/`, '');
    if (suite.status === 'failed' && !suite.assertionResults.some((each) =>
      each.status === 'failed')) {
      tally.failed.push(`${where}\n${suite.message}`);
    }
    for (const each of suite.assertionResults) {
      const title = `${where} › ${each.fullName}`;
      if (each.status === 'passed') tally.passed++;
      else if (each.status === 'failed') {
        tally.failed.push(`${title}\n${each.failureMessages.join('\n')}`);
      } else tally.skipped.push(title);
    }
  }
  // An error outside every test, such as an unhandled rejection, fails the run as well.
  if (code !== 0 && !tally.failed.length) tally.failed.push(`${name}\n${output.slice(-4000)}`);
  return demandTests(name, tally);
}

/** @returns {Tally} */
function readPlaywrightReport(file, code, output) {
  if (!existsSync(file)) return unreported('e2e', output);
  const tally = { passed: 0, failed: [], skipped: [] };
  const report = JSON.parse(readFileSync(file, 'utf8'));
  const visit = (suite) => {
    for (const spec of suite.specs ?? []) {
      for (const test of spec.tests) {
        const title = `${spec.file} › ${spec.title}`;
        if (test.status === 'skipped') tally.skipped.push(title);
        else if (test.status === 'expected') tally.passed++;
        else {
          tally.failed.push(`${title}\n${test.results.flatMap((result) => result.errors ?? [])
            .map((error) => error.message ?? '').join('\n')}`);
        }
      }
    }
    (suite.suites ?? []).forEach(visit);
  };
  report.suites.forEach(visit);
  for (const error of report.errors ?? []) tally.failed.push(`e2e\n${error.message}`);
  if (code !== 0 && !tally.failed.length) tally.failed.push(`e2e\n${output.slice(-4000)}`);
  return demandTests('e2e', tally);
}

function unreported(name, output) {
  return { passed: 0, failed: [`${name} wrote no report\n${output.slice(-6000)}`], skipped: [] };
}

function demandTests(name, tally) {
  if (!tally.passed && !tally.failed.length) tally.failed.push(`${name} ran no test`);
  return tally;
}
