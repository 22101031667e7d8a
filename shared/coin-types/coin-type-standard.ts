import type { SourceKind, StandardValue } from '../catalogue/coin-type-view';

export const sourceKinds = ['statute', 'secondary', 'memory'] as const satisfies
  readonly SourceKind[];

/** Where a value comes from: a statute that was read, a secondary source, or memory alone. */
export interface Sourced {
  readonly source: string;
  readonly sourceKind: SourceKind;
}

/** A single figure in `unit`; fineness and other pure numbers have the unit `1`. */
export interface SourcedValue extends Sourced {
  readonly value: number;
  readonly unit: 'g' | 'mm' | '1';
}

/** A range from literature, for a type (or a quantity) without one legal figure. */
export interface SourcedRange extends Sourced {
  readonly low: number;
  readonly high: number;
  readonly unit: 'g' | 'mm' | '1';
}

export interface SourcedText extends Sourced {
  readonly text: string;
}

/**
 * A quantity that may have a nominal figure with the deviation the law allowed a new piece, a
 * range, or both. The deviation is a limit of legal acceptance at the mint, not of genuineness.
 */
export interface QuantityStandard {
  readonly nominal?: SourcedValue;
  /** Allowed on either side of the nominal figure, in the same unit. */
  readonly tolerance?: SourcedValue;
  readonly range?: SourcedRange;
}

export interface WeightStandard extends QuantityStandard {
  /** Below it a piece was no longer legal tender by weight; says nothing on genuineness. */
  readonly leastCurrent?: SourcedValue;
}

export interface CoinTypeSpecification {
  readonly weight?: WeightStandard;
  readonly diameter?: QuantityStandard;
  readonly thickness?: QuantityStandard;
  /** Parts by weight of the precious metal, 0 to 1, unit `1`. */
  readonly fineness?: QuantityStandard;
  readonly composition?: SourcedText;
  readonly edge?: SourcedText;
  readonly dieAxis?: SourcedText;
  readonly mintMarkPlace?: SourcedText;
}

/** Dates for which a specification differs; values it leaves out are those of the type. */
export interface CoinTypeVariant extends CoinTypeSpecification {
  readonly label: string;
  /** Inclusive years; null where still open. */
  readonly from: number;
  readonly to: number | null;
}

/** How far the list of dates and mints of a type can be relied on. */
export interface DateTable extends Sourced {
  /** True where a date that the list lacks was not struck, up to `through`. */
  readonly complete: boolean;
  /** The last year that the list speaks of; null where the type ended for good. */
  readonly through: number | null;
  /** True where the list does not tell mints apart: any mint mark is taken. */
  readonly anyMintMark: boolean;
}

/** What `coin_type_revision.standard` holds. */
export interface CoinTypeStandard extends CoinTypeSpecification {
  readonly variants: readonly CoinTypeVariant[];
  readonly dateTable: DateTable | null;
  readonly notes: readonly string[];
}

/** Weight in grams and diameter in millimetres where there is one figure, else null. */
export function nominalWeightGrams(standard: CoinTypeStandard): number | null {
  return standard.weight?.nominal?.value ?? null;
}
export function nominalDiameterMillimetres(standard: CoinTypeStandard): number | null {
  const diameter = standard.diameter;
  if (diameter?.nominal) return diameter.nominal.value;
  return diameter?.range ? (diameter.range.low + diameter.range.high) / 2 : null;
}

/** The specification that holds for a year: the type's own, with a variant's values over it. */
export function specificationForYear(standard: CoinTypeStandard,
  year: number | null): CoinTypeSpecification {
  const variant = year === null ? undefined
    : standard.variants.find(({ from, to }) => from <= year && (to === null || year <= to));
  return variant ? { ...standard, ...variant } : standard;
}

/** Every value of a standard as one row for a page: the type's own first, then each variant's. */
export function standardValues(standard: CoinTypeStandard): readonly StandardValue[] {
  return [...specificationValues(standard, ''),
    ...standard.variants.flatMap((variant) => specificationValues(variant, variant.label))];
}

function specificationValues(specification: CoinTypeSpecification,
  variant: string): StandardValue[] {
  const { weight, diameter, thickness, fineness } = specification;
  const rows = [
    ...quantityRows('weight', weight, variant),
    ...(weight?.leastCurrent
      ? [figureRow('least_current_weight', weight.leastCurrent, null, variant)] : []),
    ...quantityRows('diameter', diameter, variant),
    ...quantityRows('thickness', thickness, variant),
    ...quantityRows('fineness', fineness, variant),
  ];
  const texts: readonly [string, SourcedText | undefined][] = [
    ['composition', specification.composition], ['edge', specification.edge],
    ['die_axis', specification.dieAxis], ['mint_mark_place', specification.mintMarkPlace]];
  return [...rows, ...texts.flatMap(([quantity, words]) =>
    words ? [textRow(quantity, words, variant)] : [])];
}

function quantityRows(quantity: string, standard: QuantityStandard | undefined,
  variant: string): StandardValue[] {
  if (!standard) return [];
  const { nominal, tolerance, range } = standard;
  return [
    ...(nominal ? [figureRow(quantity, nominal, tolerance ?? null, variant)] : []),
    ...(range ? [{ quantity, nominal: null, low: range.low, high: range.high, unit: range.unit,
      words: '', source: range.source, sourceKind: range.sourceKind, variant }] : []),
  ];
}

function figureRow(quantity: string, nominal: SourcedValue, tolerance: SourcedValue | null,
  variant: string): StandardValue {
  const limit = (sign: 1 | -1) =>
    tolerance ? withoutFloatNoise(nominal.value + sign * tolerance.value) : null;
  return { quantity, nominal: nominal.value, low: limit(-1), high: limit(1), unit: nominal.unit,
    words: '', source: joinSources(nominal, tolerance),
    sourceKind: weakerKind(nominal, tolerance), variant };
}

function textRow(quantity: string, words: SourcedText, variant: string): StandardValue {
  return { quantity, nominal: null, low: null, high: null, unit: '', words: words.text,
    source: words.source, sourceKind: words.sourceKind, variant };
}

function joinSources(nominal: Sourced, tolerance: Sourced | null): string {
  return !tolerance || tolerance.source === nominal.source ? nominal.source
    : `${nominal.source}; limits: ${tolerance.source}`;
}

/** A row is no surer than the weaker of what it was made from. */
function weakerKind(nominal: Sourced, tolerance: Sourced | null): SourceKind {
  if (!tolerance) return nominal.sourceKind;
  return sourceKinds.indexOf(tolerance.sourceKind) > sourceKinds.indexOf(nominal.sourceKind)
    ? tolerance.sourceKind : nominal.sourceKind;
}

/** Catalogue weights carry at most five decimals; six keep them and drop binary noise. */
function withoutFloatNoise(value: number): number {
  return Math.round(value * 1e6) / 1e6;
}
