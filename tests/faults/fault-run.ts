/** `TEST_FAULTS=all` runs everything; else a sample, which another seed draws anew. */
export const isWholeRun = process.env['TEST_FAULTS'] === 'all';

export interface FaultRun {
  readonly rounds: number;
  /** A whole number from 0 to below `limit`, by the seed. */
  below(limit: number): number;
  chance(probability: number): boolean;
  /** Prints figures of the run. */
  report(figures: Readonly<Record<string, number | string>>): void;
}

/** Announces the seed, which `TEST_SEED` repeats. */
export function startFaultRun(name: string, rounds: {
  readonly whole: number; readonly sample: number;
}): FaultRun {
  const seed = Number(process.env['TEST_SEED'] ?? Math.floor(Math.random() * 2 ** 31));
  const chosen = isWholeRun ? rounds.whole : rounds.sample;
  process.stdout.write(`${name}: seed ${seed} (TEST_SEED), ${chosen} rounds\n`);
  const random = mulberry32(seed);
  return {
    rounds: chosen,
    below: (limit) => Math.floor(random() * limit),
    chance: (probability) => random() < probability,
    report: (figures) => {
      const told = Object.entries(figures).map(([what, figure]) => `${what} ${figure}`);
      process.stdout.write(`${name}: ${told.join(', ')}\n`);
    },
  };
}

/** A small generator with a seed (Tommy Ettinger's mulberry32, public domain); 0 to below 1. */
function mulberry32(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
  };
}
