import type { Audience, Disclosure } from '../access/audience';
import type { PlacedPhotoView } from './photo';
import type { Channel, Component, Condition, Confidence, ConfidenceBasis, Measurement, PieceKind,
  Pin, PresentedAs, ReportContent, ReportState, Whereabouts } from './report-content';

export interface NamedTell {
  readonly id: string;
  readonly name: string;
}

/** A report as a card in lists. */
export interface ReportCard {
  readonly number: string;
  readonly title: string;
  readonly coinType: { readonly slug: string; readonly name: string } | null;
  readonly kind: PieceKind;
  readonly metal: string | null;
  readonly year: number | null;
  readonly mintMark: string | null;
  readonly confidence: Confidence;
  readonly methodId: string | null;
  readonly tells: readonly NamedTell[];
  readonly channel: Channel;
  readonly country: string;
  readonly region: string;
  /** `YYYY-MM`. */
  readonly surfacedMonth: string;
  readonly publishedAt: string;
  readonly audience: Audience;
  readonly pieceCount: number;
  /** Obverse and reverse, at most two. */
  readonly photos: readonly Omit<PlacedPhotoView, 'caption'>[];
}

export interface FacetCount {
  readonly value: string;
  readonly count: number;
}

/** `GET /api/reports`. */
export interface ReportSearchAnswer {
  readonly items: readonly ReportCard[];
  readonly next: string | null;
  /** Hits in all, counted up to 10,000; `more` where there are more. */
  readonly total: { readonly count: number; readonly more: boolean };
  /** Given with the first page only. */
  readonly facets: Readonly<Record<FacetName, readonly FacetCount[]>> | null;
  /** Words mended by spelling: the text asked, and the text searched. */
  readonly mended: { readonly from: string; readonly to: string } | null;
  /** Where the text is a whole report number that the reader may see: go there. */
  readonly number: string | null;
  /** Where the text looks like a report number whose check character does not fit. */
  readonly numberMistyped: boolean;
}

/** `GET /api/reports/suggestions?text=`: words of the catalogue only, never of reports. */
export interface SearchSuggestion {
  /** `coin_type` and `tell`: `value` is the slug or id for that facet; `word`: a word to search. */
  readonly kind: 'coin_type' | 'tell' | 'word';
  readonly value: string;
  readonly label: string;
}

export const facetNames = ['coinType', 'metal', 'kind', 'tell', 'channel', 'country',
  'confidence'] as const;
export type FacetName = (typeof facetNames)[number];

export interface MeasurementView extends Measurement {
  readonly position: number;
}

export interface ReportTellView {
  readonly position: number;
  readonly tell: NamedTell & { readonly seen: string };
  readonly note: string;
  readonly disclosure: Disclosure;
  readonly pins: readonly (Pin & { readonly layer: 'reporter' | 'moderator' })[];
}

export interface SurfacingView {
  readonly channel: Channel;
  readonly month: string;
  readonly country: string;
  readonly region: string;
  readonly priceBand: { readonly low: number; readonly high: number;
    readonly currency: string } | null;
  /** Null unless the reader is of the reporter's club or reviews the report. */
  readonly detail: { readonly surfacedOn: string | null; readonly town: string;
    readonly price: number | null; readonly currency: string | null } | null;
  /** Null unless the reader filed or reviews it. */
  readonly venue: string | null;
}

export interface PublicationView {
  readonly version: number;
  readonly audience: Audience;
  readonly confidence: Confidence;
  readonly basis: readonly ConfidenceBasis[];
  readonly from: string;
  readonly to: string | null;
  readonly endedAs: string | null;
}

/** A version of a report as a reader may see it. */
export interface ReportView {
  readonly number: string;
  readonly state: ReportState;
  readonly version: number;
  readonly rowVersion: number;
  readonly title: string;
  readonly presentedAs: PresentedAs;
  readonly coinType: { readonly slug: string; readonly name: string; readonly issuer: string;
    readonly diameterMillimetres: number | null } | null;
  readonly components: readonly Component[];
  readonly pieceCount: number;
  readonly condition: Condition;
  readonly whereabouts: Whereabouts;
  readonly method: NamedTell | null;
  readonly photos: readonly PlacedPhotoView[];
  readonly tells: readonly ReportTellView[];
  /** True where tells or pins exist that this reader may not see. */
  readonly someTellsHeldBack: boolean;
  readonly measurements: readonly MeasurementView[];
  readonly surfacing: SurfacingView;
  readonly accountHtml: string;
  readonly askedAudience: Audience | null;
  readonly audience: Audience | null;
  readonly embargoUntil: string | null;
  readonly club: { readonly slug: string; readonly name: string } | null;
  readonly reporterName: string | null;
  readonly filedAt: string | null;
  readonly confidence: Confidence | null;
  readonly basis: readonly ConfidenceBasis[];
  readonly publishedAt: string | null;
  readonly history: readonly PublicationView[];
  /** Number of the report this one was merged into. */
  readonly mergedInto: string | null;
  readonly retraction: { readonly at: string; readonly reason: string } | null;
  readonly mine: boolean;
}

/** `GET /api/my/reports`. */
export interface MyReport {
  readonly number: string;
  readonly title: string;
  readonly state: ReportState;
  readonly inReview: boolean;
  readonly filedAt: string;
  readonly decidedAt: string | null;
  readonly audience: Audience;
  readonly publishedAudience: Audience | null;
  /** The moderator's words with the last decision, without a name. */
  readonly lastReason: string | null;
  readonly photos: readonly Omit<PlacedPhotoView, 'caption'>[];
}

/** `GET /api/my/reports/:number/content`: what was filed, to be changed after a return. */
export interface MyReportContent {
  readonly content: ReportContent;
  readonly rowVersion: number;
  readonly version: number;
}

/** `PUT /api/my/reports/:number/content`. */
export interface ChangeRequest {
  readonly rowVersion: number;
  readonly content: ReportContent;
}
