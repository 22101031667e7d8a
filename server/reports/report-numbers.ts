import { createHmac } from 'node:crypto';
import { formatReportNumber } from '#shared/reports/report-number';
import type { Transaction } from '../db/database';

const rounds = 8;
/** Numbers of a year that have five digits; those after them have six. */
const fiveDigits = 100_000;
const sixDigits = 900_000;

/** Gives the next report number of the year (UTC). Others of the same year wait until commit. */
export async function takeReportNumber(
  trx: Transaction, year: number, key: string,
): Promise<string> {
  const { rows: [row] } = await trx.raw(
    `insert into report_sequence as s (year, last) values (?, 1)
     on conflict (year) do update set last = s.last + 1 returning last`, [year]);
  return formatReportNumber(year, permute(row.last - 1, year, key));
}

/**
 * A keyed permutation of the year's sequence, so that the numbers of two reports tell nothing of
 * what was filed between them: a Feistel network with HMAC-SHA-256 as its round function, walked
 * until it lands in the domain. Sequence 0..99,999 gives 0..99,999; the next 900,000 give
 * 100,000..999,999.
 */
export function permute(sequence: number, year: number, key: string): number {
  if (!Number.isInteger(sequence) || sequence < 0 || sequence >= fiveDigits + sixDigits) {
    throw new RangeError('the numbers of this year are used up');
  }
  if (sequence < fiveDigits) return walk(sequence, fiveDigits, 9, `${year}|5`, key);
  return fiveDigits + walk(sequence - fiveDigits, sixDigits, 10, `${year}|6`, key);
}

/** `halfBits`: half of an even number of bits that covers the domain. */
function walk(
  start: number, domain: number, halfBits: number, context: string, key: string,
): number {
  let value = start;
  do {
    value = feistel(value, halfBits, context, key);
  } while (value >= domain);
  return value;
}

function feistel(value: number, halfBits: number, context: string, key: string): number {
  const mask = (1 << halfBits) - 1;
  let left = value >> halfBits;
  let right = value & mask;
  for (let round = 0; round < rounds; round += 1) {
    const mixed = createHmac('sha256', key).update(`report-number|${context}|${round}|${right}`)
      .digest().readUInt32BE(0) & mask;
    [left, right] = [right, left ^ mixed];
  }
  return (left << halfBits) | right;
}
