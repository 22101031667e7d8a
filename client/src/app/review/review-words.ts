import { Audience } from '#shared/access/audience';
import { DecisionKind, DecisionView, QueueFlag, QueueItem } from '#shared/review/review';

export type Stage = 'first' | 'second';

export function flagWords(value: QueueFlag): string {
  switch (value) {
    case 'public_asked':
      return $localize`public asked`;
    case 'second_voice':
      return $localize`second voice wanted`;
    case 'returned_and_changed':
      return $localize`returned, changed`;
    case 'lot':
      return $localize`a lot`;
    case 'no_photo':
      return $localize`no photo`;
    case 'many_pieces':
      return $localize`ten pieces or more`;
    case 'oldest':
      return $localize`waits over a week`;
  }
}

/** Why the reader may not decide, and what happens instead. */
export function barredWords(value: NonNullable<QueueItem['barred']>): string {
  switch (value) {
    case 'own_report':
      return $localize`This is your own report. Nobody decides on their own: another moderator \
will take it.`;
    case 'conflict_of_interest':
      return $localize`A conflict of interest is on record for you here. You may read it; another \
moderator will decide.`;
    case 'already_spoken':
      return $localize`You have spoken on this version. Going public needs the voice of a second \
moderator, of another club.`;
    case 'second_voice_same_club':
      return $localize`Your club has spoken on this version. The second voice must come from a \
moderator of another club.`;
  }
}

export const outcomesOfStage: Readonly<Record<Stage, readonly DecisionKind[]>> = {
  first: ['publish', 'return', 'decline', 'unresolved'],
  second: ['agree_public', 'refuse_public'],
};

export function outcomeWords(value: DecisionKind): string {
  switch (value) {
    case 'publish':
      return $localize`Publish`;
    case 'return':
      return $localize`Return with notes`;
    case 'decline':
      return $localize`Decline`;
    case 'unresolved':
      return $localize`Cannot be told from this evidence`;
    case 'agree_public':
      return $localize`Agree: show it to everyone`;
    case 'refuse_public':
      return $localize`Not public: leave it with the clubs`;
  }
}

/** What will happen, for the button that makes it happen. */
export function actWords(kind: DecisionKind | null, asked: Audience): string {
  switch (kind) {
    case null:
      return $localize`Choose an outcome first`;
    case 'publish':
      return publishWords(asked);
    case 'return':
      return $localize`Return to the reporter`;
    case 'decline':
      return $localize`Decline the report`;
    case 'unresolved':
      return $localize`Close it as "cannot be told"`;
    case 'agree_public':
      return $localize`Show it to everyone`;
    case 'refuse_public':
      return $localize`Leave it with the clubs`;
  }
}

function publishWords(asked: Audience): string {
  switch (asked) {
    case 'club':
      return $localize`Publish to the reporter's club`;
    case 'named_clubs':
      return $localize`Publish to the named clubs`;
    case 'clubs':
      return $localize`Publish to clubs`;
    case 'public':
      return $localize`Publish to clubs, ask for a second`;
  }
}

/** What has happened, once it has. */
export function doneWords(kind: DecisionKind, asked: Audience): string {
  switch (kind) {
    case 'publish':
      return asked === 'public'
        ? $localize`Published to the clubs. A moderator of another club is asked about the public.`
        : $localize`Published. Readers who watch for it will hear of it.`;
    case 'return':
      return $localize`Returned. The reporter has your notes and can change it.`;
    case 'decline':
      return $localize`Declined. The reporter has your reason.`;
    case 'unresolved':
      return $localize`Closed as "cannot be told". The reporter has your reason.`;
    case 'agree_public':
      return $localize`Now shown to everyone, at the lower of the two confidences.`;
    case 'refuse_public':
      return $localize`It stays with the clubs.`;
  }
}

/** An earlier decision, as the record names it. */
export function decisionWords(kind: DecisionView['kind']): string {
  switch (kind) {
    case 'publish':
      return $localize`Published`;
    case 'return':
      return $localize`Returned with notes`;
    case 'decline':
      return $localize`Declined`;
    case 'unresolved':
      return $localize`Cannot be told`;
    case 'agree_public':
      return $localize`Agreed to public`;
    case 'refuse_public':
      return $localize`Did not agree to public`;
    case 'retract':
      return $localize`Retraction asked`;
    case 'agree_retract':
      return $localize`Retraction agreed`;
  }
}
