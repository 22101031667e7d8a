import type { Page } from '#shared/paging';
import type { MyReport, MyReportContent, ReportView } from '#shared/reports/report-view';
import { parseReportNumber } from '#shared/reports/report-number';
import type { Transaction } from '../db/database';
import { InvalidInput, NotFound, ProblemError } from '../errors';
import { z } from '../http/openapi-zod';
import { findMyContent, listMyReports } from './my-reports-queries';
import { findReportView } from './report-view-queries';

const cursor = z.tuple([z.iso.datetime(), z.uuid()]);

export type ReportsService = ReturnType<typeof createReportsService>;

export function createReportsService() {
  return {
    /** The published report, or one of its earlier published versions. */
    async view(trx: Transaction, typed: string, version?: number): Promise<ReportView> {
      const view = await findReportView(trx, getNumber(typed), version ?? 'published');
      if (!view) throw new NotFound();
      return view;
    },

    /** The newest version, for those who review it. */
    async viewNewest(trx: Transaction, typed: string): Promise<ReportView> {
      const view = await findReportView(trx, getNumber(typed), 'newest');
      if (!view) throw new NotFound();
      return view;
    },

    /** The newest version, for its author. */
    async viewMine(trx: Transaction, typed: string): Promise<ReportView> {
      const view = await findReportView(trx, getNumber(typed), 'newest');
      if (!view?.mine) throw new NotFound();
      return view;
    },

    async contentOfMine(
      trx: Transaction, authorId: string, typed: string,
    ): Promise<MyReportContent> {
      const content = await findMyContent(trx, authorId, getNumber(typed));
      if (!content) throw new NotFound();
      return content;
    },

    async listMine(
      trx: Transaction, authorId: string, limit: number, after: string | undefined,
    ): Promise<Page<MyReport>> {
      const { items, next } = await listMyReports(trx, authorId, limit, readAfter(after));
      return { items, next: next && Buffer.from(JSON.stringify([next.filedAt, next.id]))
        .toString('base64url') };
    },
  };
}

/** Throws 404 `report_number_mistyped` where the check character does not fit. */
function getNumber(typed: string): string {
  const { number, problem } = parseReportNumber(typed);
  if (number !== undefined) return number;
  throw problem === 'not_a_number' ? new NotFound()
    : new ProblemError(404, 'report_number_mistyped');
}

function readAfter(text: string | undefined): { filedAt: string; id: string } | undefined {
  if (text === undefined) return undefined;
  try {
    const [filedAt, id] = cursor.parse(JSON.parse(Buffer.from(text, 'base64url').toString()));
    return { filedAt, id };
  } catch {
    throw new InvalidInput([{ field: 'after', code: 'invalid' }]);
  }
}
