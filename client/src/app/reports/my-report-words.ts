import { MyReport } from '#shared/reports/report-view';

import { audienceWords, stateWords } from '../ui/report-words';

type Standing = Pick<MyReport, 'state' | 'inReview' | 'audience' | 'publishedAudience'>;

/** Where a report of one's own stands, in plain words. */
export function standingWords(report: Standing): string {
  if (report.state === 'filed' && report.inReview) return $localize`in review`;
  if (report.state === 'published' && report.publishedAudience) {
    return $localize`published, for ${audienceWords(report.publishedAudience)}:audience:`;
  }
  return stateWords(report.state);
}

/** What happens next, and whose turn it is. */
export function nextStepWords(report: Standing): string {
  switch (report.state) {
    case 'filed':
      return report.inReview
        ? $localize`A moderator is on it just now. You are mailed when it is decided.`
        : $localize`It waits for a moderator. You are mailed when it is decided.`;
    case 'returned':
      return $localize`Your turn: change what is asked and file it again.`;
    case 'published':
      return report.audience === 'public' && report.publishedAudience === 'clubs'
        ? $localize`The clubs see it now. For everyone to see it, a moderator of another club \
must agree.`
        : $localize`Nothing more to do. A newer finding can be added by a new report.`;
    case 'declined':
      return $localize`It is not published. The reason stands below; a new report may bring more \
evidence.`;
    case 'unresolved':
      return $localize`It cannot be told from this evidence. The piece in hand, a weight or better \
photos may decide it: file a new report with them.`;
    case 'withdrawn':
      return $localize`You took it back. Nobody else can read it.`;
    case 'retracted':
      return $localize`It was retracted; its page and number stay, with the reason.`;
    case 'merged':
      return $localize`It was joined with another report of the piece; its number leads there.`;
    case 'withheld':
      return $localize`It is withheld on legal grounds; its number stays.`;
  }
}

/** A member may take a report back until it is decided. */
export function mayWithdraw({ state }: Pick<MyReport, 'state'>): boolean {
  return state === 'filed' || state === 'returned';
}
