import { confidences, type Confidence } from '#shared/reports/report-content';
import type { ReportView } from '#shared/reports/report-view';
import type { DecisionRequest, LeaseView, QueueAnswer, ReviewView } from '#shared/review/review';
import { recordAudit } from '../audit/audit';
import type { Transaction } from '../db/database';
import { Conflict, NotAllowed, NotFound, ProblemError } from '../errors';
import type { SignedIn } from '../http/route';
import { clubThatSpeaks, stageOf, whyBarred, type Stage } from './review-policy';
import { findReporter, listQueue } from './review-queries';
import * as repository from './review-repository';
import type { ReviewedReport } from './review-repository';
import type { QueueQuery } from './review-schemas';

/** What review asks of other features. */
export interface ReviewNeeds {
  /** The newest version as the actor sees it. */
  viewNewest(trx: Transaction, number: string): Promise<ReportView>;
  /** Tells the reporter, on screen and by mail. */
  tellReporter(trx: Transaction, notice: {
    readonly kind: 'report_published' | 'report_returned' | 'report_declined'
      | 'report_unresolved' | 'report_made_public';
    readonly reportId: string; readonly authorId: string;
    readonly cause: string; readonly parameters: Readonly<Record<string, string | number>>;
  }): Promise<void>;
  /** Wakes the matching of watches for a new publication. */
  announcePublication(trx: Transaction, publication: NewPublication): Promise<void>;
}

export interface NewPublication {
  readonly reportId: string;
  readonly publicationId: string;
  /** End of the embargo, before which nobody is told; null where there is none. */
  readonly notBefore: Date | null;
}

const noticeOf = {
  publish: 'report_published', return: 'report_returned', decline: 'report_declined',
  unresolved: 'report_unresolved', agree_public: 'report_made_public',
} as const;

const stateAfter = { return: 'returned', decline: 'declined', unresolved: 'unresolved' } as const;

export type ReviewService = ReturnType<typeof createReviewService>;

export function createReviewService(needs: ReviewNeeds) {
  return {
    queue: (trx: Transaction, query: QueueQuery): Promise<QueueAnswer> => listQueue(trx, query),

    async view(trx: Transaction, actor: SignedIn, number: string): Promise<ReviewView> {
      const report = await getReviewed(trx, number, false);
      const stage = stageOf(report);
      const standing = await repository.findStanding(trx, report);
      const { lease, heldByOther } = await repository.findLease(trx, report.id);
      // The venue and the reporter's name are on this page: looks at them are on record.
      await recordAudit(trx, { act: 'evidence_viewed', actorId: actor.id,
        subjectKind: 'report', subjectId: report.id });
      return {
        report: await needs.viewNewest(trx, report.number),
        lease, leaseHeldByOther: heldByOther, stage,
        barred: whyBarred(stage, standing),
        decisions: await repository.listDecisions(trx, report.id),
        ...await findReporter(trx, report.id, report.author_id),
      };
    },

    /** Takes the lease or renews one's own. 409 `lease_taken` where another holds it. */
    async takeLease(trx: Transaction, actor: SignedIn, number: string): Promise<LeaseView> {
      const { report } = await getDecidable(trx, number);
      const lease = await repository.takeLease(trx, report.id, actor.id, report.current_version);
      if (!lease) throw new Conflict('lease_taken');
      return lease;
    },

    async dropLease(trx: Transaction, number: string): Promise<void> {
      const report = await getReviewed(trx, number, false);
      await repository.dropLease(trx, report.id);
    },

    async declareConflict(
      trx: Transaction, actor: SignedIn, number: string, note: string,
    ): Promise<void> {
      const report = await getReviewed(trx, number, false);
      await trx('conflict_of_interest').insert({
        person_id: actor.id, report_id: report.id, source: 'declared', note,
      }).onConflict(['person_id', 'report_id']).ignore();
      await repository.dropLease(trx, report.id);
      await recordAudit(trx, { act: 'conflict_declared', actorId: actor.id,
        subjectKind: 'report', subjectId: report.id });
    },

    /**
     * Decides. 409 `lease_needed` without a live lease of one's own, `stale_version` where the
     * report changed since it was looked at; nothing of the request is kept then.
     */
    async decide(
      trx: Transaction, actor: SignedIn, number: string, request: DecisionRequest,
    ): Promise<void> {
      const { report, stage, clubId } = await getDecidable(trx, number, request.kind);
      const { lease } = await repository.findLease(trx, report.id);
      if (!lease || lease.token !== request.leaseToken) throw new Conflict('lease_needed');
      if (report.current_version !== request.version
          || report.row_version !== request.rowVersion) {
        throw new Conflict('stale_version', { version: report.current_version,
          rowVersion: report.row_version });
      }
      await repository.addDecision(trx, { report, kind: request.kind, moderatorId: actor.id,
        clubId, leaseToken: request.leaseToken, confidence: request.confidence,
        basis: request.basis, reason: request.reason });
      await recordAudit(trx, { act: `decision_${request.kind}`, actorId: actor.id,
        clubId, subjectKind: 'report', subjectId: report.id,
        details: { version: report.current_version, confidence: request.confidence } });
      await takeEffect(trx, report, stage, request);
      await repository.dropLease(trx, report.id);
      const kind = request.kind === 'refuse_public' ? undefined : noticeOf[request.kind];
      if (kind) {
        await needs.tellReporter(trx, { kind, reportId: report.id, authorId: report.author_id,
          cause: `notice:${report.id}:${report.row_version}:${request.kind}`,
          parameters: { reason: request.reason, number: report.number } });
      }
    },
  };

  async function takeEffect(
    trx: Transaction, report: ReviewedReport, stage: Stage, request: DecisionRequest,
  ): Promise<void> {
    switch (request.kind) {
      case 'return':
      case 'decline':
      case 'unresolved':
        await repository.changeReport(trx, report.id, {
          state: stateAfter[request.kind], decided_at: trx.fn.now() });
        return;
      case 'refuse_public':
        await repository.changeReport(trx, report.id, { audience: 'clubs' });
        return;
      case 'publish':
        // Public waits for the second voice: until then the clubs see it.
        return putOut(trx, report, {
          audience: report.audience === 'public' ? 'clubs' : report.audience,
          confidence: getConfidence(request), basis: request.basis });
      case 'agree_public': {
        const first = await repository.findFirstVoice(trx, report.id, report.current_version);
        if (!first) throw new Conflict('already_decided');
        const lower = lowerOf(first.confidence, getConfidence(request));
        return putOut(trx, report, { audience: 'public', confidence: lower,
          basis: lower === first.confidence ? first.basis : request.basis });
      }
    }
  }

  async function putOut(trx: Transaction, report: ReviewedReport, what: {
    audience: ReviewedReport['audience']; confidence: Confidence;
    basis: DecisionRequest['basis'];
  }): Promise<void> {
    const publicationId = await repository.publish(trx, { reportId: report.id,
      version: report.current_version, ...what,
      endsAs: what.audience === 'public' ? 'widened' : 'corrected' });
    await repository.changeReport(trx, report.id, { state: 'published',
      published_audience: what.audience, published_version: report.current_version,
      decided_at: trx.fn.now() });
    await trx.raw('select renew_report_search(?)', [report.id]);
    await needs.announcePublication(trx, { reportId: report.id, publicationId,
      notBefore: report.embargo_until });
  }
}

async function getReviewed(
  trx: Transaction, number: string, lock: boolean,
): Promise<ReviewedReport> {
  const report = await repository.findReviewedReport(trx, number, lock);
  if (!report) throw new NotFound();
  return report;
}

/** The report, locked, where the actor may decide on it now; else the reason as a refusal. */
async function getDecidable(trx: Transaction, number: string, kind?: DecisionRequest['kind']) {
  const report = await getReviewed(trx, number, true);
  const stage = stageOf(report);
  const isOfSecondStage = kind === 'agree_public' || kind === 'refuse_public';
  if (stage === null || (kind && isOfSecondStage !== (stage === 'second'))) {
    throw new Conflict('already_decided');
  }
  const standing = await repository.findStanding(trx, report);
  const barred = whyBarred(stage, standing);
  if (barred === 'already_spoken') throw new Conflict('already_decided');
  if (barred) throw new NotAllowed(barred);
  const clubId = clubThatSpeaks(stage, standing);
  if (!clubId) throw new ProblemError(403, 'second_voice_same_club');
  return { report, stage, clubId };
}

function getConfidence(request: DecisionRequest): Confidence {
  if (!request.confidence) throw new Error('the schema demands a confidence when publishing');
  return request.confidence;
}

/** Of two confidences the lower stands. */
function lowerOf(one: Confidence, other: Confidence): Confidence {
  return confidences[Math.min(confidences.indexOf(one), confidences.indexOf(other))] ?? one;
}
