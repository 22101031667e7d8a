import { heron, lantern, lighthouse, starsAt, wreath, type Device } from './coin-devices';
import { lettersOnArc, lettersOnLine } from './stroke-letters';

/** A side of a coin: its device and what is written round it, in units of the coin's radius. */
export interface SideDesign extends Device {
  readonly legend: string;
}

export interface CoinDesign {
  readonly metal: 'silver' | 'gold' | 'copper';
  readonly obverse: (year: number) => SideDesign;
  readonly reverse: (year: number) => SideDesign;
}

/** The date's feet stand on this circle; a tool that alters it works there. */
const dateRadius = 0.888;

const withDate = (device: Device, legend: string, year: number, stars: number): SideDesign => ({
  ...device,
  details: device.details + starsAt(stars, 360 - stars),
  legend: lettersOnArc(legend, 0.757, 0.122, 0)
    + lettersOnArc(String(year), dateRadius, 0.138, 180, true),
});

const inWreath = (first: string, second: string): SideDesign => ({
  ...wreath,
  details: wreath.details + '<g transform="translate(0 .32)">'
    + '<path d="M-.20 0L-.02-.007V.007ZM.20 0L.02-.007V.007Z"/><circle r=".022"/></g>'
    + '<g transform="translate(0 .30) scale(1.15)">' + starsAt(0) + '</g>',
  legend: lettersOnLine(first, 0, -0.27, 0.21) + lettersOnLine(second, 0, 0.04, 0.165),
});

/** Designs of the invented issuers, by the slug of their coin type. */
export const coinDesigns: Readonly<Record<string, CoinDesign>> = {
  'quillhaven-crown': {
    metal: 'silver',
    obverse: (year) => withDate(heron, 'FREE PORT OF QUILLHAVEN', year, 122),
    reverse: () => inWreath('ONE', 'CROWN'),
  },
  'quillhaven-ten-marks': {
    metal: 'gold',
    obverse: (year) => withDate(heron, 'FREE PORT OF QUILLHAVEN', year, 122),
    reverse: () => ({
      ...lighthouse,
      details: lighthouse.details + starsAt(98, 262),
      legend: lettersOnArc('TEN MARKS GOLD', 0.757, 0.122, 0)
        + lettersOnArc('QUILLHAVEN', 0.882, 0.122, 180, true),
    }),
  },
  'larkmoor-half-mark': {
    metal: 'silver',
    obverse: (year) => withDate(lighthouse, 'REPUBLIC OF LARKMOOR', year, 116),
    reverse: () => inWreath('HALF', 'MARK'),
  },
  'ember-vale-penny': {
    metal: 'copper',
    obverse: (year) => withDate(lantern, 'EMBER VALE', year, 100),
    reverse: () => inWreath('ONE', 'PENNY'),
  },
};
