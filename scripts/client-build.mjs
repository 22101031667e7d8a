import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './paths.mjs';
import { run } from './run.mjs';

const inputs = ['client', 'shared', 'fonts', 'angular.json', 'package-lock.json', 'tsconfig.json'];
const stamp = join(root, 'dist', 'client.inputs');

/** Builds the client, unless its inputs are those of the build that is there. */
export async function ensureClientBuild() {
  const hash = hashOfInputs();
  const isBuilt = existsSync(stamp) && readFileSync(stamp, 'utf8') === hash
    && existsSync(join(root, 'dist/client/index.html'));
  if (isBuilt) return;
  console.log('Building the client …');
  rmSync(stamp, { force: true });
  await run(process.execPath, [join(root, 'node_modules/@angular/cli/bin/ng.js'), 'build'],
    { cwd: root, env: { ...process.env, NG_CLI_ANALYTICS: 'false', CI: '1' } });
  writeFileSync(stamp, hash);
}

function hashOfInputs() {
  const hash = createHash('sha256');
  const visit = (path) => {
    if (statSync(path).isDirectory()) {
      for (const name of readdirSync(path).sort()) visit(join(path, name));
    } else if (!/\.spec\.ts$/.test(path)) {
      hash.update(path.slice(root.length)).update(readFileSync(path));
    }
  };
  for (const input of inputs) visit(join(root, input));
  return hash.digest('hex');
}
