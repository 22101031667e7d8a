import sharp from 'sharp';
import type { SideDesign } from './coin-designs';

/** Heights in pixels of relief over a square picture, row by row. */
export interface HeightMap {
  readonly size: number;
  readonly heights: Float32Array;
}

/** Draws an SVG in coin units into a mask of 0 and 1. */
async function drawMask(
  content: string, size: number, radius: number, turnDegrees: number,
): Promise<Uint8Array> {
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${size}" height="${size}">`
    + `<g transform="translate(${size / 2} ${size / 2}) scale(${radius}) rotate(${turnDegrees})">`
    + `${content}</g></svg>`;
  const { data, info } = await sharp(Buffer.from(svg)).flatten({ background: '#000' })
    .greyscale().raw().toBuffer({ resolveWithObject: true });
  const mask = new Uint8Array(size * size);
  for (let at = 0; at < mask.length; at++) mask[at] = (data[at * info.channels] ?? 0) > 110 ? 1 : 0;
  return mask;
}

const filled = (content: string): string => `<g fill="#fff">${content}</g>`;
const stroked = (content: string, width: number): string =>
  `<g fill="none" stroke="#fff" stroke-width="${width}" stroke-linecap="round" `
  + `stroke-linejoin="round">${content}</g>`;

/** Letters are drawn in boxes of their own scale, so their stroke is given in box units. */
const letterStroke = 2.7;

/** The relief of a side: each shape rises from its edge and is flat on top. */
export async function reliefOf(
  design: SideDesign, size: number, radius: number, turnDegrees: number,
): Promise<HeightMap> {
  const denticles = Array.from({ length: 96 }, (_, at) =>
    `<rect x="-.014" y="-.975" width=".028" height=".055" rx=".012" transform="rotate(${
      at * 3.75})"/>`).join('');
  const layers = [
    { content: filled(design.device), reach: 0.075, height: 0.036 },
    { content: stroked(design.lines, 0.022), reach: 0.014, height: 0.012 },
    { content: stroked(design.legend, letterStroke), reach: 0.018, height: 0.018 },
    { content: filled(denticles), reach: 0.014, height: 0.012 },
    { content: stroked('<circle r=".985"/>', 0.036), reach: 0.018, height: 0.024 },
  ];
  const heights = new Float32Array(size * size);
  for (const { content, reach, height } of layers) {
    const distance = distanceInside(await drawMask(content, size, radius, turnDegrees), size);
    for (let at = 0; at < heights.length; at++) {
      const part = Math.min(1, (distance[at] ?? 0) / (reach * radius));
      heights[at] = Math.max(heights[at] ?? 0, Math.sin((part * Math.PI) / 2) * height * radius);
    }
  }
  return { size, heights: smooth(smooth(heights, size), size) };
}

/** The mean of each three by three, so that no step of the distance shows as a facet. */
function smooth(heights: Float32Array, size: number): Float32Array {
  const wide = new Float32Array(heights.length);
  const even = new Float32Array(heights.length);
  const at = (of: Float32Array, index: number): number => of[index] ?? 0;
  for (let i = 1; i < heights.length - 1; i++) {
    wide[i] = (at(heights, i - 1) + at(heights, i) + at(heights, i + 1)) / 3;
  }
  for (let i = size; i < heights.length - size; i++) {
    even[i] = (at(wide, i - size) + at(wide, i) + at(wide, i + size)) / 3;
  }
  return even;
}

/** Distance in pixels of each set pixel from the nearest one that is not; two chamfer passes. */
export function distanceInside(mask: Uint8Array, size: number): Float32Array {
  const far = 1e6;
  const distance = Float32Array.from(mask, (set) => set ? far : 0);
  const diagonal = Math.SQRT2;
  const lower = (at: number, from: number, step: number): void => {
    const reached = (distance[from] ?? far) + step;
    if (reached < (distance[at] ?? far)) distance[at] = reached;
  };
  for (let y = 1; y < size; y++) {
    for (let x = 1; x < size - 1; x++) {
      const at = y * size + x;
      lower(at, at - 1, 1);
      lower(at, at - size, 1);
      lower(at, at - size - 1, diagonal);
      lower(at, at - size + 1, diagonal);
    }
  }
  for (let y = size - 2; y >= 0; y--) {
    for (let x = size - 2; x > 0; x--) {
      const at = y * size + x;
      lower(at, at + 1, 1);
      lower(at, at + size, 1);
      lower(at, at + size + 1, diagonal);
      lower(at, at + size - 1, diagonal);
    }
  }
  return distance;
}
