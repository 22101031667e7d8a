import { Confidence, ConfidenceBasis } from '#shared/reports/report-content';
import { DecisionKind } from '#shared/review/review';

/** Tests whose result does not hang on the eye; "confirmed" needs one of them. */
export const objectiveBases: readonly ConfidenceBasis[] = ['weight_outside', 'size_outside',
  'density_outside', 'date_never_struck', 'composition_wrong'];

export function publishes(kind: DecisionKind | null): boolean {
  return kind === 'publish' || kind === 'agree_public';
}

/** What a basis lacks for the confidence it is to carry; the server asks for the same. */
export function basisProblem(
  kind: DecisionKind | null,
  confidence: Confidence | null,
  basis: readonly ConfidenceBasis[],
): 'required' | 'confirmed_needs_piece' | 'confirmed_needs_test' | null {
  if (!publishes(kind)) return null;
  if (!basis.length) return 'required';
  if (confidence !== 'confirmed') return null;
  if (!basis.includes('piece_in_hand')) return 'confirmed_needs_piece';
  return basis.some((each) => objectiveBases.includes(each)) ? null : 'confirmed_needs_test';
}
