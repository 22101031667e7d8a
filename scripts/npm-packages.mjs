import { createHash } from 'node:crypto';
import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './paths.mjs';
import { PlainError } from './plain-error.mjs';
import { runToEnd } from './run.mjs';

const stamp = join(root, 'node_modules', '.touchneedle-lock');

/** Installs the packages of the lock file, unless they are those that are there. */
export async function ensurePackages() {
  const text = readFileSync(join(root, 'package-lock.json'), 'utf8');
  const hash = createHash('sha256').update(text).digest('hex');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === hash) return;
  if (!isInstalled(JSON.parse(text))) {
    console.log('Installing the npm packages (a minute or two) …');
    rmSync(stamp, { force: true });
    // The developers' packages too, whatever NODE_ENV says: the client is built with them.
    const { code, output } = await runToEnd('npm', ['ci', '--include=dev', '--no-audit',
      '--no-fund'], { cwd: root });
    if (code !== 0) throw new PlainError(sentenceFor(output));
  }
  writeFileSync(stamp, hash);
}

/**
 * Whether npm's own note of what it put into node_modules, written when it has finished, names the
 * packages of the lock file. Spares an installation to whoever has just run `npm install`.
 * @param {{ packages: Record<string, { version?: string, optional?: boolean }> }} lock
 */
function isInstalled(lock) {
  const note = join(root, 'node_modules', '.package-lock.json');
  if (!existsSync(note)) return false;
  const { packages: there } = JSON.parse(readFileSync(note, 'utf8'));
  // The lock file also names the project itself, by the empty path.
  return Object.keys(there).every((path) => path in lock.packages)
    && Object.entries(lock.packages).every(([path, { version, optional }]) =>
      path in there ? there[path].version === version : optional === true || path === '');
}

/** @param {string} output of npm */
function sentenceFor(output) {
  const tail = output.trim().split('\n').slice(-12).join('\n');
  const isOffline = /ENOTFOUND|EAI_AGAIN|ECONNREFUSED|ECONNRESET|ETIMEDOUT|ENETUNREACH/
    .test(output);
  if (isOffline) {
    return `The npm packages could not be fetched: the package registry did not answer. Check the `
      + `network, then start again; what is missing is fetched then.\n\n${tail}`;
  }
  if (/EACCES|EPERM|EROFS/.test(output)) {
    return `The npm packages could not be written to ${root}: no right to. Start as the user who `
      + `owns that folder.\n\n${tail}`;
  }
  return `The npm packages could not be installed.\n\n${tail}`;
}

/** The versions that the application was built and tested with. */
export function checkNode() {
  const [major, minor] = process.versions.node.split('.').map(Number);
  if (major !== 20 || minor < 19) {
    throw new PlainError(`Touchneedle runs on Node 20 (20.19 or newer); this is ${
      process.version}.`);
  }
}
