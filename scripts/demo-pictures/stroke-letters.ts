/**
 * Letters and figures as strokes in a box of 10 × 14, so that legends can be cut without a font on
 * the machine. Original drawings, plain and wide as engravers cut them.
 */
export const strokeLetters: Readonly<Record<string, string>> = {
  A: 'M0 14L5 0L10 14M2.2 9.2H7.8',
  B: 'M1 0V14M1 0H5C9 0 9 6.6 5 6.6H1M5 6.6C10.4 6.6 10.4 14 5 14H1',
  C: 'M9.4 2.6C6.5-1.6 0.4-.6 .4 7C.4 14.6 6.5 15.6 9.4 11.4',
  D: 'M1 0V14H4C11.6 14 11.6 0 4 0H1',
  E: 'M8.6 0H1V14H8.6M1 6.8H6.8',
  F: 'M8.6 0H1V14M1 6.8H6.8',
  G: 'M9.4 2.6C6.5-1.6 .4-.6 .4 7C.4 14.6 7 15.4 9.4 11.6V7.6H6',
  H: 'M1 0V14M9 0V14M1 6.8H9',
  I: 'M5 0V14M3 0H7M3 14H7',
  J: 'M8 0V10C8 15 2 15 1 11',
  K: 'M1 0V14M9 0L1 8M4 5.4L9.4 14',
  L: 'M1 0V14H8.6',
  M: 'M0 14L1 0L5 9L9 0L10 14',
  N: 'M1 14V0L9 14V0',
  O: 'M5 0C-1.4 0-1.4 14 5 14C11.4 14 11.4 0 5 0',
  P: 'M1 14V0H5C9.8 0 9.8 7.6 5 7.6H1',
  Q: 'M5 0C-1.4 0-1.4 14 5 14C11.4 14 11.4 0 5 0M6 10L9.8 15',
  R: 'M1 14V0H5C9.6 0 9.6 7.2 5 7.2H1M4.6 7.2L9.2 14',
  S: 'M9 2.4C6.6-1.4 .8-.4 1 3.6C1.2 8 9 6 9 10.4C9 15 2.4 15 .6 11.4',
  T: 'M0 0H10M5 0V14',
  U: 'M1 0V9C1 15.6 9 15.6 9 9V0',
  V: 'M0 0L5 14L10 0',
  W: 'M0 0L2.4 14L5 4L7.6 14L10 0',
  X: 'M0 0L10 14M10 0L0 14',
  Y: 'M0 0L5 7L10 0M5 7V14',
  Z: 'M.6 0H9.4L.6 14H9.4',
  '0': 'M5 0C-1 0-1 14 5 14C11 14 11 0 5 0',
  '1': 'M2.4 3L5.4 0V14M2.6 14H8',
  '2': 'M1 3.4C1.6-1.2 9-1 8.8 4C8.6 7.6 2 10 1 14H9.2',
  '3': 'M1 2C3-1 8.6-.6 8.4 3.4C8.2 6.6 4.6 6.6 4.6 6.6C4.6 6.6 9 6.6 9 10.2C9 15 2.4 15 .8 11.6',
  '4': 'M7 14V0L.6 9.8H9.6',
  '5': 'M8.6 0H2L1.4 6.4C4-.0 9.2 5 9 9.4C8.8 15 2.4 15.2 .8 11.8',
  '6': 'M8.4 1.2C2-1.6 .6 6 .8 9.4C1.2 15.6 9 15.2 9 9.8C9 4.6 2 4.6 1 9',
  '7': 'M.8 0H9.2L3.8 14',
  '8': 'M5 0C.6 0 .6 6.6 5 6.6C9.4 6.6 9.4 0 5 0M5 6.6C-.4 6.6-.4 14 5 14C10.4 14 10.4 6.6 5 6.6',
  '9': 'M1.6 12.8C8 15.6 9.4 8 9.2 4.6C8.8-1.6 1-1.2 1 4.2C1 9.4 8 9.4 9 5',
  '·': 'M5 6.4V7.6',
  '-': 'M2 7H8',
};

const boxWidth = 10;
const boxHeight = 14;

/**
 * SVG paths of words along an arc.
 * @param radius of the letters' feet, in units of the coin's radius
 * @param size height of a letter in the same units
 * @param centreDegrees where the middle of the words stands, clockwise from the top
 * @param inward true where the feet point away from the centre, as at the bottom of a coin
 */
export function lettersOnArc(
  words: string, radius: number, size: number, centreDegrees: number, inward = false,
): string {
  const scale = size / boxHeight;
  const advance = (scale * boxWidth * 1.42 * 180) / (radius * Math.PI);
  const start = centreDegrees - ((words.length - 1) / 2) * advance * (inward ? -1 : 1);
  return [...words].map((letter, at) => {
    const path = strokeLetters[letter];
    if (!path) return '';
    const angle = start + at * advance * (inward ? -1 : 1);
    const lift = inward ? radius : -radius - size;
    return `<g transform="rotate(${inward ? angle - 180 : angle}) translate(${
      -(scale * boxWidth) / 2} ${inward ? lift - size : lift}) scale(${scale})">`
      + `<path d="${path}"/></g>`;
  }).join('');
}

/** SVG paths of words on a straight line, centred at (x, y), the top of the letters at y. */
export function lettersOnLine(words: string, x: number, y: number, size: number): string {
  const scale = size / boxHeight;
  const advance = scale * boxWidth * 1.36;
  const left = x - ((words.length - 1) / 2) * advance - (scale * boxWidth) / 2;
  return [...words].map((letter, at) => {
    const path = strokeLetters[letter];
    return path ? `<g transform="translate(${left + at * advance} ${y}) scale(${scale})">`
      + `<path d="${path}"/></g>` : '';
  }).join('');
}
