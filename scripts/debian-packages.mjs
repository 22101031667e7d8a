import { existsSync, mkdirSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { PlainError } from './plain-error.mjs';
import { run } from './run.mjs';

const oldest = 15;

/**
 * Folder of PostgreSQL's programs, or undefined where they or the extensions are not installed.
 * @param {string} [version] exactly this major version; otherwise the newest, from 15 up
 */
function findPostgres(version) {
  const base = '/usr/lib/postgresql';
  if (!existsSync(base)) return undefined;
  const [found] = readdirSync(base)
    .filter((name) => Number(name) >= oldest && (!version || name === version)
      && existsSync(`${base}/${name}/bin/initdb`) && existsSync(`${base}/${name}/bin/psql`)
      && existsSync(`/usr/share/postgresql/${name}/extension/pg_trgm.control`))
    .sort((one, other) => Number(other) - Number(one));
  return found ? `${base}/${found}/bin` : undefined;
}

/**
 * Installs Debian's PostgreSQL where it is missing, and says so.
 * @param {string} [version] major version that made the data that is there
 */
export async function ensurePostgres(version) {
  const found = findPostgres(version);
  if (found) return found;
  await install(version ? `postgresql-${version}` : 'postgresql', 'PostgreSQL');
  const installed = findPostgres(version);
  if (!installed) {
    throw new PlainError(`PostgreSQL was installed, but no version ${version ?? `${oldest} or newer`
    } with its extensions is in /usr/lib/postgresql.`);
  }
  return installed;
}

/** Installs Debian's Chromium where it is missing; the browser tests drive it. */
export async function ensureChromium() {
  if (existsSync('/usr/bin/chromium')) return;
  await install('chromium', 'Chromium');
}

/**
 * @param {string} debianPackage
 * @param {string} name
 */
async function install(debianPackage, name) {
  const values = ['install', '-y', '--no-install-recommends', debianPackage];
  if (!existsSync('/usr/bin/apt-get')) {
    throw new PlainError(`${name} is missing, and this system has no apt-get to install it with. `
      + 'Touchneedle is made for Debian 12. Nothing was changed.');
  }
  if (process.getuid?.() !== 0) {
    throw new PlainError(`${name} is missing, and only root may install it. Run, or ask an `
      + `administrator to run:\n\n  sudo apt-get update && sudo apt-get ${values.join(' ')}\n\n`
      + 'Then start again. Nothing was changed.');
  }
  console.log(`${name} is missing: installing Debian's package ${debianPackage} …`);
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const aptGet = (...words) => run('apt-get', ['-o', 'DPkg::Lock::Timeout=300', ...words], { env });
  const allowMainCluster = forbidMainCluster();
  try {
    await aptGet('update');
    await aptGet(...values);
  } catch (error) {
    throw new PlainError(`${name} could not be installed: Debian's package servers did not answer `
      + `as they should. Check the network, then start again.\n\n${
        error.message.split('\n').slice(-4).join('\n')}`);
  } finally {
    allowMainCluster();
  }
}

/**
 * Debian's package makes and starts a cluster of its own, which nobody here needs: not while it is
 * installed on our account. Whoever asks for one later gets it as ever.
 * @returns {() => void} takes the prohibition back
 */
function forbidMainCluster() {
  const folder = '/etc/postgresql-common/createcluster.d';
  const file = `${folder}/touchneedle.conf`;
  mkdirSync(folder, { recursive: true });
  writeFileSync(file, 'create_main_cluster = false\n');
  return () => rmSync(file, { force: true });
}
