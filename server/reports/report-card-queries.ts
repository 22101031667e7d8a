import type { MatchReason } from '#shared/watches/watch-filter';
import type { ReportCard } from '#shared/reports/report-view';
import type { Transaction } from '../db/database';

/** Columns of `visible_report_search` that a card is made of. */
export const cardColumns = ['s.report_id', 's.number', 's.title', 's.coin_type_slug',
  's.coin_type_name', 's.kind', 's.metal', 's.year', 's.mint_mark', 's.confidence', 's.channel',
  's.country', 's.region', 's.surfaced_month', 's.published_at', 's.published_audience',
  's.card'] as const;

export interface CardRow {
  readonly report_id: string;
  readonly number: string;
  readonly title: string;
  readonly coin_type_slug: string | null;
  readonly coin_type_name: string | null;
  readonly kind: ReportCard['kind'];
  readonly metal: string | null;
  readonly year: number | null;
  readonly mint_mark: string | null;
  readonly confidence: ReportCard['confidence'];
  readonly channel: ReportCard['channel'];
  readonly country: string;
  readonly region: string;
  /** `YYYY-MM-DD`, the first of the month. */
  readonly surfaced_month: string;
  readonly published_at: Date;
  readonly published_audience: ReportCard['audience'];
  readonly card: Pick<ReportCard, 'photos' | 'tells' | 'methodId' | 'pieceCount'>;
}

export function toCard(row: CardRow): ReportCard {
  return {
    number: row.number,
    title: row.title,
    coinType: row.coin_type_slug
      ? { slug: row.coin_type_slug, name: row.coin_type_name ?? '' } : null,
    kind: row.kind,
    metal: row.metal,
    year: row.year,
    mintMark: row.mint_mark,
    confidence: row.confidence,
    methodId: row.card.methodId,
    tells: row.card.tells,
    channel: row.channel,
    country: row.country,
    region: row.region,
    surfacedMonth: row.surfaced_month.slice(0, 7),
    publishedAt: row.published_at.toISOString(),
    audience: row.published_audience,
    pieceCount: row.card.pieceCount,
    photos: (['obverse', 'reverse'] as const)
      .flatMap((side) => row.card.photos.find((photo) => photo.side === side) ?? []),
  };
}

/** Cards of those of the reports that the actor may read now, by report id. */
export async function findCards(
  trx: Transaction, reportIds: readonly string[],
): Promise<Map<string, ReportCard>> {
  const rows: CardRow[] = await trx('visible_report_search as s').select(...cardColumns)
    .whereIn('s.report_id', reportIds);
  return new Map(rows.map((row) => [row.report_id, toCard(row)]));
}

/**
 * Names of coin types, tells and countries among the reasons, by `kind value`, as the actor may
 * read them; other values are words of their own.
 */
export async function nameFilterValues(
  trx: Transaction, reasons: readonly MatchReason[],
): Promise<Map<string, string>> {
  const valuesOf = (kind: MatchReason['kind']): string[] =>
    reasons.filter((reason) => reason.kind === kind).map(({ value }) => value);
  const names = new Map<string, string>();
  const types = await trx('coin_type').select('slug', 'name').whereIn('slug', valuesOf('coinType'));
  for (const { slug, name } of types) names.set(`coinType ${slug}`, name);
  const tells = await trx('tell').select('id', 'name').whereIn('id', valuesOf('tell'));
  for (const { id, name } of tells) names.set(`tell ${id}`, name);
  const countries = new Intl.DisplayNames('en', { type: 'region' });
  for (const code of valuesOf('country')) {
    names.set(`country ${code}`, countries.of(code) ?? code);
  }
  return names;
}
