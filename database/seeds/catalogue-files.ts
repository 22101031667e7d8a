import { readdir, readFile } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { z } from 'zod';
import { disclosures } from '#shared/access/audience';
import { sourceKinds, type CoinTypeStandard } from '#shared/coin-types/coin-type-standard';
import { metals, pieceKinds } from '#shared/reports/report-content';

const directory = join(dirname(fileURLToPath(import.meta.url)), '..', 'catalogue');

const sourced = { source: z.string().min(1), sourceKind: z.enum(sourceKinds) };
const unit = z.enum(['g', 'mm', '1']);
const value = z.strictObject({ value: z.number().positive(), unit, ...sourced });
const text = z.strictObject({ text: z.string().min(1), ...sourced });
const range = z.strictObject({ low: z.number().positive(), high: z.number().positive(), unit,
  ...sourced }).refine(({ low, high }) => low < high);
const quantity = z.strictObject({ nominal: value.optional(), tolerance: value.optional(),
  range: range.optional() });
const specification = {
  weight: quantity.extend({ leastCurrent: value.optional() }).optional(),
  diameter: quantity.optional(),
  thickness: quantity.optional(),
  fineness: quantity.optional(),
  composition: text.optional(),
  edge: text.optional(),
  dieAxis: text.optional(),
  mintMarkPlace: text.optional(),
};
const year = z.int().min(-800).max(2100);
const standard = z.strictObject({
  ...specification,
  variants: z.array(z.strictObject({ ...specification, label: z.string().min(1), from: year,
    to: year.nullable() })),
  dateTable: z.strictObject({ complete: z.boolean(), through: year.nullable(),
    anyMintMark: z.boolean(), ...sourced }).nullable(),
  notes: z.array(z.string().min(1)),
}) satisfies z.ZodType<CoinTypeStandard>;

const issueState = z.enum(['struck', 'never_struck', 'none_released', 'few_known',
  'proof_only']);
const coinType = z.strictObject({
  slug: z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/),
  kind: z.enum(pieceKinds),
  name: z.string().min(1),
  issuer: z.string().min(1),
  issuerCountry: z.string().regex(/^[A-Z]{2}$/).nullable(),
  metal: z.enum(metals).nullable(),
  standard,
  /** Spans of years, inclusive, struck with a mint mark (empty where there is none). */
  issues: z.array(z.strictObject({ mintMark: z.string(), years: z.array(z.tuple([year, year])),
    state: issueState.default('struck') })),
  /** Pairs of date and mint mark whose state differs from, or adds to, the spans. */
  exceptions: z.array(z.strictObject({ year, mintMark: z.string(), state: issueState,
    knownCount: z.int().min(0).nullable(), note: z.string(), ...sourced })),
  legalStatus: z.array(z.strictObject({ country: z.string().regex(/^[A-Z]{2}$/),
    status: z.enum(['current', 'redeemable', 'obsolete', 'protected', 'not_money']),
    ...sourced })),
});
const coinTypeFile = z.strictObject({ about: z.string(), coinTypes: z.array(coinType).min(1) });
export type CatalogueCoinType = z.output<typeof coinType> & { readonly isDemonstration: boolean };

const named = z.strictObject({ id: z.string(), name: z.string().min(1) });
const tellFile = z.strictObject({
  about: z.string(), ...sourced,
  methods: z.array(named).min(1),
  tells: z.array(named.extend({ seen: z.string().min(1),
    place: z.enum(['any', 'edge', 'border', 'whole']),
    form: z.enum(['raised', 'sunk']).nullable(), methods: z.array(z.string()).min(1),
    confusedWith: z.array(z.string()), disclosure: z.enum(disclosures) })).min(1),
  genuineFeatures: z.array(z.strictObject({ id: z.string(), seen: z.string().min(1) })).min(1),
});
export type CatalogueTells = z.output<typeof tellFile>;

/** The order in which types stand where nothing else decides: well-known ones first. */
const fileOrder = ['united-states', 'united-kingdom', 'euro', 'other-countries',
  'without-one-standard', 'demonstration'];

/** Every coin type of the data files, checked; throws with the file's name where one is wrong. */
export async function readCoinTypes(): Promise<readonly CatalogueCoinType[]> {
  const names = (await readdir(join(directory, 'coin-types')))
    .map((file) => file.replace(/\.json$/, ''));
  const rank = (name: string) => (fileOrder.indexOf(name) + fileOrder.length + 1)
    % (fileOrder.length + 1);
  const ordered = names.sort((a, b) => rank(a) - rank(b) || a.localeCompare(b));
  const files = await Promise.all(ordered.map(async (name) => {
    const { coinTypes } = await readChecked(`coin-types/${name}.json`, coinTypeFile);
    return coinTypes.map((type) => ({ ...type, isDemonstration: name === 'demonstration' }));
  }));
  return files.flat();
}

export async function readTells(): Promise<CatalogueTells> {
  return readChecked('tells.json', tellFile);
}

async function readChecked<T>(file: string, schema: z.ZodType<T>): Promise<T> {
  const content: unknown = JSON.parse(await readFile(join(directory, file), 'utf8'));
  const parsed = schema.safeParse(content);
  if (!parsed.success) throw new Error(`${file}: ${z.prettifyError(parsed.error)}`);
  return parsed.data;
}

export interface CatalogueIssue {
  readonly year: number;
  readonly mintMark: string;
  readonly state: z.output<typeof issueState>;
  readonly knownCount: number | null;
  readonly note: string;
  readonly source: string;
}

/** One row per pair of date and mint mark; an exception takes the place of the span's row. */
export function issueRows(type: CatalogueCoinType): readonly CatalogueIssue[] {
  const rows = new Map<string, CatalogueIssue>();
  for (const { mintMark, years, state } of type.issues) {
    for (const [from, to] of years) {
      for (let each = from; each <= to; each += 1) {
        rows.set(`${each} ${mintMark}`, { year: each, mintMark, state, knownCount: null,
          note: '', source: type.standard.dateTable?.source ?? '' });
      }
    }
  }
  for (const { year: each, mintMark, state, knownCount, note, source } of type.exceptions) {
    rows.set(`${each} ${mintMark}`, { year: each, mintMark, state, knownCount, note, source });
  }
  return [...rows.values()];
}
