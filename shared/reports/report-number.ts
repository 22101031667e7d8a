/**
 * Report numbers such as `TN-26-00042-3`: the year in UTC, a serial of five digits (six once a
 * year's five are used up), and a check character by ISO/IEC 7064 MOD 37,36 over the characters
 * before it without hyphens.
 */
const alphabet = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ';
const prefix = 'TN';
const shortSerialDigits = 5;
const longSerialDigits = 6;

/**
 * Check character of ISO/IEC 7064 MOD 37,36 (hybrid system) for a text of 0-9 and A-Z. Throws
 * RangeError on any other character.
 */
export function checkCharacter(text: string): string {
  let product = 36;
  for (const character of text) {
    const value = alphabet.indexOf(character);
    if (value < 0) throw new RangeError('only 0-9 and A-Z have a check character');
    const sum = (product + value) % 36;
    product = ((sum === 0 ? 36 : sum) * 2) % 37;
  }
  return alphabet.charAt((37 - product) % 36);
}

/** `year` is the full year in UTC, `serial` five or six digits. */
export function formatReportNumber(year: number, serial: string): string {
  if (!/^\d{5,6}$/.test(serial)) throw new RangeError('a serial has five or six digits');
  const shortYear = String(year % 100).padStart(2, '0');
  return `${prefix}-${shortYear}-${serial}-${checkCharacter(prefix + shortYear + serial)}`;
}

/**
 * Why a text is no report number. `not_a_number` means something else was typed, such as words;
 * the others mean a report number was meant and mistyped. What would be right is never told.
 */
export const reportNumberProblems = ['not_a_number', 'wrong_length', 'letter_for_digit',
  'wrong_check_character'] as const;
export type ReportNumberProblem = (typeof reportNumberProblems)[number];
export type ParsedReportNumber = { readonly number: string; readonly problem?: undefined }
  | { readonly number?: undefined; readonly problem: ReportNumberProblem };

/**
 * Reads a number as people type it from paper: lower case, spaces, missing or typographic
 * hyphens. A letter where a digit belongs (O for 0) is reported and never mended silently, since
 * a mended guess may be another report.
 */
export function parseReportNumber(text: string): ParsedReportNumber {
  const bare = text.toUpperCase().replace(/[\s\u2010-\u2015\u2212-]+/gu, '');
  const looksMeant = /^TN[0-9OIL]{4,}[0-9A-Z]?$/.test(bare);
  if (!looksMeant) return { problem: 'not_a_number' };
  const body = bare.slice(0, -1);
  const serial = body.slice(4);
  if (serial.length !== shortSerialDigits && serial.length !== longSerialDigits) {
    return { problem: 'wrong_length' };
  }
  if (!/^TN\d+$/.test(body)) return { problem: 'letter_for_digit' };
  if (checkCharacter(body) !== bare.slice(-1)) return { problem: 'wrong_check_character' };
  return { number: `${prefix}-${body.slice(2, 4)}-${serial}-${bare.slice(-1)}` };
}

/** A keyed function of a round (0 to 9) and a half: any integer ≥ 0; its low bits are used. */
export type RoundFunction = (round: number, half: number) => number;

const rounds = 10;

/**
 * A permutation of 0 … 10^digits − 1: a balanced Feistel network over the next even number of
 * bits, walked along its cycle until it falls inside (common practice of format-preserving
 * encryption). The key lives in `roundFunction`, so that this stays pure.
 */
export function permuteSequence(sequence: number, digits: number,
  roundFunction: RoundFunction): number {
  const size = 10 ** digits;
  if (!Number.isInteger(digits) || digits < 1 || digits > 9) throw new RangeError('digits 1 to 9');
  if (!Number.isInteger(sequence) || sequence < 0 || sequence >= size) {
    throw new RangeError(`a sequence of ${digits} digits`);
  }
  const halfSize = 2 ** Math.ceil(Math.log2(size) / 2);
  let walked = sequence;
  do {
    let left = Math.floor(walked / halfSize);
    let right = walked % halfSize;
    for (let round = 0; round < rounds; round += 1) {
      const mixed = (left + (roundFunction(round, right) % halfSize)) % halfSize;
      left = right;
      right = mixed;
    }
    walked = left * halfSize + right;
  } while (walked >= size);
  return walked;
}

/**
 * The number of the `sequence`-th report of a year (from 1). Neighbours tell nothing of each
 * other. Throws RangeError after some 1.1 million in one year.
 */
export function reportNumberFor(year: number, sequence: number,
  roundFunction: RoundFunction): string {
  const short = 10 ** shortSerialDigits;
  const digits = sequence < short ? shortSerialDigits : longSerialDigits;
  const position = sequence < short ? sequence : sequence - short;
  const serial = permuteSequence(position, digits, roundFunction);
  return formatReportNumber(year, String(serial).padStart(digits, '0'));
}
