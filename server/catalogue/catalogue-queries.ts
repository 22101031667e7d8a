import type { Page } from '#shared/paging';
import type { CoinTypeSummary, CoinTypeView, IssueView, TaxonomyView,
  TellView } from '#shared/catalogue/coin-type-view';
import { nominalDiameterMillimetres, nominalWeightGrams, standardValues,
  type CoinTypeStandard } from '#shared/coin-types/coin-type-standard';
import type { Transaction } from '../db/database';
import { writeCursor, type CoinTypesCursor, type CoinTypesQuery } from './catalogue-schemas';

interface SummaryRow extends Omit<CoinTypeSummary, 'years' | 'weightGrams'
  | 'diameterMillimetres'> {
  readonly id: string; readonly position: number; readonly rank: number;
  readonly year_from: number | null; readonly year_to: number | null;
  readonly standard: CoinTypeStandard; readonly revision: number;
}

const summaryColumns = `ct.id, ct.slug, ct.name, ct.issuer, ct.issuer_country as "issuerCountry",
  ct.kind, ct.metal, ct.is_demonstration as "isDemonstration", ct.position, cr.revision,
  cr.standard,
  (select min(i.year) from coin_type_issue i where i.coin_type_id = ct.id
     and i.state <> 'never_struck') as year_from,
  (select max(i.year) from coin_type_issue i where i.coin_type_id = ct.id
     and i.state <> 'never_struck') as year_to`;
const currentRevision = `join coin_type_revision cr on cr.coin_type_id = ct.id
  and cr.revision = ct.current_revision`;

/**
 * A page of coin types. With `text`, names that begin so come first, then those with a word that
 * does, then those that are like it.
 */
export async function listCoinTypes(
  trx: Transaction, query: CoinTypesQuery, after: CoinTypesCursor | undefined,
): Promise<Page<CoinTypeSummary>> {
  const text = query.text ?? '';
  const start = `${text.replace(/[\\%_]/g, '\\$&')}%`;
  const conditions = ['ranked.rank is not null'];
  const values: (string | number)[] = [text, start, start, start, text];
  if (query.kind) { conditions.push('ranked.kind = ?'); values.push(query.kind); }
  if (query.metal) { conditions.push('ranked.metal = ?'); values.push(query.metal); }
  if (after) {
    conditions.push('(ranked.rank, ranked.position, ranked.slug) > (?, ?, ?)');
    values.push(...after);
  }
  const { rows }: { rows: SummaryRow[] } = await trx.raw(
    `select ranked.rank, ${summaryColumns} from (
       select ct.*, case when ? = '' then 0 when ct.name ilike ? then 0
           when ct.name || ' ' || ct.issuer ilike '% ' || ? or ct.issuer ilike ? then 1
           when word_similarity(?, ct.name || ' ' || ct.issuer) >= 0.5 then 2 end as rank
         from coin_type ct) ranked
     join coin_type ct on ct.id = ranked.id ${currentRevision}
     where ${conditions.join(' and ')}
     order by ranked.rank, ranked.position, ranked.slug limit ?`, [...values, query.limit + 1]);
  const page = rows.slice(0, query.limit);
  const last = page.at(-1);
  return {
    items: page.map(toSummary),
    next: rows.length > query.limit && last
      ? writeCursor([last.rank, last.position, last.slug]) : null,
  };
}

/** The page of a coin type, all but the count of its reports. */
export async function findCoinType(
  trx: Transaction, slug: string,
): Promise<Omit<CoinTypeView, 'reportCount'> | undefined> {
  const { rows: [row] }: { rows: (SummaryRow & { readonly issues: IssueView[];
    readonly legal: CoinTypeView['legalStatus'] })[] } = await trx.raw(
    `select ${summaryColumns},
       (select coalesce(jsonb_agg(jsonb_build_object('year', i.year, 'mintMark', i.mint_mark,
           'state', i.state, 'knownCount', i.known_count, 'note', i.note, 'source', i.source)
           order by i.year, i.mint_mark, i.state), '[]')
         from coin_type_issue i where i.coin_type_id = ct.id) as issues,
       (select coalesce(jsonb_agg(jsonb_build_object('country', l.country, 'status', l.status,
           'source', l.source, 'sourceKind', l.source_kind) order by l.country), '[]')
         from coin_type_legal_status l where l.coin_type_id = ct.id) as legal
     from coin_type ct ${currentRevision} where ct.slug = ?`, [slug]);
  return row && {
    ...toSummary(row), revision: row.revision, standard: standardValues(row.standard),
    notes: row.standard.notes, issues: row.issues, legalStatus: row.legal,
  };
}

function toSummary(row: SummaryRow): CoinTypeSummary {
  const { slug, name, issuer, issuerCountry, kind, metal, isDemonstration } = row;
  return {
    slug, name, issuer, issuerCountry, kind, metal, isDemonstration,
    years: row.year_from !== null && row.year_to !== null
      ? { from: row.year_from, to: row.year_to } : null,
    weightGrams: nominalWeightGrams(row.standard),
    diameterMillimetres: nominalDiameterMillimetres(row.standard),
  };
}

/** The tells that the actor may know of, with the methods they speak for. */
export async function findTaxonomy(trx: Transaction): Promise<TaxonomyView> {
  const { rows: [row] }: { rows: TaxonomyView[] } = await trx.raw(
    `select
       (select coalesce(jsonb_agg(jsonb_build_object('id', m.id, 'name', m.name)
           order by m.position), '[]') from production_method m) as methods,
       (select coalesce(jsonb_agg(jsonb_build_object('id', g.id, 'seen', g.seen)
           order by g.position), '[]') from genuine_feature g) as "genuineFeatures",
       (select coalesce(jsonb_agg(jsonb_build_object('id', t.id, 'name', t.name, 'seen', t.seen,
           'place', t.place, 'form', t.form, 'disclosure', t.disclosure,
           'methods', (select coalesce(jsonb_agg(jsonb_build_object('id', m.id, 'name', m.name)
               order by m.position), '[]') from production_method m where m.id = any (t.methods)),
           'confusedWith', (select coalesce(jsonb_agg(jsonb_build_object('id', g.id,
               'seen', g.seen) order by g.position), '[]') from genuine_feature g
               where g.id = any (t.confused_with))) order by t.position), '[]')
         from tell t) as tells`);
  return row ?? { methods: [], tells: [] satisfies TellView[], genuineFeatures: [] };
}
