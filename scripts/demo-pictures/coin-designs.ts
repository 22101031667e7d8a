import { lettersOnArc, lettersOnLine } from './stroke-letters';

/** A side of a coin as SVG layers in units of the coin's radius, the centre at (0, 0), y down. */
export interface SideDesign {
  /** Filled shapes of the device, in high relief. */
  readonly device: string;
  /** Stroked lines of the device, in low relief. */
  readonly lines: string;
  /** Stroked letters of the legend. */
  readonly legend: string;
}

export interface CoinDesign {
  readonly metal: 'silver' | 'gold' | 'copper';
  readonly obverse: (year: number) => SideDesign;
  readonly reverse: (year: number) => SideDesign;
}

const heron = {
  device:
    // Body and tail, neck with its bend, head with crest and bill.
    '<path d="M-.30 .02C-.16-.14 .10-.10 .26 .10C.36 .22 .44 .34 .40 .36C.22 .36-.02 .34-.16 .24'
    + 'C-.30 .16-.36 .10-.30 .02Z"/>'
    + '<path d="M-.28 .10C-.40 .00-.34-.12-.22-.22C-.12-.30-.14-.38-.08-.44'
    + 'C-.04-.50 .06-.50 .08-.45'
    + 'L.34-.40L.08-.37C.00-.34-.02-.30-.08-.22C-.16-.12-.22-.06-.12 .06Z"/>'
    + '<path d="M-.06-.47L-.26-.40L-.08-.43Z"/>',
  lines:
    '<path d="M-.04 .32V.60M.10 .32V.60M-.04 .60L-.12 .62M.10 .60L.20 .62"/>'
    + '<path d="M-.52 .62L-.46 .10M-.46 .62L-.42 .20M-.40 .62L-.36 .14M-.34 .62L-.32 .26"/>'
    + '<path d="M.38 .62L.42 .16M.44 .62L.48 .24M.50 .62L.52 .12M.32 .62L.35 .40"/>'
    + '<path d="M-.60 .64H.60M-.05 .02L.30 .26M-.10 .10L.24 .31"/>',
};

const lighthouse = {
  device:
    '<path d="M-.13 .42L-.09-.22H.09L.13 .42Z M-.03-.12V-.04H.03V-.12Z M-.03 .06V.14H.03V.06Z '
    + 'M-.03 .24V.32H.03V.24Z" fill-rule="evenodd"/>'
    + '<path d="M-.14-.28H.14V-.22H-.14Z"/><path d="M-.07-.40H.07V-.29H-.07Z"/>'
    + '<path d="M-.12-.41L0-.56L.12-.41Z"/>',
  lines:
    '<path d="M-.12-.36L-.62-.52M-.12-.34L-.64-.34M-.12-.32L-.58-.18M.12-.36L.62-.52'
    + 'M.12-.34L.64-.34M.12-.32L.58-.18"/>'
    + '<path d="M-.44 .48C-.36 .42-.30 .54-.22 .48C-.14 .42-.08 .54 0 .48C.08 .42 .14 .54 .22 .48'
    + 'C.30 .42 .36 .54 .44 .48"/>'
    + '<path d="M-.36 .56C-.28 .50-.22 .62-.14 .56C-.06 .50 0 .62 .08 .56'
    + 'C.16 .50 .22 .62 .30 .56"/>',
};

const lantern = {
  device:
    '<path d="M-.22-.30H.22L.28 .34H-.28Z M-.13-.20L-.17 .24H.17L.13-.20Z" fill-rule="evenodd"/>'
    + '<path d="M-.28-.32L0-.52L.28-.32Z"/><path d="M-.34 .34H.34V.44H-.34Z"/>'
    + '<path d="M0-.16C.14 .00 .10 .18 0 .20C-.10 .18-.12 .04 0-.16Z"/>',
  lines: '<path d="M-.10-.54C-.10-.68 .10-.68 .10-.54M-.62 .50H.62"/>'
    + '<path d="M-.38-.10L-.56-.16M-.40 .06H-.60M-.38 .22L-.56 .28M.38-.10L.56-.16M.40 .06H.60'
    + 'M.38 .22L.56 .28"/>',
};

function wreath(): string {
  let leaves = '';
  for (let at = 0; at < 9; at++) {
    for (const side of [-1, 1]) {
      const angle = side * (26 + at * 16.5);
      leaves += `<g transform="rotate(${180 + angle}) translate(0 -.56)">`
        + `<ellipse rx=".032" ry=".09" transform="translate(-.05 0) rotate(-34)"/>`
        + `<ellipse rx=".032" ry=".09" transform="translate(.05 0) rotate(34)"/></g>`;
    }
  }
  return leaves;
}

const starsAt = (...degrees: readonly number[]): string => degrees.map((angle) =>
  `<path transform="rotate(${angle}) translate(0 -.80)" d="M0-.05L.015-.015H.05L.02 .01L.03 .045`
  + 'L0 .024L-.03 .045L-.02 .01L-.05-.015H-.015Z"/>').join('');

const withDate = (shape: typeof heron, legend: string, year: number): SideDesign => ({
  device: shape.device + starsAt(118, 242),
  lines: shape.lines,
  legend: lettersOnArc(legend, 0.765, 0.125, 0)
    + lettersOnArc(String(year), 0.9, 0.15, 180, true),
});

const inWreath = (first: string, second: string): SideDesign => ({
  device: wreath(),
  lines: '<path d="M-.56 0A.56 .56 0 0 0 .56 0"/>',
  legend: lettersOnLine(first, 0, -0.24, 0.2) + lettersOnLine(second, 0, 0.06, 0.16),
});

/** Designs of the invented issuers, by the slug of their coin type. */
export const coinDesigns: Readonly<Record<string, CoinDesign>> = {
  'quillhaven-crown': {
    metal: 'silver',
    obverse: (year) => withDate(heron, 'FREE PORT OF QUILLHAVEN', year),
    reverse: () => inWreath('ONE', 'CROWN'),
  },
  'quillhaven-ten-marks': {
    metal: 'gold',
    obverse: (year) => withDate(heron, 'FREE PORT OF QUILLHAVEN', year),
    reverse: () => ({
      device: lighthouse.device + starsAt(100, 260),
      lines: lighthouse.lines,
      legend: lettersOnArc('TEN MARKS GOLD', 0.765, 0.125, 0)
        + lettersOnArc('QUILLHAVEN', 0.89, 0.125, 180, true),
    }),
  },
  'larkmoor-half-mark': {
    metal: 'silver',
    obverse: (year) => withDate(lighthouse, 'REPUBLIC OF LARKMOOR', year),
    reverse: () => inWreath('HALF', 'MARK'),
  },
  'ember-vale-penny': {
    metal: 'copper',
    obverse: (year) => withDate(lantern, 'EMBER VALE', year),
    reverse: () => inWreath('ONE', 'PENNY'),
  },
};
