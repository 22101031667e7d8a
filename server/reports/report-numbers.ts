import { createHmac } from 'node:crypto';
import { reportNumberFor } from '#shared/reports/report-number';
import type { Transaction } from '../db/database';

/** Gives the next report number of the year (UTC). Others of the same year wait until commit. */
export async function takeReportNumber(
  trx: Transaction, year: number, key: string,
): Promise<string> {
  const { rows: [row] } = await trx.raw(
    `insert into report_sequence as s (year, last) values (?, 1)
     on conflict (year) do update set last = s.last + 1 returning last`, [year]);
  return reportNumberFor(year, row.last, (round, half) =>
    createHmac('sha256', key).update(`report-number|${year}|${round}|${half}`).digest()
      .readUInt32BE(0));
}
