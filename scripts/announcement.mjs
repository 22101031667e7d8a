import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { root } from './paths.mjs';

/**
 * What the person who started it needs to know, in one calm block.
 * @param {{ ports: { site: number, mail: number }, setupPath: string, isEmpty: boolean,
 *   dataRoot: string, seconds: number }} facts
 */
export function announcement({ ports, setupPath, isEmpty, dataRoot, seconds }) {
  const site = `http://localhost:${ports.site}`;
  const lines = [`Touchneedle is ready (${seconds.toFixed(1)} s).`, '',
    `  The registry      ${site}`,
    `  The mail catcher  http://localhost:${ports.mail}`,
    `  Data and logs     ${dataRoot}`];
  if (setupPath) {
    lines.push('', '  Set up the first registrar, once, at', `  ${site}${setupPath}`);
  } else if (isEmpty) {
    lines.push('', '  A registrar is set up already; this registry holds no demonstration.');
  } else {
    lines.push(...accountLines());
  }
  return ['', ...lines, '', '  Ctrl-C stops all of it and keeps the data.', ''].join('\n');
}

/** @returns {string[]} the demonstration's accounts, none where it has no list of them */
function accountLines() {
  const file = join(root, 'database/seeds/demo-accounts.json');
  if (!existsSync(file)) return [];
  const rows = JSON.parse(readFileSync(file, 'utf8')).map(({ email, password, role, club }) =>
    [email, password, [role, club].filter(Boolean).join(', ')]);
  const widths = [0, 1].map((column) => Math.max(...rows.map((row) => row[column].length)));
  return ['', '  Demonstration accounts: address, password, role',
    ...rows.map(([email, password, role]) =>
      `  ${email.padEnd(widths[0])}  ${password.padEnd(widths[1])}  ${role}`)];
}
