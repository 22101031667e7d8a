import {
  Channel,
  ComponentKind,
  Condition,
  Confidence,
  ConfidenceBasis,
  Judgement,
  Metal,
  PieceKind,
  ReportState,
  Whereabouts,
} from '#shared/reports/report-content';
import { Audience, ClubRole, Disclosure } from '#shared/access/audience';
import { PhotoSide } from '#shared/reports/photo';

// The trade words of the registry's codes, in one place, so that every screen says the same.

export function confidenceWords(value: Confidence): string {
  switch (value) {
    case 'suspected':
      return $localize`suspected`;
    case 'probable':
      return $localize`probable`;
    case 'confirmed':
      return $localize`confirmed`;
  }
}

export function basisWords(value: ConfidenceBasis): string {
  switch (value) {
    case 'photographs':
      return $localize`photographs`;
    case 'piece_in_hand':
      return $localize`the piece in hand`;
    case 'weight_outside':
      return $localize`weight outside its limits`;
    case 'size_outside':
      return $localize`size outside its limits`;
    case 'density_outside':
      return $localize`density outside its limits`;
    case 'date_never_struck':
      return $localize`a date never struck`;
    case 'composition_wrong':
      return $localize`wrong composition`;
    case 'shared_marks':
      return $localize`marks shared with other pieces`;
    case 'tells_named':
      return $localize`the tells named`;
  }
}

export function channelWords(value: Channel): string {
  switch (value) {
    case 'online_marketplace':
      return $localize`online marketplace`;
    case 'auction':
      return $localize`auction`;
    case 'coin_show':
      return $localize`coin show`;
    case 'shop':
      return $localize`shop`;
    case 'flea_market':
      return $localize`flea market`;
    case 'private_sale':
      return $localize`private sale`;
    case 'inherited_lot':
      return $localize`inherited lot`;
    case 'change':
      return $localize`change`;
    case 'other':
      return $localize`:a channel:other`;
  }
}

export function pieceKindWords(value: PieceKind): string {
  switch (value) {
    case 'coin':
      return $localize`coin`;
    case 'ancient':
      return $localize`ancient coin`;
    case 'hammered':
      return $localize`hammered coin`;
    case 'token':
      return $localize`token`;
    case 'medal':
      return $localize`medal`;
    case 'bar':
      return $localize`bar`;
  }
}

export function metalWords(value: Metal): string {
  switch (value) {
    case 'gold':
      return $localize`gold`;
    case 'silver':
      return $localize`silver`;
    case 'copper':
      return $localize`copper`;
    case 'bronze':
      return $localize`bronze`;
    case 'brass':
      return $localize`brass`;
    case 'nickel':
      return $localize`nickel`;
    case 'cupro_nickel':
      return $localize`cupro-nickel`;
    case 'steel':
      return $localize`steel`;
    case 'zinc':
      return $localize`zinc`;
    case 'platinum':
      return $localize`platinum`;
    case 'bimetal':
      return $localize`two metals`;
    case 'other':
      return $localize`:a metal:other`;
  }
}

export function componentWords(value: ComponentKind): string {
  switch (value) {
    case 'piece':
      return $localize`piece`;
    case 'holder':
      return $localize`holder`;
    case 'label':
      return $localize`label`;
    case 'packaging':
      return $localize`packaging`;
  }
}

export function judgementWords(value: Judgement): string {
  switch (value) {
    case 'false':
      return $localize`false`;
    case 'altered':
      return $localize`altered`;
    case 'genuine':
      return $localize`genuine, in the reporter's opinion`;
    case 'cannot_tell':
      return $localize`cannot tell`;
    case 'not_present':
      return $localize`not present`;
  }
}

export function conditionWords(value: Condition): string {
  switch (value) {
    case 'little_worn':
      return $localize`little worn`;
    case 'worn':
      return $localize`worn`;
    case 'mounted':
      return $localize`mounted`;
    case 'holed':
      return $localize`holed`;
    case 'corroded':
      return $localize`corroded`;
  }
}

export function whereaboutsWords(value: Whereabouts): string {
  switch (value) {
    case 'with_owner':
      return $localize`with its owner`;
    case 'kept_for_study':
      return $localize`kept for study`;
    case 'returned':
      return $localize`returned`;
    case 'handed_to_authority':
      return $localize`handed to the police, the central bank or the mint`;
    case 'destroyed':
      return $localize`destroyed`;
    case 'unknown':
      return $localize`:where the piece is:unknown`;
  }
}

export function sideWords(value: PhotoSide): string {
  switch (value) {
    case 'obverse':
      return $localize`obverse`;
    case 'reverse':
      return $localize`reverse`;
    case 'edge':
      return $localize`edge`;
    case 'detail':
      return $localize`detail`;
  }
}

export function audienceWords(value: Audience): string {
  switch (value) {
    case 'club':
      return $localize`one club`;
    case 'named_clubs':
      return $localize`named clubs`;
    case 'clubs':
      return $localize`all clubs`;
    case 'public':
      return $localize`everyone`;
  }
}

export function disclosureWords(value: Disclosure): string {
  switch (value) {
    case 'public':
      return $localize`shown to everyone who may open the report`;
    case 'clubs':
      return $localize`shown to clubs only`;
    case 'moderators':
      return $localize`shown to moderators only`;
  }
}

export function stateWords(value: ReportState): string {
  switch (value) {
    case 'filed':
      return $localize`filed, waiting for review`;
    case 'published':
      return $localize`published`;
    case 'declined':
      return $localize`declined`;
    case 'unresolved':
      return $localize`cannot be told`;
    case 'returned':
      return $localize`returned, changes asked`;
    case 'withdrawn':
      return $localize`withdrawn`;
    case 'retracted':
      return $localize`retracted`;
    case 'merged':
      return $localize`merged into another`;
    case 'withheld':
      return $localize`withheld on legal grounds`;
  }
}

export function roleWords(value: ClubRole): string {
  switch (value) {
    case 'subscriber':
      return $localize`subscriber`;
    case 'member':
      return $localize`member`;
    case 'moderator':
      return $localize`moderator`;
    case 'secretary':
      return $localize`secretary`;
  }
}
