import type { Audience } from '../access/audience';
import type { Confidence, ConfidenceBasis } from '../reports/report-content';
import type { PlacedPhotoView } from '../reports/photo';
import type { ReportView } from '../reports/report-view';

export const queueFlags = ['public_asked', 'second_voice', 'returned_and_changed', 'lot',
  'no_photo', 'many_pieces', 'oldest'] as const;
export type QueueFlag = (typeof queueFlags)[number];

/** `GET /api/review/queue?flag=&club=&coinType=&after=&limit=`, the oldest first. */
export interface QueueItem {
  readonly number: string;
  readonly title: string;
  readonly coinType: { readonly slug: string; readonly name: string } | null;
  readonly club: { readonly slug: string; readonly name: string };
  readonly filedAt: string;
  readonly version: number;
  readonly askedAudience: Audience;
  readonly flags: readonly QueueFlag[];
  /** `mine`, `other` (someone else holds the lease), or null. Nobody is named. */
  readonly lease: 'mine' | 'other' | null;
  /** Why the reader may not decide on it, where they may not. */
  readonly barred: 'own_report' | 'conflict_of_interest' | 'already_spoken'
    | 'second_voice_same_club' | null;
  readonly photos: readonly Omit<PlacedPhotoView, 'caption'>[];
}

export interface QueueAnswer {
  readonly items: readonly QueueItem[];
  readonly next: string | null;
  readonly waiting: number;
  readonly oldestFiledAt: string | null;
}

export interface LeaseView {
  readonly token: string;
  readonly expiresAt: string;
  readonly version: number;
}

export const decisionKinds = ['publish', 'return', 'decline', 'unresolved', 'agree_public',
  'refuse_public'] as const;
export type DecisionKind = (typeof decisionKinds)[number];

export interface DecisionView {
  readonly kind: DecisionKind | 'retract' | 'agree_retract';
  readonly version: number;
  readonly club: string;
  readonly confidence: Confidence | null;
  readonly basis: readonly ConfidenceBasis[];
  readonly reason: string;
  readonly madeAt: string;
  readonly mine: boolean;
}

/** `GET /api/review/reports/:number`. */
export interface ReviewView {
  readonly report: ReportView;
  readonly lease: LeaseView | null;
  readonly leaseHeldByOther: boolean;
  readonly barred: QueueItem['barred'];
  /** `first`: filed and undecided; `second`: published to clubs, public asked; null: decided. */
  readonly stage: 'first' | 'second' | null;
  readonly decisions: readonly DecisionView[];
  /** Counts of the reporter's earlier reports by outcome; no name. */
  readonly reporter: { readonly name: string; readonly filed: number; readonly published: number;
    readonly returned: number; readonly declined: number; readonly unresolved: number };
  readonly namedClubs: readonly string[];
}

/** `POST /api/review/reports/:number/decisions`. */
export interface DecisionRequest {
  readonly leaseToken: string;
  /** The version and row version that were looked at; 409 `stale_version` otherwise. */
  readonly version: number;
  readonly rowVersion: number;
  readonly kind: DecisionKind;
  /** With `publish` and `agree_public`. */
  readonly confidence: Confidence | null;
  readonly basis: readonly ConfidenceBasis[];
  /** Sent to the reporter; 1-4,000 characters. */
  readonly reason: string;
}
