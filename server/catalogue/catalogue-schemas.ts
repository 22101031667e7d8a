import type { CoinTypeSummary, CoinTypeView, TaxonomyView } from '#shared/catalogue/coin-type-view';
import { disclosures } from '#shared/access/audience';
import { metals, pieceKinds } from '#shared/reports/report-content';
import { z } from '../http/openapi-zod';

const sourceKind = z.enum(['statute', 'secondary', 'memory']);

const summaryFields = {
  slug: z.string(),
  name: z.string(),
  issuer: z.string(),
  issuerCountry: z.string().nullable(),
  kind: z.enum(pieceKinds),
  metal: z.enum(metals).nullable(),
  isDemonstration: z.boolean(),
  years: z.strictObject({ from: z.int(), to: z.int() }).nullable(),
  weightGrams: z.number().nullable(),
  diameterMillimetres: z.number().nullable(),
};
const summary = z.strictObject(summaryFields).openapi('CoinTypeSummary') satisfies
  z.ZodType<CoinTypeSummary>;

export const coinTypeList = z.strictObject({
  items: z.array(summary), next: z.string().nullable(),
});

export const coinTypeView = z.strictObject({
  ...summaryFields,
  revision: z.int(),
  standard: z.array(z.strictObject({
    quantity: z.string(), nominal: z.number().nullable(), low: z.number().nullable(),
    high: z.number().nullable(), unit: z.string(), words: z.string(), source: z.string(),
    sourceKind, variant: z.string(),
  })),
  notes: z.array(z.string()),
  issues: z.array(z.strictObject({
    year: z.int(), mintMark: z.string(),
    state: z.enum(['struck', 'never_struck', 'none_released', 'few_known', 'proof_only']),
    knownCount: z.int().nullable(), note: z.string(), source: z.string(),
  })),
  legalStatus: z.array(z.strictObject({
    country: z.string(), status: z.string(), source: z.string(), sourceKind,
  })),
  reportCount: z.int(),
}).openapi('CoinType') satisfies z.ZodType<CoinTypeView>;

export const taxonomyView = z.strictObject({
  methods: z.array(z.strictObject({ id: z.string(), name: z.string() })),
  tells: z.array(z.strictObject({
    id: z.string(), name: z.string(), seen: z.string(),
    place: z.enum(['any', 'edge', 'border', 'whole']), form: z.enum(['raised', 'sunk']).nullable(),
    methods: z.array(z.strictObject({ id: z.string(), name: z.string() })),
    confusedWith: z.array(z.strictObject({ id: z.string(), seen: z.string() })),
    disclosure: z.enum(disclosures),
  })),
  genuineFeatures: z.array(z.strictObject({ id: z.string(), seen: z.string() })),
}).openapi('Taxonomy') satisfies z.ZodType<TaxonomyView>;

export const coinTypesQuery = z.strictObject({
  text: z.string().trim().max(120).optional(),
  kind: z.enum(pieceKinds).optional(),
  metal: z.enum(metals).optional(),
  after: z.string().max(400).optional(),
  limit: z.coerce.number().int().min(1).max(50).default(24),
});
export type CoinTypesQuery = z.output<typeof coinTypesQuery>;

export const slugParams = z.object({ slug: z.string().max(120) });

const cursor = z.tuple([z.int(), z.int(), z.string().max(120)]);
export type CoinTypesCursor = z.output<typeof cursor>;

/** Undefined where it is not one that this server writes. */
export function readCursor(text: string): CoinTypesCursor | undefined {
  try {
    return cursor.safeParse(JSON.parse(Buffer.from(text, 'base64url').toString())).data;
  } catch {
    return undefined;
  }
}

export function writeCursor(value: CoinTypesCursor): string {
  return Buffer.from(JSON.stringify(value)).toString('base64url');
}
