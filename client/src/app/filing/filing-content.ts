import { Circle, PhotoSide, UploadedPhoto } from '#shared/reports/photo';
import {
  Channel,
  DraftContent,
  ReportContent,
  Surfacing,
} from '#shared/reports/report-content';

/** A report while it is written: whole, but for answers that are not given yet. */
export interface FilingContent extends Omit<ReportContent, 'surfacing'> {
  readonly surfacing: Omit<Surfacing, 'channel'> & { readonly channel: Channel | null };
}

export const filingSteps = ['piece', 'photos', 'measure', 'surfacing', 'send'] as const;
export type FilingStep = (typeof filingSteps)[number];

/** An answer without which a report can't be sent, and where it is given. */
export interface Missing {
  readonly code:
    | 'presentedAs'
    | 'paperMoney'
    | 'photos'
    | 'obverse'
    | 'channel'
    | 'country'
    | 'surfacedOn'
    | 'currency'
    | 'namedClubs'
    | 'club';
  readonly step: FilingStep;
}

/** What a new report starts with: the plain case, so that little need be touched. */
export function emptyContent(club: string): FilingContent {
  return {
    club,
    presentedAs: {
      coinType: null,
      kind: 'coin',
      metal: null,
      description: '',
      year: null,
      mintMark: '',
    },
    components: [{ kind: 'piece', judgement: 'false', note: '' }],
    pieceCount: 1,
    condition: 'worn',
    whereabouts: 'with_owner',
    photos: [],
    tells: [],
    measurements: [],
    surfacing: {
      channel: null,
      surfacedOn: '',
      country: '',
      region: '',
      town: '',
      venue: '',
      price: null,
      currency: null,
    },
    account: '',
    audience: 'clubs',
    namedClubs: [],
    embargoUntil: null,
    photoLicence: 'registry_only',
    authorNamed: false,
  };
}

/** A stored draft over the empty report. Parts of lists that are not whole are left out. */
export function contentOfDraft(draft: DraftContent, club: string): FilingContent {
  const empty = emptyContent(club);
  const known = Object.fromEntries(
    Object.entries(draft).filter(([, value]) => value !== undefined && value !== null),
  ) as Partial<FilingContent>;
  return {
    ...empty,
    ...known,
    club: known.club || club,
    presentedAs: { ...empty.presentedAs, ...known.presentedAs },
    surfacing: { ...empty.surfacing, ...known.surfacing },
    photos: (known.photos ?? []).filter((photo) => photo.photoId && photo.side),
    tells: (known.tells ?? []).filter((tell) => tell.tellId && tell.disclosure),
    measurements: (known.measurements ?? []).filter(({ value }) => value !== undefined),
  };
}

/** The form as a draft keeps it: what is empty is left out where the server takes no null. */
export function draftOf(content: FilingContent): DraftContent {
  const { channel, ...surfacing } = content.surfacing;
  return { ...content, surfacing: { ...surfacing, ...(channel ? { channel } : {}) } };
}

const paperMoneyWords = new RegExp(
  [
    /\b(bank ?notes?|paper ?money|treasury notes?|geldscheine?|banknoten?)\b/,
    // "five-pound note", "10 dollar bill"; a medal of a man called Bill passes.
    /\b(pounds?|dollars?|euros?|francs?|marks?|shillings?|roubles?|rupees?)[ -](notes?|bills?)\b/,
  ]
    .map(({ source }) => source)
    .join('|'),
  'i',
);

/** Whether words describe paper money, which is not taken. */
export function speaksOfPaperMoney(description: string): boolean {
  return paperMoneyWords.test(description);
}

/** What still has to be answered, in the order of the steps. */
export function missingIn(content: FilingContent): readonly Missing[] {
  const { presentedAs, surfacing, photos } = content;
  const missing: Missing[] = [];
  const miss = (isMissing: boolean, code: Missing['code'], step: FilingStep): void => {
    if (isMissing) missing.push({ code, step });
  };
  miss(!content.club, 'club', 'piece');
  miss(!presentedAs.coinType && !presentedAs.description.trim(), 'presentedAs', 'piece');
  miss(speaksOfPaperMoney(presentedAs.description), 'paperMoney', 'piece');
  miss(photos.length < 2, 'photos', 'photos');
  miss(photos.length >= 2 && !photos.some(({ side }) => side === 'obverse'), 'obverse', 'photos');
  miss(!surfacing.channel, 'channel', 'surfacing');
  miss(!surfacing.country, 'country', 'surfacing');
  miss(!surfacing.surfacedOn, 'surfacedOn', 'surfacing');
  miss(surfacing.price !== null && !surfacing.currency, 'currency', 'surfacing');
  miss(content.audience === 'named_clubs' && !content.namedClubs.length, 'namedClubs', 'send');
  return missing;
}

/** The step on which a field of the report, named as the server names it, is answered. */
export function stepOfField(field: string): FilingStep {
  const name = field.replace(/^content\./, '').split('.', 1)[0];
  switch (name) {
    case 'photos':
    case 'tells':
      return 'photos';
    case 'measurements':
      return 'measure';
    case 'surfacing':
    case 'account':
      return 'surfacing';
    case 'audience':
    case 'namedClubs':
    case 'embargoUntil':
    case 'photoLicence':
    case 'authorNamed':
      return 'send';
    default:
      return 'piece';
  }
}

/** The report as it is sent. Throws where something is missing: ask `missingIn` first. */
export function reportOf(content: FilingContent): ReportContent {
  const { channel } = content.surfacing;
  if (!channel) throw new Error('a report needs a channel');
  return {
    ...content,
    surfacing: {
      ...content.surfacing,
      channel,
      currency: content.surfacing.price === null ? null : content.surfacing.currency,
    },
    namedClubs: content.audience === 'named_clubs' ? content.namedClubs : [],
  };
}

/** In the middle, filling most of the picture: right for a photo taken with care. */
export function likelyCircle(width: number, height: number): Circle {
  return { x: 0.5, y: 0.5, radius: (0.45 * Math.min(width, height)) / width };
}

/** The side a new photo most likely shows: the first two faces, then details. */
export function likelySide(photos: FilingContent['photos']): PhotoSide {
  if (!photos.some(({ side }) => side === 'obverse')) return 'obverse';
  return photos.some(({ side }) => side === 'reverse') ? 'detail' : 'reverse';
}

/** Blurring changes the files behind a photo's address: another query shows the new ones. */
export function blursKey({ blurs }: Pick<UploadedPhoto, 'blurs'>): string {
  return blurs.map(({ x, y, width, height }) => [x, y, width, height].join('-')).join('_');
}
