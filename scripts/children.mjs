import { spawn } from 'node:child_process';
import { closeSync, mkdirSync, openSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './paths.mjs';
import { signalGroup } from './run.mjs';

/**
 * Node processes that live and die together: when one ends by itself, all are to be stopped.
 */
export class Children {
  /** @type {{ child: import('node:child_process').ChildProcess, ended: Promise<void> }[]} */
  #running = [];
  #isStopping = false;

  /**
   * @param {import('./starter-lock.mjs').StarterLock} lock
   * @param {string} logFolder
   * @param {(name: string, words: string) => void} onDeath of one that nobody stopped
   */
  constructor(lock, logFolder, onDeath) {
    this.lock = lock;
    this.logFolder = logFolder;
    this.onDeath = onDeath;
    mkdirSync(logFolder, { recursive: true, mode: 0o700 });
  }

  /**
   * @param {string} name
   * @param {string[]} values of node
   * @param {NodeJS.ProcessEnv} env
   */
  start(name, values, env) {
    const log = join(this.logFolder, `${name.replaceAll(' ', '-')}.log`);
    // A file rather than a pipe: the child's log outlives a starter that is killed.
    const file = openSync(log, 'w', 0o600);
    const child = spawn(process.execPath, values, { cwd: root, env, detached: true,
      stdio: ['ignore', file, file] });
    closeSync(file);
    const ended = new Promise((resolve) => {
      const end = (words) => {
        resolve();
        if (!this.#isStopping) this.onDeath(name, words);
      };
      child.on('exit', (code, signal) => end(`${lastLines(log)}\n(${
        signal ? `ended by ${signal}` : `exit code ${code}`})`.trim()));
      child.on('error', (error) => end(error.message));
    });
    if (child.pid) this.lock.record(name, child.pid, 'SIGTERM');
    this.#running.push({ child, ended });
  }

  async stop() {
    this.#isStopping = true;
    const signalAll = (signal) => {
      for (const { child } of this.#running) if (child.pid) signalGroup(child.pid, signal);
    };
    signalAll('SIGTERM');
    const late = setTimeout(signalAll, 8_000, 'SIGKILL');
    await Promise.all(this.#running.map(({ ended }) => ended));
    clearTimeout(late);
  }
}

/** @param {string} file */
export function lastLines(file) {
  return readFileSync(file, 'utf8').trim().split('\n').slice(-20).join('\n');
}
