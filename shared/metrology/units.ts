/**
 * Units of mass and length. The grain is 64.79891 mg exactly and the inch 25.4 mm exactly
 * (NIST Handbook 44, appendix C); a troy ounce is 480 grains, a pennyweight 24.
 */
export const gramsPerGrain = 0.06479891;
export const gramsPerPennyweight = 1.55517384;
export const gramsPerTroyOunce = 31.1034768;
export const millimetresPerInch = 25.4;

export const massUnits = ['g', 'gr', 'dwt', 'oz t'] as const;
export type MassUnit = (typeof massUnits)[number];
export const lengthUnits = ['mm', 'in'] as const;
export type LengthUnit = (typeof lengthUnits)[number];

const gramsIn: Readonly<Record<MassUnit, number>> = { g: 1, gr: gramsPerGrain,
  dwt: gramsPerPennyweight, 'oz t': gramsPerTroyOunce };
const millimetresIn: Readonly<Record<LengthUnit, number>> = { mm: 1, in: millimetresPerInch };

export function toGrams(value: number, unit: MassUnit): number {
  return value * gramsIn[unit];
}
export function fromGrams(grams: number, unit: MassUnit): number {
  return grams / gramsIn[unit];
}
export function toMillimetres(value: number, unit: LengthUnit): number {
  return value * millimetresIn[unit];
}
export function fromMillimetres(millimetres: number, unit: LengthUnit): number {
  return millimetres / millimetresIn[unit];
}

/** Troy ounces of fine metal in a piece of `grams` at `fineness` (0 to 1). */
export function fineTroyOunces(grams: number, fineness: number): number {
  return (grams * fineness) / gramsPerTroyOunce;
}

export interface Quantified<Unit> {
  readonly value: number;
  readonly unit: Unit;
  /** The last decimal place written, in `unit`: 26.70 gives 0.01. */
  readonly resolution: number;
}
export type QuantityProblem = 'not_a_number' | 'negative' | 'unknown_unit' | 'ambiguous';
export type ParsedQuantity<Unit> = { readonly quantity: Quantified<Unit> }
  | { readonly problem: QuantityProblem };

const massNames: Readonly<Record<string, MassUnit>> = { g: 'g', gram: 'g', grams: 'g', gramme: 'g',
  grammes: 'g', gr: 'gr', grain: 'gr', grains: 'gr', dwt: 'dwt', pennyweight: 'dwt',
  pennyweights: 'dwt', 'oz t': 'oz t', ozt: 'oz t', 'troy oz': 'oz t', 'troy ounce': 'oz t',
  'troy ounces': 'oz t' };
const lengthNames: Readonly<Record<string, LengthUnit>> = { mm: 'mm', millimetre: 'mm',
  millimetres: 'mm', millimeter: 'mm', millimeters: 'mm', in: 'in', inch: 'in', inches: 'in',
  '"': 'in', '″': 'in' };

/**
 * Reads `26.7 g`, `412.5gr`, `1 oz t`, or a bare figure in `defaultUnit`. A bare `oz` is refused,
 * since it may mean the avoirdupois ounce. A comma may stand for the decimal point; a comma with
 * three digits behind it could as well part thousands and is refused as ambiguous.
 */
export function parseMass(text: string, defaultUnit: MassUnit): ParsedQuantity<MassUnit> {
  return parseQuantity(text, defaultUnit, massNames);
}
export function parseLength(text: string, defaultUnit: LengthUnit): ParsedQuantity<LengthUnit> {
  return parseQuantity(text, defaultUnit, lengthNames);
}

function parseQuantity<Unit>(text: string, defaultUnit: Unit,
  names: Readonly<Record<string, Unit>>): ParsedQuantity<Unit> {
  const match = /^([-+−]?)(\d+(?:([.,])(\d*))?|[.,]\d+)\s*(.*)$/u.exec(text.trim());
  if (!match) return { problem: 'not_a_number' };
  const [, sign = '', digits = '', separator, decimals = '', unitText = ''] = match;
  if (sign === '-' || sign === '−') return { problem: 'negative' };
  if (/^[\d.,]/.test(unitText)) return { problem: 'not_a_number' };
  if (separator === ',' && decimals.length === 3 && !digits.startsWith('0')) {
    return { problem: 'ambiguous' };
  }
  const name = unitText.toLowerCase().replace(/\s+/g, ' ').replace(/\.$/, '');
  const unit = name === '' ? defaultUnit : Object.hasOwn(names, name) ? names[name] : undefined;
  if (unit === undefined) return { problem: 'unknown_unit' };
  const written = digits.replace(',', '.');
  const places = written.includes('.') ? written.length - written.indexOf('.') - 1 : 0;
  return { quantity: { value: Number(written), unit, resolution: Number(`1e-${places}`) } };
}
