import { createHash } from 'node:crypto';
import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './paths.mjs';
import { PlainError } from './plain-error.mjs';
import { run } from './run.mjs';

const stamp = join(root, 'node_modules', '.touchneedle-lock');

/** Installs the packages of the lock file, unless they are those that are there. */
export async function ensurePackages() {
  const lock = createHash('sha256').update(readFileSync(join(root, 'package-lock.json')))
    .digest('hex');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === lock) return;
  console.log('Installing the npm packages …');
  rmSync(stamp, { force: true });
  try {
    await run('npm', ['ci', '--no-audit', '--no-fund'], { cwd: root });
  } catch (error) {
    throw new PlainError(`The npm packages could not be installed. Is there a network?\n\n${
      error.message}`);
  }
  writeFileSync(stamp, lock);
}

/** The versions that the application was built and tested with. */
export function checkNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major !== 20 || minor < 19) {
    throw new PlainError(`Touchneedle runs on Node 20 (20.19 or newer); this is ${
      process.version}.`);
  }
}
