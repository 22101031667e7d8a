import type { Audience } from '#shared/access/audience';
import type { Channel, Confidence, ConfidenceBasis,
  Measurement } from '#shared/reports/report-content';

/** Clubs of the demonstration; all names are invented. */
export const demoClubs = [
  { slug: 'larkmoor', name: 'Larkmoor Coin Circle', timeZone: 'Europe/London',
    postalAddress: '4 Harbour Row, Larkmoor' },
  { slug: 'saltmarsh', name: 'Saltmarsh Numismatists', timeZone: 'Europe/Amsterdam',
    postalAddress: 'The Old Pumping House, Saltmarsh' },
  { slug: 'ember-vale', name: 'Ember Vale Collectors', timeZone: 'America/Chicago',
    postalAddress: '12 Kiln Lane, Ember Vale' },
] as const;

/** How the false pieces of one story were made, and the marks that all of them share. */
export interface DemoMaker {
  readonly id: string;
  readonly tells: readonly { readonly id: string; readonly note: string }[];
  /** Marks on the false die or mould, by the drawing's own kinds. */
  readonly marks: 'pits' | 'lumps' | 'spikes' | 'tooled' | 'toning' | 'none';
  readonly account: string;
}

export const demoMakers: Readonly<Record<string, DemoMaker>> = {
  cast: { id: 'cast', marks: 'pits',
    tells: [
      { id: 'rounded-pits', note: 'Round pits in the field, the same on every piece seen.' },
      { id: 'granular-field', note: 'The field looks like fine sand under the glass.' },
      { id: 'edge-seam', note: 'A file-smoothed line runs across the reeds.' }],
    account: 'The piece looked right from a step away. Under the glass the field is grainy, and '
      + 'the pits have round floors, as a mould leaves them. The edge was filed where a seam '
      + 'ran.' },
  transfer: { id: 'transfer-die', marks: 'spikes',
    tells: [
      { id: 'die-tool-marks', note: 'A raised spike that no genuine die has.' },
      { id: 'soft-fat-letters', note: 'The letters are thick and their corners round.' },
      { id: 'sharp-rim', note: 'The rim is sharp to the finger.' }],
    account: 'Struck, not cast: the lustre is there, but too even. Raised marks beside the legend '
      + 'stand in the same place as on another piece shown at our last meeting.' },
  lumps: { id: 'cut-die', marks: 'lumps',
    tells: [
      { id: 'eroded-pimples', note: 'Small lumps all over the device.' },
      { id: 'lustre-too-bright', note: 'It shines where it should be worn.' },
      { id: 'dull-ring', note: 'On the fingertip it gives a short, dull tone.' }],
    account: 'Bright as new, yet presented as found in an old purse. The lumps are raised, so they '
      + 'come from the die. It rings short and low.' },
  tooled: { id: 'altered', marks: 'tooled',
    tells: [
      { id: 'tooled-date', note: 'The third figure is cut by hand.' },
      { id: 'retooled', note: 'The field round the date is lower than elsewhere.' }],
    account: 'A genuine piece of a common year, with the date changed to a scarce one. The tool '
      + 'left fine scratches round the figure, and the colour breaks there.' },
  toned: { id: 'doctored', marks: 'toning',
    tells: [
      { id: 'false-toning', note: 'Bands of colour that cross the device without a break.' },
      { id: 'whizzed', note: 'Fine parallel lines from a wire brush.' }],
    account: 'The colours lie on top and do not follow the metal. Under the lamp they stop short '
      + 'at the letters, where a cloth did not reach.' },
  plated: { id: 'plated', marks: 'none',
    tells: [
      { id: 'core-shows', note: 'Grey metal shows through at the rim.' },
      { id: 'wrong-density', note: 'Far too light in water for the metal it claims.' }],
    account: 'Weighed in water it falls far short. At six on the rim the plating is through, and '
      + 'the metal below is grey.' },
};

export type DemoOutcome = 'published' | 'filed' | 'returned' | 'declined' | 'unresolved'
  | 'withdrawn' | 'in_review' | 'retracted' | 'merged';

export interface DemoReport {
  readonly type: string;
  readonly year: number;
  readonly maker: keyof typeof demoMakers;
  /** Pieces of one die share their marks; another number is another die. */
  readonly die: number;
  readonly channel: Channel;
  readonly country: string;
  readonly region: string;
  readonly town: string;
  readonly venue: string;
  readonly price: number | null;
  readonly currency: string | null;
  readonly daysAgo: number;
  readonly outcome: DemoOutcome;
  readonly audience: Audience;
  /** With `public`: whether the second voice has spoken. */
  readonly secondVoice: boolean;
  readonly confidence: Confidence;
  readonly basis: readonly ConfidenceBasis[];
  readonly measurements: readonly Measurement[];
  readonly author: string;
  readonly pieceCount: number;
}

const ivo = 'ivo.tarn@larkmoor.example';
const tamsin = 'tamsin.quay@saltmarsh.example';

const grams = (value: number): Measurement =>
  ({ quantity: 'weight', value, unit: 'g', resolution: 0.01 });
const millimetres = (value: number): Measurement =>
  ({ quantity: 'diameter', value, unit: 'mm', resolution: 0.1 });

interface Story extends Partial<Omit<DemoReport, 'type' | 'year' | 'maker' | 'daysAgo'>> {
  readonly weight?: number;
  readonly diameter?: number;
}

function report(
  type: string, year: number, maker: keyof typeof demoMakers, daysAgo: number, story: Story = {},
): DemoReport {
  const { weight, diameter, ...more } = story;
  const measurements = [...(weight ? [grams(weight)] : []),
    ...(diameter ? [millimetres(diameter)] : [])];
  return {
    type, year, maker, daysAgo, die: 1, channel: 'coin_show', country: 'GB', region: 'north coast',
    town: 'Larkmoor', venue: 'Winter table show, row C', price: null, currency: null,
    outcome: 'published', audience: 'clubs', secondVoice: true, confidence: 'probable',
    basis: ['photographs', 'tells_named'], author: ivo, pieceCount: 1, measurements, ...more,
  };
}

const confirmed = { confidence: 'confirmed',
  basis: ['piece_in_hand', 'weight_outside', 'tells_named'] } as const;
const open = { audience: 'public' } as const;
const money = (price: number, currency: string) => ({ price, currency });

const crown = 'quillhaven-crown';
const marks = 'quillhaven-ten-marks';
const half = 'larkmoor-half-mark';
const penny = 'ember-vale-penny';

/** The year's finds, the oldest first. */
export const demoReports: readonly DemoReport[] = [
  report(crown, 1875, 'cast', 352, { ...open, ...confirmed, weight: 24.1, diameter: 37.4,
    channel: 'inherited_lot', region: 'north coast', ...money(40, 'GBP') }),
  report(penny, 1911, 'tooled', 340, { ...open, channel: 'flea_market', country: 'NL',
    region: 'river delta', author: tamsin, ...money(15, 'EUR') }),
  report(half, 1936, 'toned', 328, { channel: 'online_marketplace', country: 'DE',
    region: 'inland', venue: 'A picture listing, seller not named here', ...money(85, 'EUR') }),
  report(crown, 1882, 'cast', 311, { ...open, weight: 24.4, channel: 'inherited_lot',
    region: 'north coast' }),
  report(marks, 1904, 'transfer', 300, { ...open, ...confirmed, weight: 16.08, author: tamsin,
    country: 'NL', region: 'inland', ...money(380, 'EUR') }),
  report('us-dollar-morgan', 1886, 'lumps', 291, { ...open, channel: 'online_marketplace',
    country: 'US', region: 'Midwest', weight: 24.9, ...money(60, 'USD') }),
  report(penny, 1903, 'cast', 277, { confidence: 'suspected', basis: ['photographs'],
    channel: 'change' }),
  report(crown, 1877, 'lumps', 262, { die: 2, author: tamsin, country: 'NL', channel: 'auction',
    region: 'river delta', weight: 25.4 }),
  report(half, 1928, 'transfer', 250, { ...open, secondVoice: true, author: tamsin,
    country: 'NO', region: 'fjord country', ...money(120, 'NOK') }),
  report(marks, 1901, 'plated', 241, { ...confirmed, weight: 12.2, diameter: 28.1,
    basis: ['piece_in_hand', 'weight_outside', 'density_outside'], channel: 'private_sale' }),
  report(crown, 1873, 'cast', 226, { ...open, weight: 24.2, channel: 'flea_market',
    ...money(25, 'GBP') }),
  report(penny, 1919, 'tooled', 214, { outcome: 'declined', basis: [], author: tamsin }),
  report(penny, 1908, 'cast', 208, { ...open, outcome: 'retracted', channel: 'shop',
    author: tamsin, country: 'NL', region: 'river delta' }),
  report(crown, 1875, 'cast', 205, { outcome: 'merged', channel: 'inherited_lot' }),
  report(half, 1931, 'toned', 203, { channel: 'shop', country: 'FR', region: 'north' }),
  report(crown, 1883, 'transfer', 190, { die: 3, author: tamsin, audience: 'club',
    country: 'NL' }),
  report('gb-sovereign', 1911, 'transfer', 181, { ...open, weight: 7.61, channel: 'shop',
    region: 'south', ...money(310, 'GBP') }),
  report(marks, 1904, 'transfer', 166, { ...open, weight: 16.1, channel: 'coin_show',
    country: 'DE', region: 'inland', ...money(400, 'EUR') }),
  report(penny, 1900, 'cast', 158, { outcome: 'unresolved', basis: [] }),
  report(half, 1934, 'lumps', 149, { weight: 12.1, pieceCount: 6, channel: 'online_marketplace',
    country: 'PL', region: 'north', author: tamsin, ...money(70, 'PLN') }),
  report(crown, 1876, 'cast', 140, { ...open, secondVoice: false, weight: 24.3,
    channel: 'inherited_lot' }),
  report(crown, 1874, 'tooled', 131, { channel: 'auction', ...money(240, 'GBP') }),
  report(marks, 1908, 'transfer', 122, { die: 2, audience: 'named_clubs', author: tamsin,
    country: 'NL' }),
  report(penny, 1913, 'tooled', 113, { ...open, channel: 'online_marketplace', country: 'IE',
    region: 'west', ...money(30, 'EUR') }),
  report(half, 1936, 'toned', 101, { die: 2, channel: 'flea_market', region: 'capital' }),
  report('us-20-saint', 1924, 'transfer', 93, { weight: 33.1, channel: 'auction', country: 'US',
    region: 'Northeast', author: tamsin, ...money(1900, 'USD') }),
  report(crown, 1882, 'cast', 84, { ...open, weight: 24.2, channel: 'inherited_lot',
    region: 'north coast' }),
  report(crown, 1882, 'cast', 76, { ...open, ...confirmed, weight: 24.3, channel: 'shop',
    region: 'north coast', author: tamsin, ...money(45, 'GBP') }),
  report(marks, 1904, 'transfer', 69, { weight: 16.07, author: tamsin, country: 'BE',
    region: 'Flanders', ...money(420, 'EUR') }),
  report(penny, 1905, 'plated', 61, { outcome: 'withdrawn', basis: [] }),
  report(half, 1925, 'transfer', 52, { ...open, channel: 'coin_show', region: 'capital',
    ...money(95, 'GBP') }),
  report(crown, 1878, 'cast', 44, { weight: 24.3, diameter: 37.5, channel: 'inherited_lot',
    author: tamsin, country: 'NL', region: 'river delta' }),
  report(marks, 1906, 'plated', 37, { ...open, ...confirmed, weight: 12.4, channel: 'shop',
    basis: ['piece_in_hand', 'weight_outside'], country: 'AT', region: 'east',
    ...money(350, 'EUR') }),
  report(crown, 1882, 'cast', 30, { ...open, weight: 24.2, channel: 'inherited_lot',
    region: 'north coast', ...money(30, 'GBP') }),
  report(penny, 1911, 'tooled', 24, { ...open, channel: 'online_marketplace', author: tamsin,
    country: 'NL', region: 'river delta', ...money(18, 'EUR') }),
  report(crown, 1882, 'cast', 18, { ...open, ...confirmed, weight: 24.1, pieceCount: 3,
    channel: 'inherited_lot', region: 'north coast' }),
  report(half, 1936, 'toned', 12, { ...open, channel: 'flea_market', region: 'capital',
    ...money(60, 'GBP') }),
  report(marks, 1904, 'transfer', 9, { ...open, weight: 16.09, channel: 'coin_show',
    region: 'inland', ...money(390, 'GBP') }),
  report(crown, 1883, 'cast', 6, { outcome: 'returned', basis: [], weight: 25 }),
  report(crown, 1882, 'cast', 4, { outcome: 'filed', ...open, weight: 24.2, diameter: 37.4,
    channel: 'inherited_lot', author: tamsin, ...money(35, 'GBP') }),
  report(half, 1930, 'toned', 3, { outcome: 'filed', channel: 'online_marketplace',
    country: 'DE', region: 'inland' }),
  report(penny, 1911, 'tooled', 2, { outcome: 'filed', author: tamsin, country: 'NL',
    channel: 'flea_market', ...money(12, 'EUR') }),
  report(marks, 1904, 'transfer', 1, { outcome: 'in_review', weight: 16.1, author: tamsin,
    channel: 'coin_show', ...money(395, 'GBP') }),
  report('bar-silver-1oz', 2019, 'plated', 1, { outcome: 'filed', weight: 29.2,
    channel: 'online_marketplace', country: 'US', region: 'West', ...money(22, 'USD') }),
];
