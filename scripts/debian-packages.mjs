import { existsSync, readdirSync } from 'node:fs';
import { PlainError } from './plain-error.mjs';
import { run } from './run.mjs';

/** Folder of PostgreSQL's programs, or undefined where it is not installed. */
export function findPostgres() {
  const base = '/usr/lib/postgresql';
  if (!existsSync(base)) return undefined;
  const [version] = readdirSync(base).filter((name) => existsSync(`${base}/${name}/bin/initdb`))
    .sort((one, other) => Number(other) - Number(one));
  return version ? `${base}/${version}/bin` : undefined;
}

/** Installs Debian's PostgreSQL where it is missing, and says so. */
export async function ensurePostgres() {
  const found = findPostgres();
  if (found) return found;
  await install(['postgresql', 'postgresql-contrib'], 'PostgreSQL');
  const installed = findPostgres();
  if (!installed) throw new PlainError('PostgreSQL was installed, but its programs are not there.');
  return installed;
}

/** Installs Debian's Chromium where it is missing; the browser tests drive it. */
export async function ensureChromium() {
  if (existsSync('/usr/bin/chromium')) return;
  await install(['chromium'], 'Chromium');
}

/**
 * @param {string[]} packages
 * @param {string} name
 */
async function install(packages, name) {
  const line = `apt-get install -y --no-install-recommends ${packages.join(' ')}`;
  if (process.getuid?.() !== 0 || !existsSync('/usr/bin/apt-get')) {
    throw new PlainError(`${name} is missing, and only root may install it. Ask an administrator `
      + `for:\n\n  sudo apt-get update && sudo ${line}\n\nThen start again. Nothing was changed.`);
  }
  console.log(`${name} is missing: installing Debian's package (${packages.join(', ')}) …`);
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  try {
    await run('apt-get', ['update'], { env });
    await run('apt-get', line.split(' ').slice(1), { env });
  } catch (error) {
    throw new PlainError(`${name} could not be installed. Is there a network?\n\n${error.message}`);
  }
}
