import { randomUUID } from 'node:crypto';
import type { FiledReport, ReportContent } from '#shared/reports/report-content';
import { recordAudit } from '../audit/audit';
import type { Config } from '../config';
import type { Transaction } from '../db/database';
import { removeDraft } from '../drafts/drafts-queries';
import { Conflict, InvalidInput, NotFound, ProblemError } from '../errors';
import { toAccountHtml } from './account-html';
import { clearMethod, findFilingProblems, type FilingFacts } from './filing-policy';
import * as repository from './filing-repository';
import type { FiledContent } from './report-content-schemas';
import { takeReportNumber } from './report-numbers';

/** The permutation gives no number twice: one is only taken where it came from elsewhere. */
const numberTries = 5;

export type FilingService = ReturnType<typeof createFilingService>;

export function createFilingService(config: Config, clock: () => Date) {
  return {
    /** Files a report; sent again with the same id, answers the one that stands. */
    async file(
      trx: Transaction, authorId: string, id: string, filed: FiledContent,
    ): Promise<FiledReport & { readonly isNew: boolean }> {
      const standing = await repository.findOwnReport(trx, authorId, { id });
      if (standing) return { ...toFiled(standing), isNew: false };
      const { content, facts, clubId } = await check(trx, authorId, filed);
      const number = await addNumbered(trx, authorId, id, clubId, content);
      if (number === undefined) {
        // The same request came twice at once and the other one was first; or, where there is
        // none of the author's, somebody else has a report of this id.
        const first = await repository.findOwnReport(trx, authorId, { id });
        if (!first) throw new Conflict('stale_version');
        return { ...toFiled(first), isNew: false };
      }
      await repository.addReaderClubs(trx, id, clubIdsOf(content, facts));
      await addVersion(trx, authorId, id, 1, content, facts);
      await removeDraft(trx, authorId, id);
      await announce(trx, 'report_filed', { id, authorId, clubId, version: 1 });
      await trx('notice').insert({ id: randomUUID(), person_id: authorId, kind: 'report_filed',
        report_id: id, parameters: JSON.stringify({ number }) });
      return { number, state: 'filed', isNew: true };
    },

    /**
     * Files a returned report again with its changes, as a new version. 409 `stale_version` where
     * it has moved on since `rowVersion`, `already_decided` where it is not back for changes.
     */
    async change(
      trx: Transaction, authorId: string, number: string, rowVersion: number,
      filed: FiledContent,
    ): Promise<FiledReport> {
      const report = await getCurrent(trx, authorId, number, rowVersion);
      if (report.state !== 'returned') throw new Conflict('already_decided');
      const { content, facts, clubId } = await check(trx, authorId, filed);
      if (clubId !== report.club_id) {
        throw new InvalidInput([{ field: 'content.club', code: 'not_the_reports_club' }]);
      }
      const version = report.current_version + 1;
      await addVersion(trx, authorId, report.id, version, content, facts);
      await repository.replaceReaderClubs(trx, report.id, clubIdsOf(content, facts));
      await trx('report').where({ id: report.id }).update({
        state: 'filed', current_version: version, audience: content.audience,
        embargo_until: content.embargoUntil, author_named: content.authorNamed,
        decided_at: null, row_version: report.row_version + 1,
      });
      await removeDraft(trx, authorId, report.id);
      await announce(trx, 'report_changed', { id: report.id, authorId, clubId, version });
      return { number, state: 'filed' };
    },

    /** Takes a report back that nobody has decided on. */
    async withdraw(
      trx: Transaction, authorId: string, number: string, rowVersion: number,
    ): Promise<FiledReport> {
      const report = await getCurrent(trx, authorId, number, rowVersion);
      if (report.state !== 'filed' && report.state !== 'returned') {
        throw new Conflict('already_decided');
      }
      await trx('report').where({ id: report.id })
        .update({ state: 'withdrawn', row_version: report.row_version + 1 });
      await announce(trx, 'report_withdrawn', { id: report.id, authorId,
        clubId: report.club_id, version: report.current_version });
      return { number, state: 'withdrawn' };
    },
  };

  async function check(trx: Transaction, authorId: string, filed: FiledContent): Promise<{
    content: ReportContent; facts: FilingFacts; clubId: string;
  }> {
    const { kind } = filed.presentedAs;
    if (kind === 'paper_money') {
      throw new ProblemError(422, 'paper_money_not_taken',
        { fields: [{ field: 'content.presentedAs.kind', code: 'paper_money_not_taken' }] });
    }
    const content: ReportContent = { ...filed, presentedAs: { ...filed.presentedAs, kind } };
    const facts = await repository.findFilingFacts(trx, authorId, content);
    const problems = findFilingProblems(content, facts, clock());
    const clubId = facts.memberClubs.get(content.club);
    if (problems.length || clubId === undefined) throw new InvalidInput(problems);
    return { content, facts, clubId };
  }

  /** The number, or undefined where there is a report of this id already. */
  async function addNumbered(
    trx: Transaction, authorId: string, id: string, clubId: string, content: ReportContent,
  ): Promise<string | undefined> {
    const year = clock().getUTCFullYear();
    for (let tries = 0; tries < numberTries; tries += 1) {
      const number = await takeReportNumber(trx, year, config.reportNumberKey);
      if (await repository.addReport(trx, { id, number, authorId, clubId, content })) {
        return number;
      }
      if (await repository.findOwnReport(trx, authorId, { id })) return undefined;
    }
    return undefined;
  }
}

async function getCurrent(
  trx: Transaction, authorId: string, number: string, rowVersion: number,
): Promise<repository.OwnReport> {
  const report = await repository.findOwnReport(trx, authorId, { number }, true);
  if (!report) throw new NotFound();
  if (report.row_version !== rowVersion) {
    throw new Conflict('stale_version', { rowVersion: report.row_version });
  }
  return report;
}

function addVersion(
  trx: Transaction, authorId: string, reportId: string, version: number, content: ReportContent,
  facts: FilingFacts,
): Promise<void> {
  return repository.addVersion(trx, {
    reportId, version, content, facts, authorId,
    cause: version === 1 ? 'filed' : 'changes_made',
    title: titleOf(content, facts), methodId: clearMethod(content, facts),
    accountHtml: toAccountHtml(content.account),
  });
}

/** Such as `Morgan dollar 1889-CC`, or the reporter's own description. */
function titleOf(content: ReportContent, facts: FilingFacts): string {
  const { description, year, mintMark } = content.presentedAs;
  const date = [year === null ? '' : String(year), mintMark].filter(Boolean).join('-');
  const name = facts.coinType?.name ?? description;
  return date && !name.includes(date) ? `${name} ${date}` : name;
}

function clubIdsOf(content: ReportContent, facts: FilingFacts): string[] {
  return [...new Set(content.namedClubs.flatMap((slug) => facts.namedClubs.get(slug) ?? []))];
}

async function announce(
  trx: Transaction, act: 'report_filed' | 'report_changed' | 'report_withdrawn',
  report: { readonly id: string; readonly authorId: string; readonly clubId: string;
    readonly version: number },
): Promise<void> {
  await recordAudit(trx, { act, actorId: report.authorId, clubId: report.clubId,
    subjectKind: 'report', subjectId: report.id, details: { version: report.version } });
  await trx('registry_event').insert({ kind: act, report_id: report.id });
}

function toFiled({ number, state }: repository.OwnReport): FiledReport {
  return { number, state };
}
