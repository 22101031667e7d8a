import { spawn } from 'node:child_process';
import { PlainError } from './plain-error.mjs';

/** Commands under way, each the head of a process group, so that a stop reaches all of it. */
const underWay = new Set();

/** Ends what `run` and `runToEnd` have under way, with all that those started in turn. */
export function stopCommands() {
  for (const child of underWay) signalGroup(child.pid, 'SIGTERM');
}

/**
 * @param {number} pid head of a process group
 * @param {NodeJS.Signals} signal
 * @returns {boolean} whether there was one to receive it
 */
export function signalGroup(pid, signal) {
  try {
    return process.kill(-pid, signal);
  } catch {
    return false;
  }
}

/**
 * Runs a command to its end. Rejects with its last lines where it fails.
 * @param {string} command
 * @param {string[]} values
 * @param {{ cwd?: string, env?: NodeJS.ProcessEnv, uid?: number, gid?: number,
 *   input?: string }} [options]
 * @returns {Promise<string>} what it printed
 */
export async function run(command, values, options = {}) {
  const { code, output } = await runToEnd(command, values, options);
  if (code === 0) return output;
  const tail = output.trim().split('\n').slice(-20).join('\n');
  throw new PlainError(`${[command, ...values].join(' ')}\nended with ${code}:\n${tail}`);
}

/**
 * Runs a command to its end, whatever its exit code (127 where there is no such command).
 * @param {string} command
 * @param {string[]} values
 * @param {Parameters<typeof run>[2]} [options]
 * @returns {Promise<{ code: number, output: string }>}
 */
export function runToEnd(command, values, options = {}) {
  return new Promise((resolve) => {
    const { input, ...rest } = options;
    const child = spawn(command, values, { ...rest, detached: true, stdio: 'pipe' });
    underWay.add(child);
    let output = '';
    for (const stream of [child.stdout, child.stderr]) {
      stream.setEncoding('utf8');
      stream.on('data', (text) => { output += text; });
    }
    child.stdin.on('error', () => undefined);
    child.stdin.end(input ?? '');
    const settle = (code) => {
      underWay.delete(child);
      resolve({ code, output });
    };
    child.on('error', (error) => {
      output += error.message;
      settle(127);
    });
    child.on('close', (code) => settle(code ?? 1));
  });
}
