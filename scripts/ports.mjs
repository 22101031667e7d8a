import { createServer } from 'node:net';
import { ownPort } from './paths.mjs';
import { PlainError } from './plain-error.mjs';

/**
 * @param {number} port
 * @returns {Promise<string | undefined>} the system's code where it can't be listened on
 */
function obstacleAt(port) {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', (error) => resolve(error.code ?? 'EUNKNOWN'));
    probe.listen(port, '127.0.0.1', () => probe.close(() => resolve(undefined)));
  });
}

/**
 * @param {string} variable of the environment
 * @param {number} usual where the variable is not set
 */
export function portFrom(variable, usual) {
  const given = process.env[variable];
  const port = given === undefined || given === '' ? usual : Number(given);
  if (Number.isInteger(port) && port > 0 && port < 65536) return port;
  throw new PlainError(`${variable}=${given} is no port. Give a whole number from 1 to 65535, `
    + `or leave ${variable} out for ${usual}.`);
}

/**
 * @param {number} port
 * @param {string} purpose
 * @param {string} variable that chooses another
 */
export async function demandPort(port, purpose, variable) {
  const obstacle = await obstacleAt(port);
  if (!obstacle) return;
  const why = obstacle === 'EACCES' ? 'is for root alone: start as root'
    : 'is in use by another program. Stop that program';
  throw new PlainError(`Port ${port}, for ${purpose}, ${why}, or choose another port: `
    + `${variable}=${port + 1000} npm start`);
}

/**
 * The first of the clone's own ten ports that nobody listens on.
 * @param {number} from offset to begin at
 */
export async function freeOwnPort(from) {
  for (let step = 0; step < 10; step++) {
    const port = ownPort((from + step) % 10);
    if (!await obstacleAt(port)) return port;
  }
  throw new PlainError(`The ports ${ownPort(0)} to ${ownPort(9)}, which this clone's databases `
    + 'use, are all taken. Stop what uses them, or move the clone to another folder.');
}
