import { ReportView } from '#shared/reports/report-view';
import { QueueAnswer, QueueItem, ReviewView } from '#shared/review/review';

// Invented data for specs.

export function queueItem(item: Partial<QueueItem> = {}): QueueItem {
  return {
    number: 'TN-26-00121-K',
    title: 'Quillhaven crown 1887',
    coinType: { slug: 'quillhaven-crown', name: 'Quillhaven crown' },
    club: { slug: 'saltmarsh', name: 'Saltmarsh Numismatists' },
    filedAt: '2026-11-29T10:00:00.000Z',
    version: 1,
    askedAudience: 'clubs',
    flags: [],
    lease: null,
    barred: null,
    photos: [],
    ...item,
  };
}

export function queueAnswer(...items: readonly QueueItem[]): QueueAnswer {
  return { items, next: null, waiting: items.length, oldestFiledAt: items[0]?.filedAt ?? null };
}

export function reportView(report: Partial<ReportView> = {}): ReportView {
  return {
    number: 'TN-26-00121-K', state: 'filed', version: 3, rowVersion: 5,
    title: 'Quillhaven crown 1887',
    presentedAs: { coinType: 'quillhaven-crown', kind: 'coin', metal: 'silver', description: '',
      year: 1887, mintMark: '' },
    coinType: { slug: 'quillhaven-crown', name: 'Quillhaven crown',
      issuer: 'Free Port of Quillhaven', diameterMillimetres: 38.6 },
    components: [{ kind: 'piece', judgement: 'false', note: '' }],
    pieceCount: 1, condition: 'little_worn', whereabouts: 'kept_for_study', method: null,
    photos: [], tells: [], someTellsHeldBack: false,
    measurements: [{ quantity: 'weight', value: 25.4, unit: 'g', resolution: 0.01, position: 1 }],
    surfacing: { channel: 'coin_show', month: '2026-10', country: 'DE', region: 'Saxony',
      priceBand: null, detail: { surfacedOn: '2026-10-14', town: 'Leipzig', price: 180,
        currency: 'EUR' }, venue: 'Harbour Hall fair' },
    accountHtml: '<p>It looked soapy.</p>', askedAudience: 'clubs', audience: null,
    embargoUntil: null, club: { slug: 'saltmarsh', name: 'Saltmarsh Numismatists' },
    reporterName: null, filedAt: '2026-11-29T10:00:00.000Z', confidence: null, basis: [],
    publishedAt: null, history: [], mergedInto: null, retraction: null, mine: false,
    ...report,
  };
}

export function reviewView(
  view: Partial<ReviewView> = {}, report: Partial<ReportView> = {},
): ReviewView {
  return {
    report: reportView(report), lease: null, leaseHeldByOther: false, barred: null,
    stage: 'first', decisions: [],
    reporter: { name: 'Odo Fenwick', filed: 2, published: 1, returned: 1, declined: 0,
      unresolved: 0 },
    namedClubs: [],
    ...view,
  };
}
