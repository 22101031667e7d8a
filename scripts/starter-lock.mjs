import { chmodSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import { PlainError } from './plain-error.mjs';
import { signalGroup } from './run.mjs';

/**
 * Who started what in a data folder, kept in `starter.json`: it forbids a second starter, and lets
 * the next one end what a killed one left running.
 *
 * @typedef {{ pid: number, born: string }} ProcessMark
 * @typedef {ProcessMark & { note: string, started: (ProcessMark & { name: string,
 *   signal: NodeJS.Signals })[] }} Starter
 */
export class StarterLock {
  /** @type {Starter} */
  #starter;

  /**
   * @param {string} folder made where it is missing
   * @param {string} note what a second starter is told
   */
  static async take(folder, note) {
    try {
      mkdirSync(folder, { recursive: true });
      // The database's user must pass through the folders above its own.
      chmodSync(dirname(folder), 0o755);
      chmodSync(folder, 0o755);
    } catch (error) {
      throw new PlainError(`The data folder ${folder} cannot be made (${error.code}). `
        + 'Nothing was started.');
    }
    const lock = new StarterLock(folder, note);
    while (!lock.#write('wx')) {
      const other = readStarter(folder);
      if (other && isAlive(other)) {
        throw new PlainError(`${other.note} (process ${other.pid}). Stop it with Ctrl-C in its `
          + `own window, or by: kill ${other.pid}`);
      }
      await endLeftovers(folder);
    }
    return lock;
  }

  /**
   * @param {string} folder
   * @param {string} note
   */
  constructor(folder, note) {
    this.folder = folder;
    this.#starter = { ...markOf(process.pid), note, started: [] };
  }

  /**
   * @param {string} name
   * @param {number} pid head of a process group
   * @param {NodeJS.Signals} signal that ends it in good order
   */
  record(name, pid, signal) {
    this.#starter.started.push({ name, ...markOf(pid), signal });
    this.#write('w');
  }

  release() {
    rmSync(fileIn(this.folder), { force: true });
  }

  /** @param {'w' | 'wx'} flag */
  #write(flag) {
    try {
      writeFileSync(fileIn(this.folder), JSON.stringify(this.#starter), { flag, mode: 0o600 });
      return true;
    } catch (error) {
      if (error.code === 'EEXIST') return false;
      throw error;
    }
  }
}

/**
 * Ends what a killed starter left running in the folder, and forgets that starter.
 * @param {string} folder
 * @returns {Promise<boolean>} false where the starter still lives and nothing was done
 */
export async function endLeftovers(folder) {
  const starter = readStarter(folder);
  if (starter && isAlive(starter)) return false;
  for (const each of starter?.started ?? []) {
    if (isAlive(each)) signalGroup(each.pid, each.signal);
  }
  for (let tries = 0; (starter?.started ?? []).some(isAlive); tries++) {
    if (tries === 100) {
      for (const each of starter?.started ?? []) {
        if (isAlive(each)) signalGroup(each.pid, 'SIGKILL');
      }
    }
    await delay(100);
  }
  rmSync(fileIn(folder), { force: true });
  return true;
}

/** @param {string} folder */
const fileIn = (folder) => join(folder, 'starter.json');

/**
 * @param {string} folder
 * @returns {Starter | undefined}
 */
function readStarter(folder) {
  try {
    return JSON.parse(readFileSync(fileIn(folder), 'utf8'));
  } catch {
    return undefined;
  }
}

/**
 * A process id is given out again; with the tick of its birth it names one process alone.
 * @param {number} pid
 * @returns {ProcessMark}
 */
function markOf(pid) {
  return { pid, born: birthTick(pid) ?? '' };
}

/** @param {ProcessMark} mark */
const isAlive = ({ pid, born }) => birthTick(pid) === born;

/**
 * @param {number} pid
 * @returns {string | undefined} field 22 of /proc/<pid>/stat, undefined for a dead process
 */
function birthTick(pid) {
  try {
    const fields = readFileSync(`/proc/${pid}/stat`, 'utf8').replace(/^.*\)/s, '').trim()
      .split(' ');
    return fields[0] === 'Z' ? undefined : fields[19];
  } catch {
    return undefined;
  }
}
