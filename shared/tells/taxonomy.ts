import type { Disclosure } from '../access/audience';

export const tellPlaces = ['any', 'edge', 'border', 'whole'] as const;
export type TellPlace = (typeof tellPlaces)[number];
/** Whether a mark stands up from the surface or is sunk into it. */
export type TellForm = 'raised' | 'sunk';

export interface ProductionMethod {
  readonly id: string;
  readonly name: string;
}

export interface Tell {
  readonly id: string;
  readonly name: string;
  readonly seen: string;
  readonly place: TellPlace;
  readonly form: TellForm | null;
  /** Ids of the methods that leave it. */
  readonly methods: readonly string[];
  /** Ids of genuine features that look like it. */
  readonly confusedWith: readonly string[];
  readonly disclosure: Disclosure;
}

export interface GenuineFeature {
  readonly id: string;
  readonly seen: string;
}

export interface MethodSuggestion {
  readonly methodId: string;
  /** Ids of tells that this method leaves. */
  readonly speakFor: readonly string[];
  /** Ids of tells that it does not leave. */
  readonly speakAgainst: readonly string[];
}

/**
 * Methods that the tells are consistent with, best first; never a finding. A tell that few
 * methods leave counts for more than one that many leave (common practice, no source).
 */
export function suggestMethods(
  tells: readonly Pick<Tell, 'id' | 'methods'>[]): readonly MethodSuggestion[] {
  const distinct = [...new Map(tells.map((tell) => [tell.id, tell])).values()];
  const methodIds = [...new Set(distinct.flatMap(({ methods }) => methods))];
  const weigh = (methodId: string) => distinct.reduce((sum, { methods }) =>
    sum + (methods.includes(methodId) ? 1 / methods.length : 0), 0);
  return methodIds.map((methodId) => ({
    methodId, weight: weigh(methodId),
    speakFor: distinct.filter(({ methods }) => methods.includes(methodId)).map(({ id }) => id),
    speakAgainst: distinct.filter(({ methods }) => !methods.includes(methodId))
      .map(({ id }) => id),
  })).sort((a, b) => b.speakFor.length - a.speakFor.length || b.weight - a.weight
    || a.methodId.localeCompare(b.methodId))
    .map(({ methodId, speakFor, speakAgainst }) => ({ methodId, speakFor, speakAgainst }));
}

/**
 * Genuine features whose name stands in a note, so that a form can warn before one of them is
 * filed as a tell: `a die crack by the date` names `die-crack`.
 */
export function genuineFeaturesNamed<Feature extends Pick<GenuineFeature, 'id'>>(note: string,
  features: readonly Feature[]): readonly Feature[] {
  const words = ` ${note.toLowerCase().replace(/[^\p{L}\p{N}]+/gu, ' ')} `;
  return features.filter(({ id }) => {
    const name = id.replaceAll('-', ' ');
    return words.includes(` ${name} `) || words.includes(` ${name}s `);
  });
}

/** The widest a tell may be shown: the narrower of the taxonomy's and the reporter's choice. */
export function narrowerDisclosure(a: Disclosure, b: Disclosure): Disclosure {
  if (a === 'moderators' || b === 'moderators') return 'moderators';
  return a === 'clubs' || b === 'clubs' ? 'clubs' : 'public';
}
