import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './paths.mjs';

/**
 * What a stage counted, by the runner's own report.
 * @typedef {{ title: string, message: string }} Failure
 * @typedef {{ passed: number, failed: Failure[], skipped: string[] }} Tally
 * @typedef {{ code: number, output: string }} Ended
 */

const folder = join(root, '.cache/test-reports');

/**
 * A path for a report; an earlier run's is gone from it, so that it can't be read for this one's.
 * @param {string} name
 */
export function freshReport(name) {
  mkdirSync(folder, { recursive: true });
  const file = join(folder, `${name}-${process.pid}.json`);
  rmSync(file, { force: true });
  return file;
}

/**
 * @param {string} name of the stage
 * @param {string} file of Vitest's JSON reporter
 * @param {Ended} ended
 * @returns {Tally}
 */
export function readVitestReport(name, file, ended) {
  const report = readReport(file);
  if (!report) return unreported(name, ended);
  /** @type {Tally} */
  const tally = { passed: 0, failed: [], skipped: [] };
  for (const suite of report.testResults) {
    const where = suite.name.replace(`${root}/`, '');
    const isBroken = suite.status === 'failed'
      && !suite.assertionResults.some((each) => each.status === 'failed');
    if (isBroken) tally.failed.push({ title: where, message: shortened(suite.message) });
    for (const each of suite.assertionResults) {
      const title = `${where} › ${each.fullName}`;
      if (each.status === 'passed') tally.passed++;
      else if (each.status === 'failed') {
        tally.failed.push({ title, message: shortened(each.failureMessages.join('\n')) });
      } else tally.skipped.push(title);
    }
  }
  return demandTests(name, tally, ended);
}

/**
 * @param {string} name of the stage
 * @param {string} file of Playwright's JSON reporter
 * @param {Ended} ended
 * @returns {Tally}
 */
export function readPlaywrightReport(name, file, ended) {
  const report = readReport(file);
  if (!report) return unreported(name, ended);
  /** @type {Tally} */
  const tally = { passed: 0, failed: [], skipped: [] };
  for (const error of report.errors ?? []) {
    tally.failed.push({ title: name, message: shortened(error.message ?? '') });
  }
  const visit = (suite, path) => {
    for (const spec of suite.specs ?? []) {
      for (const test of spec.tests) {
        const title = [...path, spec.title, ...(report.config.projects.length > 1
          ? [`(${test.projectName})`] : [])].join(' › ');
        if (test.status === 'skipped') tally.skipped.push(title);
        else if (test.status === 'expected') tally.passed++;
        // One that passed at a second try is a failure too: nobody would look at it otherwise.
        else tally.failed.push({ title, message: shortened(messagesOf(test)) });
      }
    }
    for (const inner of suite.suites ?? []) visit(inner, [...path, inner.title]);
  };
  for (const suite of report.suites) visit(suite, [suite.title]);
  return demandTests(name, tally, ended);
}

const messagesOf = (test) => test.results.flatMap((result) => result.errors ?? [])
  .map((error) => error.message ?? '').join('\n');

/** @param {string} file */
function readReport(file) {
  if (!existsSync(file)) return undefined;
  const report = JSON.parse(readFileSync(file, 'utf8'));
  rmSync(file);
  return report;
}

/**
 * @param {string} name
 * @param {Ended} ended
 * @returns {Tally}
 */
function unreported(name, { code, output }) {
  return { passed: 0, skipped: [], failed: [{ title: `${name} wrote no report (code ${code})`,
    message: output.slice(-6_000) }] };
}

/**
 * @param {string} name
 * @param {Tally} tally
 * @param {Ended} ended
 */
function demandTests(name, tally, { code, output }) {
  if (!tally.passed && !tally.failed.length) {
    tally.failed.push({ title: `${name} ran no test`, message: output.slice(-2_000) });
  } else if (code !== 0 && !tally.failed.length) {
    // An error outside every test, such as an unhandled rejection, fails the run as well.
    tally.failed.push({ title: `${name} ended with code ${code}`, message: output.slice(-6_000) });
  }
  return tally;
}

const shortened = (text) => text.length > 4_000 ? `${text.slice(0, 4_000)}\n…` : text;
