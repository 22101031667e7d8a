/**
 * ISO/IEC 7064, hybrid system MOD 37,36. The standard itself was not open; the vectors are those
 * printed with two identifier schemes that use the system, all from memory: the example of the
 * Global Release Identifier (A1-2425G-ABC1234002-M), and the two check characters of the
 * audiovisual number of ISO 15706 (0000-0000-D07A-0090-Q-0000-0000-X).
 */
import { expect, it } from 'vitest';
import { checkCharacter } from '#shared/reports/report-number';

it.each([['A12425GABC1234002', 'M'], ['00000000D07A0090', 'Q'], ['00000000D07A009000000000', 'X']])(
  'clause on the hybrid systems: %s has the check character %s', (text, character) => {
    expect(checkCharacter(text)).toBe(character);
  });

it('ends on 1 modulo 36 over text and check character, as a valid string is defined', () => {
  const alphabet = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ';
  for (const text of ['TN2600042', 'Z', '0', 'ABCXYZ019']) {
    const product = [...text].reduce((carried, character) =>
      ((((carried + alphabet.indexOf(character)) % 36) || 36) * 2) % 37, 36);
    expect((product + alphabet.indexOf(checkCharacter(text))) % 36).toBe(1);
  }
});
