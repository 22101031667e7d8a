import type { QueueItem } from '#shared/review/review';

export type Stage = 'first' | 'second' | null;

/** What decides whether a moderator may decide on a report. */
export interface Standing {
  readonly isAuthor: boolean;
  readonly hasConflict: boolean;
  /** The moderator has a standing voice on this version already. */
  readonly hasSpoken: boolean;
  /** Slugs or ids of the clubs that have a voice for publication of this version. */
  readonly clubsWithVoice: readonly string[];
  /** Clubs in which the actor moderates and which the report is meant for. */
  readonly clubsOfModerator: readonly string[];
}

/** Why the moderator may not decide at this stage, or null where they may. */
export function whyBarred(stage: Stage, standing: Standing): QueueItem['barred'] {
  if (standing.isAuthor) return 'own_report';
  if (standing.hasConflict) return 'conflict_of_interest';
  if (stage !== 'second') return null;
  if (standing.hasSpoken) return 'already_spoken';
  return clubThatSpeaks(stage, standing) === undefined ? 'second_voice_same_club' : null;
}

/** The club in whose name the moderator decides: one without a voice yet. */
export function clubThatSpeaks(stage: Stage, standing: Standing): string | undefined {
  return standing.clubsOfModerator.find((club) =>
    stage !== 'second' || !standing.clubsWithVoice.includes(club));
}

/** Filed: wants a first decision. Published to clubs with public asked: wants a second voice. */
export function stageOf(report: {
  readonly state: string; readonly audience: string; readonly published_audience: string | null;
}): Stage {
  if (report.state === 'filed') return 'first';
  return report.state === 'published' && report.audience === 'public'
    && report.published_audience !== 'public' ? 'second' : null;
}
