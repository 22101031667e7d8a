import { CoinTypeView, StandardValue } from '#shared/catalogue/coin-type-view';
import { Condition, Measurement, Quantity } from '#shared/reports/report-content';

import { Answer } from '../ui/answer-chip';

/** A measurement beside the standard it is judged by, all in the standard's unit. */
export interface StandardComparison {
  readonly quantity: Quantity;
  readonly value: number;
  /** Half the instrument's smallest step; 0 where the step is not known. */
  readonly uncertainty: number;
  readonly unit: string;
  readonly nominal: number | null;
  readonly low: number;
  readonly high: number;
  readonly answer: Answer;
  readonly variant: string;
}

// Exact by definition: the grain, the pennyweight of 24 and the troy ounce of 480 grains, the inch.
const inStandardUnit: Readonly<Record<string, { readonly unit: string; readonly factor: number }>> =
  {
    g: { unit: 'g', factor: 1 },
    gr: { unit: 'g', factor: 0.06479891 },
    dwt: { unit: 'g', factor: 1.55517384 },
    'oz t': { unit: 'g', factor: 31.1034768 },
    mm: { unit: 'mm', factor: 1 },
    in: { unit: 'mm', factor: 25.4 },
  };

/**
 * What a measurement says against the limits of its standard. The interval value ± half the
 * resolution (a reading's own rounding, common practice) decides: wholly inside, wholly outside,
 * else it cannot be told. Wear takes weight away, so that a worn piece below the lower limit of
 * weight cannot be told either. Undefined where the standard has no limits for it.
 */
export function compareWithStandard(
  measurement: Measurement,
  type: Pick<CoinTypeView, 'standard'>,
  condition: Condition,
): StandardComparison | undefined {
  const conversion = inStandardUnit[measurement.unit];
  const standard = type.standard.find(
    (row) => row.quantity === measurement.quantity && row.unit === conversion?.unit,
  );
  if (!conversion || !standard || standard.low === null || standard.high === null) return undefined;
  const value = measurement.value * conversion.factor;
  const uncertainty = ((measurement.resolution ?? 0) / 2) * conversion.factor;
  const limits = { low: standard.low, high: standard.high };
  const worn = weightLost(measurement, condition);
  return {
    quantity: measurement.quantity,
    value,
    uncertainty,
    unit: standard.unit,
    nominal: standard.nominal,
    ...limits,
    answer: isAmbiguous(type.standard, standard)
      ? 'cannot_tell'
      : answerOf(value - uncertainty, value + uncertainty, limits, worn),
    variant: standard.variant,
  };
}

function answerOf(
  from: number,
  to: number,
  { low, high }: { readonly low: number; readonly high: number },
  mayHaveLost: boolean,
): Answer {
  if (from >= low && to <= high) return 'within';
  if (from > high) return 'outside';
  if (to < low) return mayHaveLost ? 'cannot_tell' : 'outside';
  return 'cannot_tell';
}

function weightLost({ quantity }: Measurement, condition: Condition): boolean {
  return quantity === 'weight' && condition !== 'little_worn';
}

/** Several variants with limits of their own: which of them holds is not known here. */
function isAmbiguous(rows: readonly StandardValue[], chosen: StandardValue): boolean {
  return rows.some(
    (row) =>
      row !== chosen &&
      row.quantity === chosen.quantity &&
      (row.low !== chosen.low || row.high !== chosen.high),
  );
}
