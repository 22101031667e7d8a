import type { FacetName } from '#shared/reports/report-view';
import { cadences, type WatchFilter, type WatchSave,
  type WatchView } from '#shared/watches/watch-filter';
import { z } from '../http/openapi-zod';

const facet = z.array(z.string().min(1).max(120)).max(50).optional();

const facetShape: Record<FacetName, typeof facet> = {
  coinType: facet, metal: facet, kind: facet, tell: facet, channel: facet, country: facet,
  confidence: facet,
};

export const watchFilter = z.strictObject({
  text: z.string().trim().min(1).max(200).optional(),
  ...facetShape,
  yearFrom: z.int().min(-3000).max(3000).optional(),
  yearTo: z.int().min(-3000).max(3000).optional(),
}).openapi('WatchFilter') satisfies z.ZodType<WatchFilter>;

export const watchParams = z.object({ id: z.uuid() });

export const watchSave = z.strictObject({
  name: z.string().trim().min(1).max(200),
  filter: watchFilter,
  cadence: z.enum(cadences),
  pausedUntil: z.iso.datetime().nullable().optional(),
}) satisfies z.ZodType<WatchSave>;

export const watchView = z.strictObject({
  id: z.uuid(),
  name: z.string(),
  filter: watchFilter,
  cadence: z.enum(cadences),
  createdAt: z.string(),
  pausedUntil: z.string().nullable(),
  nextDigestAt: z.string().nullable(),
}).openapi('Watch') satisfies z.ZodType<WatchView>;

export const watchList = z.strictObject({ items: z.array(watchView) });
export const watchPreview = z.strictObject({ count: z.int(), more: z.boolean() });
export const watchPreviewRequest = z.strictObject({ filter: watchFilter });

export const unsubscribeParams = z.object({ token: z.string().min(1).max(300) });
export const unsubscribeView = z.strictObject({
  watches: z.array(z.strictObject({ name: z.string() })), stopped: z.boolean(),
});
export const oneClickBody = z.strictObject({
  'List-Unsubscribe': z.literal('One-Click'),
});

