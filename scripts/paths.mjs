import { createHash } from 'node:crypto';
import { homedir } from 'node:os';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The clone that these scripts stand in. */
export const root = dirname(dirname(fileURLToPath(import.meta.url)));

const hash = createHash('sha256').update(root).digest('hex');

/** Root's servers run as postgres, who can't enter every clone: hence a folder of the system's. */
export const dataRoot = process.getuid?.() === 0
  ? join('/var/lib/touchneedle', hash.slice(0, 12))
  : join(homedir(), '.local/share/touchneedle', hash.slice(0, 12));

/** Test clusters, one a run, apart from the registry's own data. */
export const testDataRoot = `${dataRoot}-test`;

/**
 * A port of this clone's own, so that two clones never share a cluster. Below the range (32768 and
 * up) that the system hands to outgoing connections.
 * @param {number} offset 0 to 9, apart from the clone's other ports
 */
export function ownPort(offset) {
  return 20000 + (parseInt(hash.slice(0, 8), 16) % 1200) * 10 + offset;
}
