import { MailState, mailStates } from '#shared/mail/mail-ledger';

export function mailStateWords(state: MailState): string {
  switch (state) {
    case 'reserved':
      return $localize`reserved`;
    case 'ready':
      return $localize`ready to leave`;
    case 'sending':
      return $localize`being sent`;
    case 'sent':
      return $localize`sent`;
    case 'refused':
      return $localize`refused by the receiving side`;
    case 'uncertain':
      return $localize`uncertain: may have left`;
    case 'dropped':
      return $localize`dropped`;
    case 'settled_sent':
      return $localize`settled: it arrived`;
    case 'settled_lost':
      return $localize`settled: lost, sent anew`;
  }
}

/** The same for a state that came as a bare string; null reads as no mail at all. */
export function invitationMailWords(state: string | null): string {
  if (state === null) return $localize`no mail yet`;
  return isMailState(state) ? mailStateWords(state) : state;
}

export function mailKindWords(kind: string): string {
  switch (kind) {
    case 'digest':
      return $localize`digest`;
    case 'erratum':
      return $localize`erratum`;
    case 'reset':
      return $localize`password reset`;
    case 'invitation':
      return $localize`invitation`;
    case 'registration':
      return $localize`registration`;
    case 'notice':
      return $localize`notice`;
    default:
      return kind.replaceAll('_', ' ');
  }
}


function isMailState(state: string): state is MailState {
  return (mailStates as readonly string[]).includes(state);
}
