import type { WatchFilter } from '#shared/watches/watch-filter';
import { z } from '../http/openapi-zod';

const textField = z.string().trim().max(200);
const yearField = z.coerce.number().int().min(-1000).max(3000);

/** A repeatable parameter: given once it comes as text, given twice as a list. */
const values = z.preprocess((value) => typeof value === 'string' ? [value] : value,
  z.array(z.string().min(1).max(120)).max(40).optional());

export const searchQuery = z.strictObject({
  text: textField.optional(),
  coinType: values,
  metal: values,
  kind: values,
  tell: values,
  channel: values,
  country: values,
  confidence: values,
  yearFrom: yearField.optional(),
  yearTo: yearField.optional(),
  /** `1`: search the words as they are, without mending their spelling. */
  exact: z.literal('1').optional(),
  after: z.string().max(300).optional(),
  limit: z.coerce.number().int().min(1).max(50).default(24),
});
export type SearchQuery = z.output<typeof searchQuery>;

export const suggestionQuery = z.strictObject({ text: textField });

/** The part of a query that says what is searched: what a watch saves. */
export function filterOf({ exact, after, limit, ...filter }: SearchQuery): WatchFilter {
  return filter;
}

const cursor = z.tuple([z.iso.datetime(), z.uuid(), z.int().min(0)]);
export interface SearchCursor {
  readonly publishedAt: string;
  readonly reportId: string;
}
/** Where the next page starts; it carries the count along, so that it is made once a search. */
export interface PageCursor extends SearchCursor {
  readonly count: number;
}

/** Undefined where it is not one that this server writes. */
export function readCursor(text: string): PageCursor | undefined {
  try {
    const parsed = cursor.safeParse(JSON.parse(Buffer.from(text, 'base64url').toString()));
    if (!parsed.success) return undefined;
    const [publishedAt, reportId, count] = parsed.data;
    return { publishedAt, reportId, count };
  } catch {
    return undefined;
  }
}

export function writeCursor({ publishedAt, reportId, count }: PageCursor): string {
  return Buffer.from(JSON.stringify([publishedAt, reportId, count])).toString('base64url');
}
