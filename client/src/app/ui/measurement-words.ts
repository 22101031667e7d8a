import { Measurement, Quantity } from '#shared/reports/report-content';

export function quantityWords(value: Quantity): string {
  switch (value) {
    case 'weight':
      return $localize`weight`;
    case 'diameter':
      return $localize`diameter`;
    case 'thickness':
      return $localize`thickness`;
    case 'weight_in_water':
      return $localize`weight in water`;
    case 'water_temperature':
      return $localize`temperature of the water`;
    case 'die_axis':
      return $localize`die axis`;
    case 'magnetic':
      return $localize`drawn by a magnet`;
    case 'lowest_tone':
      return $localize`lowest tone`;
  }
}

/**
 * A measured value with its unit; the decimals are those of the instrument's smallest step, so
 * that 25.40 g from a scale of 0.01 g keeps its zero.
 */
export function measuredWords(measurement: Measurement, locale: string): string {
  const { quantity, value, unit, resolution } = measurement;
  if (quantity === 'magnetic') return value ? $localize`yes` : $localize`no`;
  const decimals = resolution ? decimalsOf(resolution) : 0;
  const figure = value.toLocaleString(locale, {
    minimumFractionDigits: decimals,
    maximumFractionDigits: Math.max(decimals, 4),
  });
  return unit === '1' ? figure : `${figure} ${unit}`;
}

function decimalsOf(step: number): number {
  return Math.min(4, String(step).split('.')[1]?.length ?? 0);
}
