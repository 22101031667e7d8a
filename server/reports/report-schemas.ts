import { audiences, disclosures } from '#shared/access/audience';
import { photoSides } from '#shared/reports/photo';
import { channels, componentKinds, conditions, confidenceBases, confidences, judgements, metals,
  pieceKinds, quantities, reportStates, whereaboutsKinds } from '#shared/reports/report-content';
import type { FacetCount, MyReport, ReportCard, ReportSearchAnswer,
  ReportView, SearchSuggestion } from '#shared/reports/report-view';
import { z } from '../http/openapi-zod';

/** What the report routes answer. Strict, so that a field too many fails instead of leaking. */

const instant = z.string().openapi({ format: 'date-time' });
const namedTell = z.strictObject({ id: z.string(), name: z.string() });
const namedCoinType = z.strictObject({ slug: z.string(), name: z.string() });

export const circle = z.strictObject({
  x: z.number().min(-1).max(2), y: z.number().min(-1).max(2), radius: z.number().gt(0).max(2),
});

const cardPhotoFields = {
  id: z.uuid(), width: z.int(), height: z.int(), side: z.enum(photoSides),
  circle: circle.nullable(), uprightDegrees: z.number(),
};
export const cardPhoto = z.strictObject(cardPhotoFields).openapi('CardPhoto');
const placedPhoto = z.strictObject({ ...cardPhotoFields, caption: z.string() });

export const reportCard = z.strictObject({
  number: z.string(),
  title: z.string(),
  coinType: namedCoinType.nullable(),
  kind: z.enum(pieceKinds),
  metal: z.string().nullable(),
  year: z.int().nullable(),
  mintMark: z.string().nullable(),
  confidence: z.enum(confidences),
  methodId: z.string().nullable(),
  tells: z.array(namedTell),
  channel: z.enum(channels),
  country: z.string(),
  region: z.string(),
  surfacedMonth: z.string(),
  publishedAt: instant,
  audience: z.enum(audiences),
  pieceCount: z.int(),
  photos: z.array(cardPhoto),
}).openapi('ReportCard') satisfies z.ZodType<ReportCard>;

const facetCounts = z.array(z.strictObject({ value: z.string(), count: z.int() }) satisfies
  z.ZodType<FacetCount>);

export const reportSearchAnswer = z.strictObject({
  items: z.array(reportCard),
  next: z.string().nullable(),
  total: z.strictObject({ count: z.int(), more: z.boolean() }),
  facets: z.strictObject({
    coinType: facetCounts, metal: facetCounts, kind: facetCounts, tell: facetCounts,
    channel: facetCounts, country: facetCounts, confidence: facetCounts,
  }).nullable(),
  mended: z.strictObject({ from: z.string(), to: z.string() }).nullable(),
  number: z.string().nullable(),
  numberMistyped: z.boolean(),
}).openapi('ReportSearch') satisfies z.ZodType<ReportSearchAnswer>;

export const searchSuggestions = z.strictObject({
  items: z.array(z.strictObject({
    kind: z.enum(['coin_type', 'tell', 'word']), value: z.string(), label: z.string(),
  }) satisfies z.ZodType<SearchSuggestion>),
});

export const facePlace = z.strictObject({
  side: z.enum(['obverse', 'reverse']),
  clockHours: z.number().min(0).lt(12),
  radiusFraction: z.number().min(0).max(1.2),
});
export const edgePlace = z.strictObject({
  side: z.literal('edge'),
  angleDegrees: z.number().min(0).lt(360),
  heightFraction: z.number().min(0).max(1),
});
const pinView = z.strictObject({
  id: z.uuid(), photoId: z.uuid(), place: z.union([facePlace, edgePlace]), note: z.string(),
  layer: z.enum(['reporter', 'moderator']),
});

export const component = z.strictObject({
  kind: z.enum(componentKinds), judgement: z.enum(judgements), note: z.string().max(1000),
});
export const measurementUnits = ['g', 'gr', 'dwt', 'oz t', 'mm', 'in', '°C', '°', 'Hz',
  '1'] as const;

export const reportView = z.strictObject({
  number: z.string(),
  state: z.enum(reportStates),
  version: z.int(),
  rowVersion: z.int(),
  title: z.string(),
  presentedAs: z.strictObject({
    coinType: z.string().nullable(), kind: z.enum(pieceKinds), metal: z.enum(metals).nullable(),
    description: z.string(), year: z.int().nullable(), mintMark: z.string(),
  }),
  coinType: namedCoinType.extend({
    issuer: z.string(), diameterMillimetres: z.number().nullable(),
  }).nullable(),
  components: z.array(component),
  pieceCount: z.int(),
  condition: z.enum(conditions),
  whereabouts: z.enum(whereaboutsKinds),
  method: namedTell.nullable(),
  photos: z.array(placedPhoto),
  tells: z.array(z.strictObject({
    position: z.int(), tell: namedTell.extend({ seen: z.string() }), note: z.string(),
    disclosure: z.enum(disclosures), pins: z.array(pinView),
  })),
  someTellsHeldBack: z.boolean(),
  measurements: z.array(z.strictObject({
    position: z.int(), quantity: z.enum(quantities), value: z.number(),
    unit: z.enum(measurementUnits), resolution: z.number().nullable(),
  })),
  surfacing: z.strictObject({
    channel: z.enum(channels), month: z.string(), country: z.string(), region: z.string(),
    priceBand: z.strictObject({
      low: z.number(), high: z.number(), currency: z.string(),
    }).nullable(),
    detail: z.strictObject({
      surfacedOn: z.string().nullable(), town: z.string(), price: z.number().nullable(),
      currency: z.string().nullable(),
    }).nullable(),
    venue: z.string().nullable(),
  }),
  accountHtml: z.string(),
  askedAudience: z.enum(audiences).nullable(),
  audience: z.enum(audiences).nullable(),
  embargoUntil: instant.nullable(),
  club: z.strictObject({ slug: z.string(), name: z.string() }).nullable(),
  reporterName: z.string().nullable(),
  filedAt: instant.nullable(),
  confidence: z.enum(confidences).nullable(),
  basis: z.array(z.enum(confidenceBases)),
  publishedAt: instant.nullable(),
  history: z.array(z.strictObject({
    version: z.int(), audience: z.enum(audiences), confidence: z.enum(confidences),
    basis: z.array(z.enum(confidenceBases)), from: instant, to: instant.nullable(),
    endedAs: z.string().nullable(),
  })),
  mergedInto: z.string().nullable(),
  retraction: z.strictObject({ at: instant, reason: z.string() }).nullable(),
  mine: z.boolean(),
}).openapi('Report') satisfies z.ZodType<ReportView>;

export const myReports = z.strictObject({
  items: z.array(z.strictObject({
    number: z.string(),
    title: z.string(),
    state: z.enum(reportStates),
    inReview: z.boolean(),
    filedAt: instant,
    decidedAt: instant.nullable(),
    audience: z.enum(audiences),
    publishedAudience: z.enum(audiences).nullable(),
    lastReason: z.string().nullable(),
    photos: z.array(cardPhoto),
  }) satisfies z.ZodType<MyReport>),
  next: z.string().nullable(),
}).openapi('MyReports');
