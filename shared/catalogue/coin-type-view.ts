import type { Disclosure } from '../access/audience';
import type { Metal, PieceKind } from '../reports/report-content';

export type SourceKind = 'statute' | 'secondary' | 'memory';

/** One row of a standard as the page shows it, with where it comes from. */
export interface StandardValue {
  /** `weight`, `diameter`, `thickness`, `fineness`, `composition`, `edge`, `die_axis`, … */
  readonly quantity: string;
  readonly nominal: number | null;
  /** Limits, where there are any: nominal with its tolerance, or a range from literature. */
  readonly low: number | null;
  readonly high: number | null;
  readonly unit: string;
  /** For quantities said in words (edge, composition, die axis). */
  readonly words: string;
  readonly source: string;
  readonly sourceKind: SourceKind;
  /** Which variant it holds for (`1965-1970, clad`), or empty. */
  readonly variant: string;
}

export interface CoinTypeSummary {
  readonly slug: string;
  readonly name: string;
  readonly issuer: string;
  readonly issuerCountry: string | null;
  readonly kind: PieceKind;
  readonly metal: Metal | null;
  readonly isDemonstration: boolean;
  readonly years: { readonly from: number; readonly to: number } | null;
  readonly weightGrams: number | null;
  readonly diameterMillimetres: number | null;
}

export interface IssueView {
  readonly year: number;
  readonly mintMark: string;
  readonly state: 'struck' | 'never_struck' | 'none_released' | 'few_known' | 'proof_only';
  readonly knownCount: number | null;
  readonly note: string;
  readonly source: string;
}

export interface CoinTypeView extends CoinTypeSummary {
  readonly revision: number;
  readonly standard: readonly StandardValue[];
  readonly notes: readonly string[];
  readonly issues: readonly IssueView[];
  readonly legalStatus: readonly { readonly country: string; readonly status: string;
    readonly source: string; readonly sourceKind: SourceKind }[];
  /** Published reports of this type that the reader may see, counted by the same search. */
  readonly reportCount: number;
}

export interface TellView {
  readonly id: string;
  readonly name: string;
  readonly seen: string;
  readonly place: 'any' | 'edge' | 'border' | 'whole';
  readonly form: 'raised' | 'sunk' | null;
  readonly methods: readonly { readonly id: string; readonly name: string }[];
  readonly confusedWith: readonly { readonly id: string; readonly seen: string }[];
  readonly disclosure: Disclosure;
}

/** `GET /api/tells`. */
export interface TaxonomyView {
  readonly methods: readonly { readonly id: string; readonly name: string }[];
  readonly tells: readonly TellView[];
  readonly genuineFeatures: readonly { readonly id: string; readonly seen: string }[];
}
