import { audiences } from '#shared/access/audience';
import { confidenceBases, confidences } from '#shared/reports/report-content';
import { decisionKinds, queueFlags, type DecisionRequest, type LeaseView,
  type QueueAnswer, type ReviewView } from '#shared/review/review';
import { z } from '../http/openapi-zod';
import { cardPhoto, reportView } from '../reports/report-schemas';

const namedSlug = z.strictObject({ slug: z.string(), name: z.string() });
const barred = z.enum(['own_report', 'conflict_of_interest', 'already_spoken',
  'second_voice_same_club']).nullable();

export const numberParams = z.object({ number: z.string().max(30) });

export const queueQuery = z.strictObject({
  flag: z.enum(queueFlags).optional(),
  club: z.string().max(60).optional(),
  coinType: z.string().max(120).optional(),
  after: z.string().max(200).optional(),
  limit: z.coerce.number().int().min(1).max(50).default(25),
});
export type QueueQuery = z.output<typeof queueQuery>;

export const queueAnswer = z.strictObject({
  items: z.array(z.strictObject({
    number: z.string(),
    title: z.string(),
    coinType: namedSlug.nullable(),
    club: namedSlug,
    filedAt: z.string(),
    version: z.int(),
    askedAudience: z.enum(audiences),
    flags: z.array(z.enum(queueFlags)),
    lease: z.enum(['mine', 'other']).nullable(),
    barred,
    photos: z.array(cardPhoto),
  })),
  next: z.string().nullable(),
  waiting: z.int(),
  oldestFiledAt: z.string().nullable(),
}).openapi('ReviewQueue') satisfies z.ZodType<QueueAnswer>;

export const leaseView = z.strictObject({
  token: z.string(), expiresAt: z.string(), version: z.int(),
}).openapi('ReviewLease') satisfies z.ZodType<LeaseView>;

export const reviewView = z.strictObject({
  report: reportView,
  lease: leaseView.nullable(),
  leaseHeldByOther: z.boolean(),
  barred,
  stage: z.enum(['first', 'second']).nullable(),
  decisions: z.array(z.strictObject({
    kind: z.enum([...decisionKinds, 'retract', 'agree_retract']),
    version: z.int(),
    club: z.string(),
    confidence: z.enum(confidences).nullable(),
    basis: z.array(z.enum(confidenceBases)),
    reason: z.string(),
    madeAt: z.string(),
    mine: z.boolean(),
  })),
  reporter: z.strictObject({
    name: z.string(), filed: z.int(), published: z.int(), returned: z.int(), declined: z.int(),
    unresolved: z.int(),
  }),
  namedClubs: z.array(z.string()),
}).openapi('Review') satisfies z.ZodType<ReviewView>;

const objectiveBases = ['weight_outside', 'size_outside', 'density_outside', 'date_never_struck',
  'composition_wrong'];

export const decisionRequest = z.strictObject({
  leaseToken: z.string().regex(/^\d{1,18}$/),
  version: z.int().min(1),
  rowVersion: z.int().min(1),
  kind: z.enum(decisionKinds),
  confidence: z.enum(confidences).nullable(),
  basis: z.array(z.enum(confidenceBases)).max(confidenceBases.length),
  reason: z.string().trim().min(1).max(4000),
}).superRefine((decision, context) => {
  const publishes = decision.kind === 'publish' || decision.kind === 'agree_public';
  if (publishes && decision.confidence === null) {
    context.addIssue({ code: 'custom', path: ['confidence'], message: 'required' });
  }
  if (!publishes && decision.confidence !== null) {
    context.addIssue({ code: 'custom', path: ['confidence'], message: 'only_when_publishing' });
  }
  if (publishes && !decision.basis.length) {
    context.addIssue({ code: 'custom', path: ['basis'], message: 'required' });
  }
  if (decision.confidence === 'confirmed') {
    if (!decision.basis.includes('piece_in_hand')) {
      context.addIssue({ code: 'custom', path: ['basis'], message: 'confirmed_needs_piece' });
    } else if (!decision.basis.some((basis) => objectiveBases.includes(basis))) {
      context.addIssue({ code: 'custom', path: ['basis'], message: 'confirmed_needs_test' });
    }
  }
}) satisfies z.ZodType<DecisionRequest>;

export const conflictRequest = z.strictObject({ note: z.string().trim().max(500) });
