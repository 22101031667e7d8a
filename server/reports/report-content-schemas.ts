import { audiences, disclosures } from '#shared/access/audience';
import { photoSides } from '#shared/reports/photo';
import { channels, componentKinds, conditions, metals, photoLicences, pieceKinds,
  quantities, reportStates, whereaboutsKinds, type DraftContent, type DraftSave, type DraftView,
  type FiledReport, type ReportContent } from '#shared/reports/report-content';
import type { MyReportContent } from '#shared/reports/report-view';
import { z } from '../http/openapi-zod';
import { circle, component, edgePlace, facePlace, measurementUnits } from './report-schemas';

/** Longest account of a find, in characters. */
export const accountLength = 20_000;
/** Largest draft, in bytes of JSON. */
const draftBytes = 256 * 1024;

const words = (most: number): z.ZodString => z.string().trim().max(most);
const slug = z.string().min(1).max(120);
const quantityValue = z.number().min(0).lt(1e7);

const pin = z.strictObject({
  id: z.uuid(), photoId: z.uuid(), place: z.union([facePlace, edgePlace]), note: words(1000),
});

const photo = z.strictObject({
  photoId: z.uuid(), side: z.enum(photoSides), circle: circle.nullable(),
  uprightDegrees: z.number().min(0).lt(360), caption: words(300),
});

const content = {
  club: slug,
  components: z.array(component).max(componentKinds.length),
  pieceCount: z.int().min(1).max(100_000),
  condition: z.enum(conditions),
  whereabouts: z.enum(whereaboutsKinds),
  photos: z.array(photo).max(24),
  tells: z.array(z.strictObject({
    tellId: slug, note: words(1000), disclosure: z.enum(disclosures), pins: z.array(pin).max(40),
  })).max(60),
  measurements: z.array(z.strictObject({
    quantity: z.enum(quantities), value: quantityValue, unit: z.enum(measurementUnits),
    resolution: quantityValue.gt(0).nullable(),
  })).max(40),
  surfacing: z.strictObject({
    channel: z.enum(channels),
    surfacedOn: z.string().regex(/^\d{4}-(0[1-9]|1[0-2])(-\d\d)?$/),
    country: z.string().regex(/^[A-Z]{2}$/),
    region: words(120), town: words(120), venue: words(300),
    price: z.number().min(0).max(1e12).nullable(),
    currency: z.string().regex(/^[A-Z]{3}$/).nullable(),
  }),
  account: z.string().max(accountLength),
  audience: z.enum(audiences),
  namedClubs: z.array(slug).max(100),
  embargoUntil: z.iso.datetime({ offset: true }).nullable(),
  photoLicence: z.enum(photoLicences),
  authorNamed: z.boolean(),
};

const presentedAs = {
  coinType: slug.nullable(),
  metal: z.enum(metals).nullable(),
  description: words(200),
  year: z.int().min(-1000).max(3000).nullable(),
  mintMark: words(40),
};

/** As it is filed. Paper money passes here, so that it can be refused in words of its own. */
export const filedContent = z.strictObject({
  ...content,
  presentedAs: z.strictObject({ ...presentedAs, kind: z.enum([...pieceKinds, 'paper_money']) }),
}).openapi('FiledContent');
export type FiledContent = z.output<typeof filedContent>;

/** As it is kept. */
export const reportContent = z.strictObject({
  ...content, presentedAs: z.strictObject({ ...presentedAs, kind: z.enum(pieceKinds) }),
}).openapi('ReportContent') satisfies z.ZodType<ReportContent>;

export const fileRequest = z.strictObject({ id: z.uuid(), content: filedContent });
export const filedReport = z.strictObject({
  number: z.string(), state: z.enum(reportStates),
}) satisfies z.ZodType<FiledReport>;
export const changeRequest = z.strictObject({ rowVersion: z.int(), content: filedContent });
export const withdrawalRequest = z.strictObject({ rowVersion: z.int() });
export const myReportContent = z.strictObject({
  content: reportContent, rowVersion: z.int(), version: z.int(),
}) satisfies z.ZodType<MyReportContent>;

const line = z.string().max(4000).optional();
const number = z.number().optional();
const anyNumber = z.number().nullable().optional();

/** Any part of a report, however unfinished: only its shape and size are held to. */
export const draftContent = z.strictObject({
  club: line,
  presentedAs: z.strictObject({
    coinType: z.string().max(120).nullable(), kind: z.enum(pieceKinds),
    metal: z.enum(metals).nullable(), description: z.string().max(4000), year: z.int().nullable(),
    mintMark: z.string().max(400),
  }).partial().optional(),
  components: z.array(component.partial()).max(20).optional(),
  pieceCount: number,
  condition: z.enum(conditions).optional(),
  whereabouts: z.enum(whereaboutsKinds).optional(),
  photos: z.array(z.strictObject({
    photoId: z.uuid(), side: z.enum(photoSides),
    circle: z.strictObject({ x: z.number(), y: z.number(), radius: z.number() }).partial()
      .nullable(),
    uprightDegrees: z.number(), caption: z.string().max(4000),
  }).partial()).max(60).optional(),
  tells: z.array(z.strictObject({
    tellId: z.string().max(120), note: z.string().max(4000), disclosure: z.enum(disclosures),
    pins: z.array(z.strictObject({
      id: z.uuid(), photoId: z.uuid(), note: z.string().max(4000),
      place: z.union([
        z.strictObject({ side: z.enum(['obverse', 'reverse']), clockHours: z.number(),
          radiusFraction: z.number() }).partial(),
        z.strictObject({ side: z.literal('edge'), angleDegrees: z.number(),
          heightFraction: z.number() }).partial(),
      ]),
    }).partial()).max(200),
  }).partial()).max(200).optional(),
  measurements: z.array(z.strictObject({
    quantity: z.enum(quantities), value: z.number(), unit: z.enum(measurementUnits),
    resolution: anyNumber,
  }).partial()).max(100).optional(),
  surfacing: z.strictObject({
    channel: z.enum(channels), surfacedOn: z.string().max(40), country: z.string().max(40),
    region: z.string().max(4000), town: z.string().max(4000), venue: z.string().max(4000),
    price: anyNumber, currency: z.string().max(40).nullable(),
  }).partial().optional(),
  account: z.string().max(100_000).optional(),
  audience: z.enum(audiences).optional(),
  namedClubs: z.array(z.string().max(120)).max(200).optional(),
  embargoUntil: z.string().max(40).nullable().optional(),
  photoLicence: z.enum(photoLicences).optional(),
  authorNamed: z.boolean().optional(),
}).openapi('DraftContent') satisfies z.ZodType<DraftContent>;

export const draftView = z.strictObject({
  id: z.uuid(), revision: z.int(), content: draftContent, updatedAt: z.string(),
}).openapi('Draft') satisfies z.ZodType<DraftView>;

export const draftSave = z.strictObject({
  revision: z.int().min(0),
  content: draftContent.refine((value) => Buffer.byteLength(JSON.stringify(value)) <= draftBytes,
    { error: 'too_long' }),
}) satisfies z.ZodType<DraftSave>;
