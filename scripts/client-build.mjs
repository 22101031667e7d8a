import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, renameSync, rmSync, statSync,
  writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './paths.mjs';
import { PlainError } from './plain-error.mjs';
import { runToEnd } from './run.mjs';

const inputs = ['client', 'shared', 'fonts', 'angular.json', 'package-lock.json', 'tsconfig.json'];
const built = join(root, 'dist/client');
const stamp = join(root, 'dist/client.inputs');

/** Builds the client, unless its inputs are those of the build that is there. */
export async function ensureClientBuild() {
  const hash = hashOfInputs();
  const isFresh = existsSync(stamp) && readFileSync(stamp, 'utf8') === hash
    && existsSync(join(built, 'index.html'));
  if (isFresh) return;
  console.log('Building the client …');
  // Beside the one that is there, which a failed build must not take away.
  const name = `dist/client.${process.pid}`;
  const unfinished = join(root, name);
  try {
    const { code, output } = await runToEnd(process.execPath,
      [join(root, 'node_modules/@angular/cli/bin/ng.js'), 'build', '--output-path', name],
      { cwd: root, env: { ...process.env, NG_CLI_ANALYTICS: 'false', CI: '1' } });
    if (code !== 0) throw new PlainError(`The client could not be built.\n\n${output.trim()}`);
    rmSync(stamp, { force: true });
    rmSync(built, { recursive: true, force: true });
    renameSync(join(unfinished, 'browser'), built);
    writeFileSync(stamp, hash);
  } finally {
    rmSync(unfinished, { recursive: true, force: true });
  }
}

function hashOfInputs() {
  const hash = createHash('sha256');
  const visit = (path) => {
    if (statSync(path).isDirectory()) {
      for (const name of readdirSync(path).sort()) visit(join(path, name));
    } else if (!path.endsWith('.spec.ts')) {
      hash.update(path.slice(root.length)).update(readFileSync(path));
    }
  };
  for (const input of inputs) visit(join(root, input));
  return hash.digest('hex');
}
