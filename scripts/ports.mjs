import { createServer } from 'node:net';
import { PlainError } from './plain-error.mjs';

/**
 * @param {number} port
 * @returns {Promise<boolean>}
 */
export function isPortFree(port) {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => resolve(false));
    probe.listen(port, '127.0.0.1', () => probe.close(() => resolve(true)));
  });
}

/**
 * @param {number} port
 * @param {string} purpose
 * @param {string} variable that chooses another
 */
export async function demandPort(port, purpose, variable) {
  if (await isPortFree(port)) return;
  throw new PlainError(`Port ${port}, for ${purpose}, is in use by another program. Stop that `
    + `program, or choose another port: ${variable}=${port + 10} npm start`);
}
