import sharp from 'sharp';
import type { SideDesign } from './coin-designs';

/** Heights in pixels of relief over a square picture, row by row. */
export interface HeightMap {
  readonly size: number;
  readonly heights: Float32Array;
}

/** Draws SVG in coin units; one byte of coverage a pixel. */
async function drawMask(
  content: string, size: number, radius: number, turnDegrees: number,
): Promise<Uint8Array> {
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${size}" height="${size}">`
    + `<g color="#fff" transform="translate(${size / 2} ${size / 2}) scale(${radius}) `
    + `rotate(${turnDegrees})">${content}</g></svg>`;
  const { data } = await sharp(Buffer.from(svg)).ensureAlpha().extractChannel(3).raw()
    .toBuffer({ resolveWithObject: true });
  return data;
}

const filled = (content: string): string => `<g fill="#fff">${content}</g>`;
const stroked = (content: string, width: number): string =>
  `<g fill="none" stroke="#fff" stroke-width="${width}" stroke-linecap="round" `
  + `stroke-linejoin="round">${content}</g>`;

const denticles = Array.from({ length: 108 }, (_, at) =>
  `<path d="M-.0125-.955V-.925A.0125 .0125 0 0 0 .0125-.925V-.955Z" transform="rotate(${
    at * 360 / 108})"/>`).join('');

/**
 * The relief of a side. Each shape rises from its edge to its full height over its reach: the
 * device as a dome, its parts upon it, letters and rim with steep sides; fine lines are cut in.
 */
export async function reliefOf(
  design: SideDesign, size: number, radius: number, turnDegrees: number,
): Promise<HeightMap> {
  const [device, parts, flat, cuts] = await Promise.all([
    drawMask(filled(design.device), size, radius, turnDegrees),
    drawMask(filled(design.parts), size, radius, turnDegrees),
    drawMask(stroked(design.lines, 0.015) + filled(design.details) + design.legend
      + filled(denticles) + stroked('<circle r=".972"/>', 0.04), size, radius, turnDegrees),
    drawMask(stroked(design.cuts, 0.011), size, radius, turnDegrees),
  ]);
  const heights = raise(device, size, 0.085 * radius, 0.038 * radius, 0.006 * radius);
  add(heights, raise(parts, size, 0.05 * radius, 0.018 * radius, 0.004 * radius));
  // Coverage smoothed is a steep side with a flat top, without the steps of whole pixels.
  const plain = blur(Float32Array.from(flat), size, Math.max(1, Math.round(0.0036 * radius)));
  for (let at = 0; at < heights.length; at++) {
    const device = heights[at] ?? 0;
    const letter = Math.sin((plain[at] ?? 0) * Math.PI / 510) * 0.0165 * radius;
    if (letter > device) heights[at] = letter;
  }
  const cut = blur(Float32Array.from(cuts), size, Math.max(1, Math.round(0.0024 * radius)));
  for (let at = 0; at < heights.length; at++) {
    heights[at] = (heights[at] ?? 0) - (cut[at] ?? 0) / 255 * 0.011 * radius;
  }
  return { size, heights };
}

function add(heights: Float32Array, more: Float32Array): void {
  for (let at = 0; at < heights.length; at++) heights[at] = (heights[at] ?? 0) + (more[at] ?? 0);
}

/** @param reach from a shape's edge to its full `height`, then smoothed over `soft`; pixels. */
function raise(
  mask: Uint8Array, size: number, reach: number, height: number, soft: number,
): Float32Array {
  const heights = distanceInside(mask, size);
  for (let at = 0; at < heights.length; at++) {
    const distance = heights[at] ?? 0;
    if (distance === 0) continue;
    const part = 1 - Math.min(1, distance / reach);
    heights[at] = Math.sqrt(1 - part * part) * height;
  }
  return blur(heights, size, Math.max(1, Math.round(soft)));
}

/** Two means over 2 × reach + 1 pixels in each direction, close to a bell curve; in place. */
export function blur(values: Float32Array, size: number, reach: number): Float32Array {
  const other = new Float32Array(values.length);
  for (let pass = 0; pass < 2; pass++) {
    meansOfRows(values, other, size, reach);
    meansOfColumns(other, values, size, reach);
  }
  return values;
}

function meansOfRows(
  from: Float32Array, to: Float32Array, size: number, reach: number,
): void {
  const share = 1 / (2 * reach + 1);
  for (let start = 0; start < from.length; start += size) {
    let sum = 0;
    for (let x = 0; x < reach; x++) sum += from[start + x] ?? 0;
    for (let x = 0; x < size; x++) {
      if (x + reach < size) sum += from[start + x + reach] ?? 0;
      to[start + x] = sum * share;
      if (x >= reach) sum -= from[start + x - reach] ?? 0;
    }
  }
}

/** Row by row with a running sum for each column, as memory lies. */
function meansOfColumns(
  from: Float32Array, to: Float32Array, size: number, reach: number,
): void {
  const share = 1 / (2 * reach + 1);
  const sums = new Float64Array(size);
  for (let y = -reach; y < size; y++) {
    const entering = (y + reach) * size;
    const leaving = (y - reach - 1) * size;
    for (let x = 0; x < size; x++) {
      let sum = sums[x] ?? 0;
      if (entering < from.length) sum += from[entering + x] ?? 0;
      if (leaving >= 0) sum -= from[leaving + x] ?? 0;
      sums[x] = sum;
      if (y >= 0) to[y * size + x] = sum * share;
    }
  }
}

/**
 * Distance in pixels of each covered pixel from the nearest uncovered one: along the columns
 * first, then the lower envelope of the parabolas along each row (exact, linear in pixels).
 */
export function distanceInside(mask: Uint8Array, size: number): Float32Array {
  const far = 2 * size;
  const distance = new Float32Array(size * size);
  for (let x = 0; x < size; x++) {
    let reached = far;
    for (let at = x; at < distance.length; at += size) {
      reached = (mask[at] ?? 0) > 127 ? reached + 1 : 0;
      distance[at] = reached;
    }
    reached = far;
    for (let at = distance.length - size + x; at >= 0; at -= size) {
      reached = Math.min(reached + 1, distance[at] ?? 0);
      distance[at] = reached;
    }
  }
  const row = new Float32Array(size);
  const places = new Int32Array(size);
  const borders = new Float32Array(size + 1);
  for (let y = 0; y < size; y++) {
    let any = false;
    for (let x = 0; x < size; x++) {
      const down = distance[y * size + x] ?? 0;
      if (down > 0) any = true;
      row[x] = down * down;
    }
    if (any) lowerEnvelope(row, places, borders, distance, y * size);
  }
  return distance;
}

function lowerEnvelope(
  row: Float32Array, places: Int32Array, borders: Float32Array, distance: Float32Array,
  start: number,
): void {
  const crossing = (a: number, b: number): number =>
    ((row[b] ?? 0) + b * b - (row[a] ?? 0) - a * a) / (2 * (b - a));
  let last = 0;
  places[0] = 0;
  borders[0] = -Infinity;
  for (let x = 1; x < row.length; x++) {
    let border = crossing(places[last] ?? 0, x);
    while (last > 0 && border <= (borders[last] ?? 0)) {
      last--;
      border = crossing(places[last] ?? 0, x);
    }
    last++;
    places[last] = x;
    borders[last] = border;
  }
  let current = 0;
  for (let x = 0; x < row.length; x++) {
    while (current < last && (borders[current + 1] ?? 0) < x) current++;
    const place = places[current] ?? 0;
    distance[start + x] = Math.sqrt((row[place] ?? 0) + (x - place) ** 2);
  }
}
