import { spawn } from 'node:child_process';
import { root } from './paths.mjs';

/**
 * Processes that live and die together: when one ends by itself, all are stopped.
 */
export class Children {
  /** @type {{ name: string, child: import('node:child_process').ChildProcess,
   *   ended: Promise<void>, log: string }[]} */
  #running = [];
  #isStopping = false;

  /** @param {(name: string, log: string) => void} onDeath of one that nobody stopped */
  constructor(onDeath) {
    this.onDeath = onDeath;
  }

  /**
   * @param {string} name
   * @param {string[]} values of node
   * @param {NodeJS.ProcessEnv} env
   */
  start(name, values, env) {
    const child = spawn(process.execPath, values, { cwd: root, env, detached: true,
      stdio: ['ignore', 'pipe', 'pipe'] });
    const entry = { name, child, ended: Promise.resolve(), log: '' };
    for (const stream of [child.stdout, child.stderr]) {
      stream.setEncoding('utf8');
      stream.on('data', (text) => { entry.log = (entry.log + text).slice(-6000); });
    }
    entry.ended = new Promise((resolve) => child.on('exit', () => {
      resolve();
      if (!this.#isStopping) this.onDeath(name, entry.log);
    }));
    this.#running.push(entry);
  }

  async stop() {
    this.#isStopping = true;
    for (const { child } of this.#running) child.kill('SIGTERM');
    const late = setTimeout(() => {
      for (const { child } of this.#running) child.kill('SIGKILL');
    }, 8_000);
    await Promise.all(this.#running.map(({ ended }) => ended));
    clearTimeout(late);
  }
}
