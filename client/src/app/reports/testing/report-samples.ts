import { CoinTypeView } from '#shared/catalogue/coin-type-view';
import { MyReport, ReportCard, ReportSearchAnswer, ReportView } from '#shared/reports/report-view';

/** Wire objects for the specs of this feature; each takes what differs. */

export function aCard(changes: Partial<ReportCard> = {}): ReportCard {
  return {
    number: 'TN-26-00114-3', title: 'Ten marks, transfer dies',
    coinType: { slug: 'quillhaven-ten-marks', name: 'Quillhaven ten marks' }, kind: 'coin',
    metal: 'gold', year: 1904, mintMark: null, confidence: 'probable', methodId: null, tells: [],
    channel: 'coin_show', country: 'CH', region: 'Inland', surfacedMonth: '2026-10',
    publishedAt: '2026-11-27T10:00:00Z', audience: 'public', pieceCount: 1, photos: [],
    ...changes,
  };
}

export function aSearchAnswer(changes: Partial<ReportSearchAnswer> = {}): ReportSearchAnswer {
  return {
    items: [aCard()], next: null, total: { count: 1, more: false },
    facets: {
      coinType: [], metal: [{ value: 'gold', count: 31 }, { value: 'silver', count: 12 }],
      kind: [], tell: [], channel: [], country: [], confidence: [],
    },
    mended: null, number: null, numberMistyped: false, ...changes,
  };
}

export function aReport(changes: Partial<ReportView> = {}): ReportView {
  return {
    number: 'TN-26-00114-3', state: 'published', version: 2, rowVersion: 5,
    title: 'Ten marks, transfer dies',
    presentedAs: {
      coinType: 'quillhaven-ten-marks', kind: 'coin', metal: 'gold', description: '', year: 1904,
      mintMark: '',
    },
    coinType: {
      slug: 'quillhaven-ten-marks', name: 'Quillhaven ten marks', issuer: 'Free Port of Quillhaven',
      diameterMillimetres: 28,
    },
    components: [{ kind: 'piece', judgement: 'false', note: '' }], pieceCount: 1,
    condition: 'little_worn', whereabouts: 'kept_for_study', method: null,
    photos: [{
      id: 'photo-1', width: 1200, height: 1000, side: 'obverse',
      circle: { x: 0.5, y: 0.5, radius: 0.3 }, uprightDegrees: 0, caption: '',
    }],
    tells: [{
      position: 1, tell: { id: 'raised-spike', name: 'Raised spike', seen: 'A thin spike.' },
      note: '', disclosure: 'public',
      pins: [{
        id: 'pin-1', photoId: 'photo-1', note: '', layer: 'reporter',
        place: { side: 'obverse', clockHours: 0.7, radiusFraction: 0.67 },
      }],
    }],
    someTellsHeldBack: false,
    measurements: [{ position: 1, quantity: 'weight', value: 16.08, unit: 'g', resolution: 0.01 }],
    surfacing: {
      channel: 'coin_show', month: '2026-10', country: 'CH', region: 'Inland region',
      priceBand: { low: 250, high: 500, currency: 'CHF' }, detail: null, venue: null,
    },
    accountHtml: '<p>It was weighed the same evening.</p>', askedAudience: null, audience: 'public',
    embargoUntil: null, club: null, reporterName: null, filedAt: null, confidence: 'probable',
    basis: ['photographs', 'weight_outside'], publishedAt: '2026-11-27T10:00:00Z',
    history: [{
      version: 2, audience: 'public', confidence: 'probable', basis: ['photographs'],
      from: '2026-11-27T10:00:00Z', to: null, endedAs: null,
    }],
    mergedInto: null, retraction: null, mine: false, ...changes,
  };
}

export function aCoinType(changes: Partial<CoinTypeView> = {}): CoinTypeView {
  return {
    slug: 'quillhaven-ten-marks', name: 'Quillhaven ten marks', issuer: 'Free Port of Quillhaven',
    issuerCountry: null, kind: 'coin', metal: 'gold', isDemonstration: true,
    years: { from: 1903, to: 1905 }, weightGrams: 16.8, diameterMillimetres: 28, revision: 1,
    standard: [{
      quantity: 'weight', nominal: 16.8, low: 16.7, high: 16.9, unit: 'g', words: '',
      source: 'Coinage Act, s. 4', sourceKind: 'memory', variant: '',
    }],
    notes: [],
    issues: [
      { year: 1903, mintMark: '', state: 'struck', knownCount: null, note: '', source: 'Mint' },
      { year: 1904, mintMark: 'H', state: 'never_struck', knownCount: null, note: '',
        source: 'Mint' },
    ],
    legalStatus: [
      { country: 'CH', status: 'protected', source: 'Penal code', sourceKind: 'memory' },
      { country: 'AT', status: 'protected', source: 'Penal code', sourceKind: 'memory' },
    ],
    reportCount: 1, ...changes,
  };
}

export function aMyReport(changes: Partial<MyReport> = {}): MyReport {
  return {
    number: 'TN-26-00114-3', title: 'Ten marks, transfer dies', state: 'filed', inReview: false,
    filedAt: '2026-11-20T09:00:00Z', decidedAt: null, audience: 'public', publishedAudience: null,
    lastReason: null, photos: [], ...changes,
  };
}
