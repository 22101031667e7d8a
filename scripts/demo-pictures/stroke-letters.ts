/** A letter in a box 14 high, as strokes of two weights, filled bowls and feet (serifs). */
interface Glyph {
  readonly width: number;
  /** Filled shapes, one path each; holes by the even-odd rule. */
  readonly fill?: readonly string[];
  readonly thick?: string;
  readonly thin?: string;
  /** Strokes between the two weights: the figures' and the S's curves. */
  readonly even?: string;
  /** Where serifs stand: x, and the top (0) or the bottom (14) of the letter. */
  readonly feet?: readonly (readonly [x: number, y: number])[];
}

const ellipse = (x: number, y: number, rx: number, ry: number): string =>
  `M${x - rx} ${y}A${rx} ${ry} 0 1 0 ${x + rx} ${y}A${rx} ${ry} 0 1 0 ${x - rx} ${y}Z`;
/** A bowl with stress: thick at the sides, thin above and below. */
const ring = (x: number, y: number, rx: number, ry: number, side = 2.3): string =>
  ellipse(x, y, rx, ry) + ellipse(x, y, rx - side, ry - 1);
const crescent = 'M8.8 3.6C7.6-1.2 .2-1.8 .2 7C.2 15.6 7.8 15.4 9.3 10.4L8.5 10.2'
  + 'C7.6 13.8 2.7 14.2 2.7 7C2.7-.2 7.2 .2 8 3.8Z';
const bowl = 'M1.4 0H5.2C10.6 0 10.6 7.9 5.2 7.9H3.2V7H4.8C8 7 8 .9 4.8 .9H3.2V4Z';
const zero = ring(4.8, 7, 4.5, 7.3);

const glyphs: Readonly<Record<string, Glyph>> = {
  A: { width: 10.4, thick: 'M4.9-.2L8.8 14', thin: 'M5.2 0L1.5 14M2.8 9H7.4',
    feet: [[1.5, 14], [8.9, 14]] },
  B: { width: 9.6, thick: 'M2.2 0V14', feet: [[1.4, 0], [1.4, 14]], fill: [
    'M2 0H4.8C9.4 0 9.4 7.1 4.8 7.1H3V6.2H4.4C7 6.2 7 .9 4.4 .9H2Z',
    'M2 6.3H5C10.6 6.3 10.6 14 5 14H2V13H4.6C7.9 13 7.9 7.2 4.6 7.2H2Z'] },
  C: { width: 9.8, fill: [crescent], thin: 'M8.9-.2V4' },
  D: { width: 10.6, thick: 'M2.2 0V14', feet: [[1.4, 0], [1.4, 14]],
    fill: ['M2 0H4.6C12.4 0 12.4 14 4.6 14H2V13H4.4C9.2 13 9.2 1 4.4 1H2Z'] },
  E: { width: 9, thick: 'M2.2 0V14', thin: 'M2 .6H8M2 6.8H6.2M2 13.4H8.4M7.8 0V3.2M6.2 5V8.6'
    + 'M8.2 14V10.6', feet: [[1.6, 0], [1.6, 14]] },
  F: { width: 8.6, thick: 'M2.2 0V14', thin: 'M2 .6H8M2 7H6.2M7.8 0V3.2M6.2 5.2V8.8',
    feet: [[1.6, 0], [2.2, 14]] },
  G: { width: 10.4, fill: [crescent], thin: 'M8.9-.2V4', thick: 'M8.6 8V13.6', feet: [[8.6, 8]] },
  H: { width: 11, thick: 'M2.2 0V14M8.8 0V14', thin: 'M2 6.8H9',
    feet: [[2.2, 0], [2.2, 14], [8.8, 0], [8.8, 14]] },
  I: { width: 4.6, thick: 'M2.3 0V14', feet: [[2.3, 0], [2.3, 14]] },
  J: { width: 6.4, thick: 'M4.2 0V10.4C4.2 13.6 2.6 14.2 .8 13.6', feet: [[4.2, 0]] },
  K: { width: 10.4, thick: 'M2.2 0V14M4.4 6L9 14', thin: 'M8.6 0L2.8 8',
    feet: [[2.2, 0], [2.2, 14], [8.6, 0], [9, 14]] },
  L: { width: 8.8, thick: 'M2.2 0V14', thin: 'M2 13.4H8.2M8 14V10.2',
    feet: [[2.2, 0], [1.6, 14]] },
  M: { width: 12.4, thick: 'M1.8 0L6.2 13M10.6 0V14', thin: 'M1.7 0V14M6.2 13.4L10.4 .2',
    feet: [[1.5, 0], [1.7, 14], [10.8, 0], [10.6, 14]] },
  N: { width: 11, thick: 'M1.8 0L9.2 14', thin: 'M1.8 0V14M9.2 0V14',
    feet: [[1.4, 0], [1.8, 14], [9.2, 0]] },
  O: { width: 10.8, fill: [ring(5.4, 7, 5.2, 7.3, 2.4)] },
  P: { width: 9.2, thick: 'M2.2 0V14', fill: [bowl], feet: [[1.6, 0], [2.2, 14]] },
  Q: { width: 10.8, fill: [ring(5.4, 7, 5.2, 7.3, 2.4)], even: 'M5.4 12C7 14.4 8.4 16 10.8 15.8' },
  R: { width: 10, thick: 'M2.2 0V14M5 7.2L8.8 14', fill: [bowl],
    feet: [[1.6, 0], [2.2, 14], [9.2, 14]] },
  S: { width: 9.2, even: 'M7.8 3.2C6.8-.4 1.4-.2 1.5 3.6C1.6 7.2 8 6.6 8 10.4'
    + 'C8 14.6 2 14.4 1.2 10.6',
    thin: 'M8 0V4M1.1 10.2V14' },
  T: { width: 10, thick: 'M5 0V14', thin: 'M.8 .6H9.2M.9 0V3.6M9.1 0V3.6', feet: [[5, 14]] },
  U: { width: 10.8, thick: 'M2.2 0V8.6C2.2 12.6 3.6 13.6 5.6 13.6',
    thin: 'M5 13.8C8.2 13.8 8.8 11.6 8.8 8.6V0', feet: [[2.2, 0], [8.8, 0]] },
  V: { width: 10.2, thick: 'M1.5 0L5.4 14.2', thin: 'M8.8 0L5.2 14', feet: [[1.5, 0], [8.8, 0]] },
  W: { width: 14, thick: 'M1.4 0L4.6 14.2M6.8 0L10 14.2', thin: 'M4.4 14L7 1M9.8 14L12.6 0',
    feet: [[1.4, 0], [6.8, 0], [12.6, 0]] },
  X: { width: 10.4, thick: 'M1.6 0L8.8 14', thin: 'M8.6 0L1.6 14',
    feet: [[1.6, 0], [8.6, 0], [1.6, 14], [8.8, 14]] },
  Y: { width: 10, thick: 'M1.4 0L5 7.6V14', thin: 'M8.6 0L5 7.6',
    feet: [[1.4, 0], [8.6, 0], [5, 14]] },
  Z: { width: 9.4, thick: 'M7.6 .6L1.8 13.4', thin: 'M1 .6H8.4M1 13.4H8.8M1.1 0V3.2M8.7 14V10.8' },
  0: { width: 9.6, fill: [zero] },
  1: { width: 7, thick: 'M3.8 0V14', thin: 'M3.8 .6L1 2.2', feet: [[3.8, 14]] },
  2: { width: 9, even: 'M1.3 3.8C1.2-.4 7.8-.6 7.6 3.8C7.4 7.2 2.2 10 1.4 13',
    thick: 'M1 12.9H7.8', thin: 'M8 13.8V10.4' },
  3: { width: 9, even: 'M1.3 2.8C2-.4 7.6-.2 7.4 3.6C7.2 6.6 4.4 6.7 3.4 6.7'
    + 'C4.6 6.7 8.2 6.9 8.1 10.3C8 14.4 2 14.4 1 11.2' },
  4: { width: 9.4, thick: 'M6.2 0V14', thin: 'M6.2 .6L1 9.6H9', feet: [[6.2, 14]] },
  5: { width: 9, thick: 'M1.8 1H7.6', thin: 'M2 .6L1.5 6.6',
    even: 'M1.5 6.8C4 3.8 8.2 5.6 8 9.6C7.8 14.4 2 14.4 1 11.4' },
  6: { width: 9.6, fill: [ring(5, 9.6, 4.2, 4.6, 2)], even: 'M1.8 9.6C1.8 4 4.2 .8 8 .6' },
  7: { width: 8.8, thick: 'M.8 1H8.2M7.6 1.2L3.6 14', thin: 'M1 0V3.8' },
  8: { width: 9.6, fill: [ring(4.8, 3.5, 3.7, 3.7, 1.8), ring(4.8, 10.2, 4.3, 4.1, 2)] },
  9: { width: 9.6, fill: [ring(4.8, 4.4, 4.2, 4.6, 2)], even: 'M8 4.4C8 10 5.6 13.2 1.8 13.4' },
  '·': { width: 4, fill: [ellipse(2, 7, 1.3, 1.3)] },
  '-': { width: 6, thick: 'M1 7H5' },
  ' ': { width: 6 },
};

const boxHeight = 14;
/** Space between two letters, in box units. */
const gap = 1.9;

/** The elements of one letter, in the colour of its group. */
function letterShapes({ fill = [], thick, thin, even, feet = [] }: Glyph): string {
  const line = (path: string | undefined, width: number): string => path
    ? `<path d="${path}" fill="none" stroke="currentColor" stroke-width="${width}"/>` : '';
  const bowls = fill.map((path) =>
    `<path d="${path}" fill="currentColor" fill-rule="evenodd"/>`).join('');
  // A serif is a flat foot with small brackets into the stem.
  const serifs = feet.map(([x, y]) => {
    const up = y > 7 ? -1 : 1;
    return `M${x - 2.3} ${y}H${x + 2.3}V${y + 0.8 * up}L${x + 1} ${y + 1.9 * up}H${x - 1}`
      + `L${x - 2.3} ${y + 0.8 * up}Z`;
  }).join('');
  return bowls + line(thick, 2.3) + line(thin, 1.15) + line(even, 1.75)
    + (serifs ? `<path d="${serifs}" fill="currentColor"/>` : '');
}

interface SetLetter {
  readonly glyph: Glyph;
  /** Of the letter's left side from the middle of the words, in box units. */
  readonly left: number;
}

function setWords(words: string): SetLetter[] {
  const letters = [...words].map((letter) => glyphs[letter] ?? { width: 6 });
  const whole = letters.reduce((sum, { width }) => sum + width + gap, -gap);
  let left = -whole / 2;
  return letters.map((glyph) => {
    const placed = { glyph, left };
    left += glyph.width + gap;
    return placed;
  });
}

/**
 * SVG shapes of words along an arc, in `currentColor`.
 * @param radius of the letters' feet, in units of the coin's radius
 * @param size height of a letter in the same units
 * @param centreDegrees where the middle of the words stands, clockwise from the top
 * @param inward true where the feet point away from the centre, as at the bottom of a coin
 */
export function lettersOnArc(
  words: string, radius: number, size: number, centreDegrees: number, inward = false,
): string {
  const scale = size / boxHeight;
  // Letters stand on a chord; measured at mid height they are neither cramped nor loose.
  const middle = radius + (inward ? -size / 2 : size / 2);
  return setWords(words).map(({ glyph, left }) => {
    const turn = (((left + glyph.width / 2) * scale) / middle) * (180 / Math.PI);
    const angle = centreDegrees + (inward ? -turn - 180 : turn);
    const top = inward ? radius - size : -radius - size;
    return `<g transform="rotate(${angle}) translate(${(-glyph.width / 2) * scale} ${top}) scale(${
      scale})">${letterShapes(glyph)}</g>`;
  }).join('');
}

/** SVG shapes of words on a straight line, centred at (x, y), the top of the letters at y. */
export function lettersOnLine(words: string, x: number, y: number, size: number): string {
  const scale = size / boxHeight;
  return setWords(words).map(({ glyph, left }) =>
    `<g transform="translate(${x + left * scale} ${y}) scale(${scale})">${
      letterShapes(glyph)}</g>`).join('');
}
