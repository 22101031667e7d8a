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
    // At the third figure of the date, and in the field behind the fourth.
    return [{ kind, clockHours: 5.87, radiusFraction: 0.82 },
      { kind, clockHours: 5.24, radiusFraction: 0.79 }];
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
  /** How far it lies beside the mark's place, across its length. */
  readonly aside?: number;
  /** The part of the width that is lost towards the far end. */
  readonly taper?: number;
}

/** Beside each other as a hand cuts them: distance aside, half length, lean. */
const toolStrokes: readonly (readonly [aside: number, length: number, lean: number])[] = [
  [-0.036, 0.022, 20], [-0.023, 0.058, 27], [-0.016, 0.018, 37], [-0.004, 0.064, 30],
  [0.009, 0.030, 23], [0.015, 0.052, 34], [0.033, 0.020, 41]];

function shapesOf({ kind, clockHours }: PlacedMark, rank: number): readonly Shape[] {
  const bold = 1 - 0.06 * Math.min(rank, 8);
  const lean = (clockHours * 211) % 180;
  switch (kind) {
    case 'pit': return [{ width: 0.0155 * bold, length: 0, height: -0.024 * bold, lean }];
    case 'lump': return [{ width: 0.0175 * bold, length: 0, height: 0.022 * bold, lean }];
    case 'spike': return [{ width: 0.0135, length: 0.045 + 0.03 * bold, height: 0.017 * bold,
      lean, taper: 0.8 }];
    // The scraped hollow, then the strokes of the tool beside each other.
    case 'tooled': return [{ width: 0.062, length: 0.012, height: -0.0065, lean: 90 },
      ...toolStrokes.map(([aside, length, strokeLean]) => ({ width: 0.0036, height: -0.0036,
        length, lean: strokeLean, aside }))];
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
      const offset = (shape.aside ?? 0) * radius;
      const reach = Math.ceil(width * 2.2 + length + Math.abs(offset));
      for (let down = -reach; down <= reach; down++) {
        for (let across = -reach; across <= reach; across++) {
          const at = Math.round(y + down) * size + Math.round(x + across);
          if (at < 0 || at >= heights.length) continue;
          const along = across * Math.cos(lean) + down * Math.sin(lean);
          const aside = -across * Math.sin(lean) + down * Math.cos(lean) - offset;
          const beyond = Math.max(0, Math.abs(along) - length);
          const part = length > 0 ? Math.min(1, Math.max(0, (along / length + 1) / 2)) : 0;
          const here = Math.max(1, width * (1 - (shape.taper ?? 0) * part));
          const far = (beyond * beyond + aside * aside) / (here * here);
          heights[at] = (heights[at] ?? 0) + shape.height * radius * Math.exp(-far * far);
        }
      }
    }
  }
}
