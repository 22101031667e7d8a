import type { Audience, Disclosure } from '../access/audience';
import type { PlacedPhoto } from './photo';

export const pieceKinds = ['coin', 'ancient', 'hammered', 'token', 'medal', 'bar'] as const;
export type PieceKind = (typeof pieceKinds)[number];

export const metals = ['gold', 'silver', 'copper', 'bronze', 'brass', 'nickel', 'cupro_nickel',
  'steel', 'zinc', 'platinum', 'bimetal', 'other'] as const;
export type Metal = (typeof metals)[number];

export const componentKinds = ['piece', 'holder', 'label', 'packaging'] as const;
export type ComponentKind = (typeof componentKinds)[number];
export const judgements = ['false', 'altered', 'genuine', 'cannot_tell', 'not_present'] as const;
export type Judgement = (typeof judgements)[number];

export const conditions = ['little_worn', 'worn', 'mounted', 'holed', 'corroded'] as const;
export type Condition = (typeof conditions)[number];

export const whereaboutsKinds = ['with_owner', 'kept_for_study', 'returned',
  'handed_to_authority', 'destroyed', 'unknown'] as const;
export type Whereabouts = (typeof whereaboutsKinds)[number];

export const channels = ['online_marketplace', 'auction', 'coin_show', 'shop', 'flea_market',
  'private_sale', 'inherited_lot', 'change', 'other'] as const;
export type Channel = (typeof channels)[number];

export const quantities = ['weight', 'diameter', 'thickness', 'weight_in_water',
  'water_temperature', 'die_axis', 'magnetic', 'lowest_tone'] as const;
export type Quantity = (typeof quantities)[number];

export const photoLicences = ['registry_only', 'bulletins_and_exports'] as const;
export type PhotoLicence = (typeof photoLicences)[number];

/** What the piece claims to be. */
export interface PresentedAs {
  /** Slug of a coin type, or null where the catalogue has none and `description` says it. */
  readonly coinType: string | null;
  readonly kind: PieceKind;
  readonly metal: Metal | null;
  /** Free description, at most 200 characters; needed where there is no coin type. */
  readonly description: string;
  readonly year: number | null;
  readonly mintMark: string;
}

export interface Component {
  readonly kind: ComponentKind;
  readonly judgement: Judgement;
  readonly note: string;
}

/** A pin on the face: clock hours 0 ≤ h < 12 from the side's upright, fraction of the radius. */
export interface FacePlace {
  readonly side: 'obverse' | 'reverse';
  readonly clockHours: number;
  readonly radiusFraction: number;
}
/** A pin on the edge: degrees 0 ≤ a < 360, height as a fraction of the thickness. */
export interface EdgePlace {
  readonly side: 'edge';
  readonly angleDegrees: number;
  readonly heightFraction: number;
}
export type PinPlace = FacePlace | EdgePlace;

export interface Pin {
  /** Made by the client, stable over the versions of a report. */
  readonly id: string;
  readonly photoId: string;
  readonly place: PinPlace;
  readonly note: string;
}

export interface ReportTell {
  readonly tellId: string;
  readonly note: string;
  readonly disclosure: Disclosure;
  readonly pins: readonly Pin[];
}

export interface Measurement {
  readonly quantity: Quantity;
  /** In `unit`; for `magnetic` 0 or 1. */
  readonly value: number;
  readonly unit: 'g' | 'gr' | 'dwt' | 'oz t' | 'mm' | 'in' | '°C' | '°' | 'Hz' | '1';
  /** The instrument's smallest step, in `unit`. */
  readonly resolution: number | null;
}

export interface Surfacing {
  readonly channel: Channel;
  /** `YYYY-MM`, or `YYYY-MM-DD` where the day is known (seen in the reporter's club only). */
  readonly surfacedOn: string;
  /** ISO 3166-1 alpha-2. */
  readonly country: string;
  readonly region: string;
  /** Seen in the reporter's club and by moderators. */
  readonly town: string;
  /** Site, shop or show: seen by moderators only. */
  readonly venue: string;
  readonly price: number | null;
  /** ISO 4217; needed with a price. */
  readonly currency: string | null;
}

/** Everything a member files. A draft holds any part of it. */
export interface ReportContent {
  /** Slug of the club it is filed in. */
  readonly club: string;
  readonly presentedAs: PresentedAs;
  readonly components: readonly Component[];
  /** 1, or the number of alike pieces of one lot. */
  readonly pieceCount: number;
  readonly condition: Condition;
  readonly whereabouts: Whereabouts;
  readonly photos: readonly PlacedPhoto[];
  readonly tells: readonly ReportTell[];
  readonly measurements: readonly Measurement[];
  readonly surfacing: Surfacing;
  /** Words of the reporter; simple HTML, sanitised by the server, at most 20,000 characters. */
  readonly account: string;
  readonly audience: Audience;
  /** Slugs; with audience `named_clubs` only. */
  readonly namedClubs: readonly string[];
  /** ISO 8601 instant before which nobody but author and moderators sees it, or null. */
  readonly embargoUntil: string | null;
  readonly photoLicence: PhotoLicence;
  readonly authorNamed: boolean;
}

export type DeepPartial<T> = T extends readonly (infer Item)[] ? readonly DeepPartial<Item>[]
  : T extends object ? { readonly [K in keyof T]?: DeepPartial<T[K]> } : T;
export type DraftContent = DeepPartial<ReportContent>;

export interface DraftView {
  readonly id: string;
  readonly revision: number;
  readonly content: DraftContent;
  readonly updatedAt: string;
}

/** `PUT /api/drafts/:id`; 409 `stale_version` where `revision` is not the stored one (0 = new). */
export interface DraftSave {
  readonly revision: number;
  readonly content: DraftContent;
}

/** `POST /api/reports`: `id` is the draft's, made by the client: sending twice makes one. */
export interface FileRequest {
  readonly id: string;
  readonly content: ReportContent;
}

export interface FiledReport {
  readonly number: string;
  readonly state: ReportState;
}

export const reportStates = ['filed', 'published', 'declined', 'unresolved', 'returned',
  'withdrawn', 'retracted', 'merged', 'withheld'] as const;
export type ReportState = (typeof reportStates)[number];

export const confidences = ['suspected', 'probable', 'confirmed'] as const;
export type Confidence = (typeof confidences)[number];

export const confidenceBases = ['photographs', 'piece_in_hand', 'weight_outside', 'size_outside',
  'density_outside', 'date_never_struck', 'composition_wrong', 'shared_marks',
  'tells_named'] as const;
export type ConfidenceBasis = (typeof confidenceBases)[number];
