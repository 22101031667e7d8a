import type { FieldProblem } from '#shared/api-problem';
import type { Disclosure } from '#shared/access/audience';
import type { Measurement, Quantity, ReportContent } from '#shared/reports/report-content';
import { countryCodes } from '#shared/reports/countries';
import { suggestMethods } from '#shared/tells/taxonomy';

/** What the registry knows of the things that a filed content names. */
export interface FilingFacts {
  /** Clubs in which the actor is a member, by slug. */
  readonly memberClubs: ReadonlyMap<string, string>;
  /** Every open club that the content names, by slug. */
  readonly namedClubs: ReadonlyMap<string, string>;
  readonly coinType: { readonly id: string; readonly revision: number;
    readonly name: string } | undefined;
  /** Tells that the actor may name, with the taxonomy's own disclosure and methods. */
  readonly tells: ReadonlyMap<string, { readonly disclosure: Disclosure;
    readonly methods: readonly string[] }>;
  /** The actor's photos that are there. */
  readonly photos: ReadonlySet<string>;
}

const unitsOf: Readonly<Record<Quantity, readonly Measurement['unit'][]>> = {
  weight: ['g', 'gr', 'dwt', 'oz t'],
  weight_in_water: ['g', 'gr', 'dwt', 'oz t'],
  diameter: ['mm', 'in'],
  thickness: ['mm', 'in'],
  water_temperature: ['°C'],
  die_axis: ['°'],
  magnetic: ['1'],
  lowest_tone: ['Hz'],
};

const countries = new Set(countryCodes);
const currencies = new Set(Intl.supportedValuesOf('currency'));
const longestEmbargoYears = 5;

/** Everything that is wrong with what is to be filed, field by field; empty where nothing is. */
export function findFilingProblems(
  content: ReportContent, facts: FilingFacts, now: Date,
): FieldProblem[] {
  const problems: FieldProblem[] = [];
  const refuse = (field: string, code: string): void => {
    problems.push({ field: `content.${field}`, code });
  };
  checkPiece(content, facts, refuse);
  checkPhotosAndTells(content, facts, refuse);
  checkSurfacing(content, now, refuse);
  checkAudience(content, facts, now, refuse);
  content.measurements.forEach(({ quantity, value, unit }, index) => {
    if (!unitsOf[quantity].includes(unit)) refuse(`measurements.${index}.unit`, 'wrong_unit');
    if (quantity === 'magnetic' && value !== 0 && value !== 1) {
      refuse(`measurements.${index}.value`, 'not_one_of');
    }
    if (quantity === 'die_axis' && value >= 360) refuse(`measurements.${index}.value`, 'too_big');
  });
  return problems;
}

type Refuse = (field: string, code: string) => void;

function checkPiece(content: ReportContent, facts: FilingFacts, refuse: Refuse): void {
  if (!facts.memberClubs.has(content.club)) refuse('club', 'not_a_member');
  const { coinType, description } = content.presentedAs;
  if (coinType !== null && !facts.coinType) refuse('presentedAs.coinType', 'unknown');
  if (coinType === null && description === '') refuse('presentedAs.description', 'required');
  const kinds = content.components.map(({ kind }) => kind);
  kinds.forEach((kind, index) => {
    if (kinds.indexOf(kind) !== index) refuse(`components.${index}.kind`, 'repeated');
  });
}

function checkPhotosAndTells(content: ReportContent, facts: FilingFacts, refuse: Refuse): void {
  const sides = new Map(content.photos.map((photo) => [photo.photoId, photo.side]));
  const seen = new Set<string>();
  content.photos.forEach(({ photoId }, index) => {
    if (!facts.photos.has(photoId)) refuse(`photos.${index}.photoId`, 'unknown');
    if (seen.has(photoId)) refuse(`photos.${index}.photoId`, 'repeated');
    seen.add(photoId);
  });
  content.tells.forEach((tell, at) => {
    if (!facts.tells.has(tell.tellId)) refuse(`tells.${at}.tellId`, 'unknown');
    tell.pins.forEach((pin, index) => {
      const field = `tells.${at}.pins.${index}`;
      const side = sides.get(pin.photoId);
      if (side === undefined) refuse(`${field}.photoId`, 'unknown');
      else if (side !== 'detail' && side !== pin.place.side) {
        refuse(`${field}.place.side`, 'other_side');
      }
      if (seen.has(pin.id)) refuse(`${field}.id`, 'repeated');
      seen.add(pin.id);
    });
  });
}

function checkSurfacing({ surfacing }: ReportContent, now: Date, refuse: Refuse): void {
  const { surfacedOn, country, price, currency } = surfacing;
  const day = surfacedOn.length === 7 ? `${surfacedOn}-01` : surfacedOn;
  const date = new Date(`${day}T00:00:00Z`);
  // Somewhere it is tomorrow already.
  const latest = now.getTime() + 24 * 3600 * 1000;
  if (Number.isNaN(date.getTime()) || date.toISOString().slice(0, 10) !== day
      || date.getUTCFullYear() < 1800) {
    refuse('surfacing.surfacedOn', 'not_a_date');
  } else if (date.getTime() > latest) refuse('surfacing.surfacedOn', 'in_the_future');
  if (!countries.has(country)) refuse('surfacing.country', 'unknown');
  if (price !== null && currency === null) refuse('surfacing.currency', 'required');
  if (currency !== null && !currencies.has(currency)) refuse('surfacing.currency', 'unknown');
}

function checkAudience(
  content: ReportContent, facts: FilingFacts, now: Date, refuse: Refuse,
): void {
  const isNamed = content.audience === 'named_clubs';
  if (isNamed && !content.namedClubs.length) refuse('namedClubs', 'required');
  if (!isNamed && content.namedClubs.length) refuse('namedClubs', 'not_with_this_audience');
  content.namedClubs.forEach((slug, index) => {
    if (!facts.namedClubs.has(slug)) refuse(`namedClubs.${index}`, 'unknown');
  });
  if (content.embargoUntil === null) return;
  const latest = new Date(now);
  latest.setUTCFullYear(latest.getUTCFullYear() + longestEmbargoYears);
  if (new Date(content.embargoUntil) > latest) refuse('embargoUntil', 'too_far');
}

/** How it was made, where the tells leave one answer: the one method that all of them speak for. */
export function clearMethod(content: ReportContent, facts: FilingFacts): string | null {
  const tells = content.tells.flatMap(({ tellId }) => {
    const methods = facts.tells.get(tellId)?.methods ?? [];
    return methods.length ? [{ id: tellId, methods }] : [];
  });
  const agreed = suggestMethods(tells).filter(({ speakAgainst }) => speakAgainst.length === 0);
  return agreed.length === 1 ? agreed[0]?.methodId ?? null : null;
}
