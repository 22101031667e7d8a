import type { Confidence, ConfidenceBasis, ReportState } from '#shared/reports/report-content';
import type { Audience } from '#shared/access/audience';
import type { DecisionKind, DecisionView, LeaseView } from '#shared/review/review';
import type { Transaction } from '../db/database';
import type { Standing } from './review-policy';

const leaseMinutes = 15;

export interface ReviewedReport {
  readonly id: string;
  readonly number: string;
  readonly author_id: string;
  readonly club_id: string;
  readonly state: ReportState;
  readonly audience: Audience;
  readonly published_audience: Audience | null;
  readonly current_version: number;
  readonly row_version: number;
  readonly embargo_until: Date | null;
}

const reportColumns = ['report.id', 'report.number', 'report.author_id', 'report.club_id',
  'report.state', 'report.audience', 'report.published_audience', 'report.current_version',
  'report.row_version', 'report.embargo_until'];

/** The report where the actor reviews it; with `lock`, held until the transaction ends. */
export function findReviewedReport(
  trx: Transaction, number: string, lock: boolean,
): Promise<ReviewedReport | undefined> {
  const query = trx('report').select(reportColumns).where({ 'report.number': number })
    .whereRaw(`reviews_report(report.audience, report.club_id, report.id, report.state,
      actor_clubs_as('moderator'))`).first();
  return lock ? query.forUpdate() : query;
}

/** What the policy needs to know of the actor and the report, in one statement. */
export async function findStanding(trx: Transaction, report: ReviewedReport): Promise<Standing> {
  const { rows: [row] } = await trx.raw(
    `select ? = current_actor() as "isAuthor",
       exists (select from conflict_of_interest c
         where c.report_id = ? and c.person_id = current_actor()) as "hasConflict",
       exists (select from decision d where d.report_id = ? and d.version = ?
         and d.undone_at is null and d.moderator_id = current_actor()) as "hasSpoken",
       array(select distinct d.club_id from decision d where d.report_id = ? and d.version = ?
         and d.undone_at is null and d.kind in ('publish', 'agree_public')) as "clubsWithVoice",
       array(select c from unnest(actor_clubs_as('moderator')) as c
         where reviews_report(?, ?, ?, ?, array[c])) as "clubsOfModerator"`,
    [report.author_id, report.id, report.id, report.current_version, report.id,
      report.current_version, report.audience, report.club_id, report.id, report.state]);
  return row;
}

/** Takes or renews the lease; undefined where someone else holds a live one. */
export async function takeLease(
  trx: Transaction, reportId: string, moderatorId: string, version: number,
): Promise<LeaseView | undefined> {
  const { rows: [row] } = await trx.raw(
    `insert into review_lease as held (report_id, moderator_id, token, version_seen, expires_at)
     values (?, ?, nextval('review_lease_token'), ?, now() + ? * interval '1 minute')
     on conflict (report_id) do update set
       token = case when held.moderator_id = excluded.moderator_id and held.expires_at > now()
                 then held.token else excluded.token end,
       moderator_id = excluded.moderator_id, version_seen = excluded.version_seen,
       expires_at = excluded.expires_at
     where held.moderator_id = excluded.moderator_id or held.expires_at <= now()
     returning token, expires_at, version_seen`,
    [reportId, moderatorId, version, leaseMinutes]);
  return row && toLease(row);
}

export async function findLease(trx: Transaction, reportId: string): Promise<{
  readonly lease: LeaseView | null; readonly heldByOther: boolean;
}> {
  const row = await trx('review_lease').select('token', 'expires_at', 'version_seen',
    trx.raw('moderator_id = current_actor() as mine'))
    .where({ report_id: reportId }).where('expires_at', '>', trx.fn.now()).first();
  return { lease: row?.mine ? toLease(row) : null, heldByOther: row ? !row.mine : false };
}

function toLease(row: { token: number; expires_at: Date; version_seen: number }): LeaseView {
  return { token: String(row.token), expiresAt: row.expires_at.toISOString(),
    version: row.version_seen };
}

export async function dropLease(trx: Transaction, reportId: string): Promise<void> {
  await trx('review_lease').where({ report_id: reportId })
    .whereRaw('moderator_id = current_actor()').delete();
}

export async function addDecision(trx: Transaction, decision: {
  readonly report: ReviewedReport; readonly kind: DecisionKind; readonly moderatorId: string;
  readonly clubId: string; readonly leaseToken: string; readonly confidence: Confidence | null;
  readonly basis: readonly ConfidenceBasis[]; readonly reason: string;
}): Promise<void> {
  await trx('decision').insert({
    report_id: decision.report.id, version: decision.report.current_version,
    row_version_seen: decision.report.row_version, kind: decision.kind,
    moderator_id: decision.moderatorId, club_id: decision.clubId,
    lease_token: decision.leaseToken, confidence: decision.confidence, basis: decision.basis,
    reason: decision.reason,
  });
}

export async function listDecisions(trx: Transaction, reportId: string): Promise<DecisionView[]> {
  const rows = await trx('decision').join('club', 'club.id', 'decision.club_id')
    .select('decision.kind', 'decision.version', 'club.name as club', 'decision.confidence',
      'decision.basis', 'decision.reason', 'decision.made_at',
      trx.raw('decision.moderator_id = current_actor() as mine'))
    .where({ report_id: reportId }).whereNull('undone_at').orderBy('made_at').limit(100);
  return rows.map(({ made_at, ...row }) => ({ ...row, madeAt: made_at.toISOString() }));
}

/** Ends what stands and publishes anew; returns the new publication's id. */
export async function publish(trx: Transaction, publication: {
  readonly reportId: string; readonly version: number; readonly audience: Audience;
  readonly confidence: Confidence; readonly basis: readonly ConfidenceBasis[];
  readonly endsAs: 'widened' | 'corrected';
}): Promise<string> {
  // At least a microsecond long, so that a publication that ends in the same transaction that
  // another one began in is not an empty range.
  await trx('publication').where({ report_id: publication.reportId })
    .whereRaw('upper_inf(during)').update({
      during: trx.raw(`tstzrange(lower(during), greatest(now(),
        lower(during) + interval '1 microsecond'))`), ended_as: publication.endsAs });
  const [row] = await trx('publication').insert({
    report_id: publication.reportId, version: publication.version,
    audience: publication.audience, confidence: publication.confidence,
    basis: publication.basis,
    during: trx.raw(`tstzrange(greatest(now(), (select max(upper(p.during)) from publication p
      where p.report_id = ?)), null)`, [publication.reportId]),
  }).returning('id');
  return row.id;
}

export async function changeReport(
  trx: Transaction, reportId: string, changes: Readonly<Record<string, unknown>>,
): Promise<void> {
  await trx('report').where({ id: reportId })
    .update({ ...changes, row_version: trx.raw('row_version + 1') });
}

/** The first voice's confidence and basis on this version. */
export function findFirstVoice(trx: Transaction, reportId: string, version: number): Promise<{
  confidence: Confidence; basis: ConfidenceBasis[];
} | undefined> {
  return trx('decision').select('confidence', 'basis')
    .where({ report_id: reportId, version, kind: 'publish' }).whereNull('undone_at')
    .orderBy('made_at').first();
}
