import type { HeightMap } from './height-map';
import { seededRandom } from './seeded-random';

export type DieMark = 'pit' | 'lump' | 'spike' | 'tooled' | 'toning';

/** Where a mark of a false die lies, in coin coordinates. */
export interface PlacedMark {
  readonly kind: DieMark;
  readonly clockHours: number;
  readonly radiusFraction: number;
}

const counts: Readonly<Record<DieMark, number>> = { pit: 11, lump: 9, spike: 5, tooled: 2,
  toning: 1 };

/** The same for one die, whatever the light and the turn of the picture; the boldest first. */
export function placeMarks(
  kind: DieMark, seed: number, side: 'obverse' | 'reverse',
): PlacedMark[] {
  const random = seededRandom(seed * 7919 + (side === 'reverse' ? 1 : 0));
  if (kind === 'tooled') {
    return [{ kind, clockHours: 5.72, radiusFraction: 0.82 },
      { kind, clockHours: 5.98, radiusFraction: 0.72 }];
  }
  if (kind === 'toning') return [{ kind, clockHours: 2.3, radiusFraction: 0.6 }];
  const marks: PlacedMark[] = [];
  for (let tries = 0; marks.length < counts[kind] && tries < 400; tries++) {
    const mark = { kind, clockHours: Math.floor(random() * 1200) / 100,
      radiusFraction: Math.round(Math.sqrt(0.06 + random() * 0.62) * 1000) / 1000 };
    // Two marks side by side could not be told apart under a pin.
    if (marks.every((other) => apart(other, mark) > 0.17)) marks.push(mark);
  }
  return marks;
}

function apart(one: PlacedMark, other: PlacedMark): number {
  const between = ((one.clockHours - other.clockHours) * Math.PI) / 6;
  return Math.sqrt(Math.max(0, one.radiusFraction ** 2 + other.radiusFraction ** 2
    - 2 * one.radiusFraction * other.radiusFraction * Math.cos(between)));
}

interface Shape {
  /** Half width, half length and height, in coin radii; height below zero is sunk. */
  readonly width: number;
  readonly length: number;
  readonly height: number;
  /** Degrees, on the coin, along which it is long. */
  readonly lean: number;
}

function shapesOf({ kind, clockHours }: PlacedMark, rank: number): readonly Shape[] {
  const bold = 1 - 0.06 * Math.min(rank, 8);
  const lean = (clockHours * 211) % 180;
  switch (kind) {
    case 'pit': return [{ width: 0.0155 * bold, length: 0, height: -0.024 * bold, lean }];
    case 'lump': return [{ width: 0.0175 * bold, length: 0, height: 0.022 * bold, lean }];
    case 'spike': return [{ width: 0.0085, length: 0.05 + 0.03 * bold, height: 0.017 * bold, lean },
      { width: 0.012, length: 0.01, height: 0.009, lean }];
    // The scraped hollow, then the strokes of the tool beside each other.
    case 'tooled': return [{ width: 0.055, length: 0.02, height: -0.012, lean: 90 },
      ...Array.from({ length: 6 }, (_, at) => ({ width: 0.0042, length: 0.045 + 0.012 * (at % 3),
        height: -0.008, lean: 24 + 9 * at }))];
    case 'toning': return [];
  }
}

/** Sinks or raises the marks in the relief of a coin turned by `turnDegrees`. */
export function cutMarks(
  { size, heights }: HeightMap, marks: readonly PlacedMark[], radius: number, turnDegrees: number,
): void {
  for (const [rank, mark] of marks.entries()) {
    const angle = ((mark.clockHours * 30 + turnDegrees) * Math.PI) / 180;
    const x = size / 2 + mark.radiusFraction * radius * Math.sin(angle);
    const y = size / 2 - mark.radiusFraction * radius * Math.cos(angle);
    for (const shape of shapesOf(mark, rank)) {
      const lean = ((shape.lean + turnDegrees) * Math.PI) / 180;
      const width = Math.max(1.1, shape.width * radius);
      const length = shape.length * radius;
      const reach = Math.ceil(width * 2.2 + length);
      for (let down = -reach; down <= reach; down++) {
        for (let across = -reach; across <= reach; across++) {
          const at = Math.round(y + down) * size + Math.round(x + across);
          if (at < 0 || at >= heights.length) continue;
          const along = across * Math.cos(lean) + down * Math.sin(lean);
          const aside = -across * Math.sin(lean) + down * Math.cos(lean);
          const beyond = Math.max(0, Math.abs(along) - length);
          const far = (beyond * beyond + aside * aside) / (width * width);
          heights[at] = (heights[at] ?? 0) + shape.height * radius * Math.exp(-far * far);
        }
      }
    }
  }
}
