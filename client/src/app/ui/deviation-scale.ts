/** The span of a deviation bar and the ticks below it, all in the unit of the measurement. */
export interface DeviationScale {
  readonly from: number;
  readonly to: number;
  readonly ticks: readonly number[];
  readonly decimals: number;
}

/**
 * A span that holds every given figure with a margin of an eighth on both sides, with three to
 * eight ticks at 1, 2 or 5 times a power of ten (common practice).
 */
export function deviationScale(figures: readonly number[]): DeviationScale {
  const low = Math.min(...figures);
  const high = Math.max(...figures);
  // One figure alone, or limits without width, still needs a span to be drawn in.
  const width = high - low || Math.abs(high) * 0.02 || 1;
  const from = low - width / 8;
  const to = high + width / 8;
  const step = niceStep((to - from) / 3);
  const decimals = Math.max(0, -Math.floor(Math.log10(step) + 1e-9));
  const ticks: number[] = [];
  for (let index = Math.ceil(from / step); index * step <= to; index += 1) {
    ticks.push(Number((index * step).toFixed(decimals)));
  }
  return { from, to, ticks, decimals };
}

/** The longest step of 1, 2 or 5 times a power of ten that is no longer than `longest`. */
function niceStep(longest: number): number {
  const power = 10 ** Math.floor(Math.log10(longest));
  const factor = [5, 2].find((candidate) => candidate * power <= longest) ?? 1;
  return factor * power;
}
