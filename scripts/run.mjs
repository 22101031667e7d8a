import { spawn } from 'node:child_process';
import { PlainError } from './plain-error.mjs';

/**
 * Runs a command to its end. Rejects with its last lines where it fails.
 * @param {string} command
 * @param {string[]} values
 * @param {{ cwd?: string, env?: NodeJS.ProcessEnv, uid?: number, gid?: number,
 *   echo?: boolean, input?: string }} [options]
 * @returns {Promise<string>} what it printed
 */
export async function run(command, values, options = {}) {
  const { code, output } = await runToEnd(command, values, options);
  if (code === 0) return output;
  const tail = output.trim().split('\n').slice(-20).join('\n');
  throw new PlainError(`${[command, ...values].join(' ')}\nended with ${code}:\n${tail}`);
}

/**
 * Runs a command to its end, whatever its exit code.
 * @param {string} command
 * @param {string[]} values
 * @param {Parameters<typeof run>[2]} [options]
 * @returns {Promise<{ code: number, output: string }>}
 */
export function runToEnd(command, values, options = {}) {
  return new Promise((resolve) => {
    const { echo = false, input, ...rest } = options;
    const child = spawn(command, values, { stdio: ['pipe', 'pipe', 'pipe'], ...rest });
    let output = '';
    for (const stream of [child.stdout, child.stderr]) {
      stream.setEncoding('utf8');
      stream.on('data', (text) => {
        output += text;
        if (echo) process.stdout.write(text);
      });
    }
    child.stdin.on('error', () => undefined);
    child.stdin.end(input ?? '');
    child.on('error', (error) => resolve({ code: 127, output: `${output}${error.message}` }));
    child.on('close', (code) => resolve({ code: code ?? 1, output }));
  });
}
