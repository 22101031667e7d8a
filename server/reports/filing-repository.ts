import type { ReportContent, ReportState, Pin } from '#shared/reports/report-content';
import { priceBand } from '#shared/reports/price-band';
import { narrowerDisclosure } from '#shared/tells/taxonomy';
import type { Transaction } from '../db/database';
import type { FilingFacts } from './filing-policy';

export interface OwnReport {
  readonly id: string;
  readonly number: string;
  readonly state: ReportState;
  readonly club_id: string;
  readonly current_version: number;
  readonly row_version: number;
}

/** Looks up all that a content names, in four statements whatever its size. */
export async function findFilingFacts(
  trx: Transaction, actorId: string, content: ReportContent,
): Promise<FilingFacts> {
  const clubs: { slug: string; id: string; is_member: boolean }[] = await trx('club')
    .select('slug', 'id', trx.raw(`id = any (actor_clubs_as('member')) as is_member`))
    .whereIn('slug', [content.club, ...content.namedClubs]).whereNull('closed_at');
  const coinType = content.presentedAs.coinType === null ? undefined
    : await trx('coin_type').select('id', 'name', 'current_revision as revision')
      .where({ slug: content.presentedAs.coinType }).first();
  const tells = await trx('tell').select('id', 'disclosure', 'methods')
    .whereIn('id', content.tells.map(({ tellId }) => tellId));
  // Held until commit, so that none is removed while it is filed.
  const photos = await trx('photo').select('id')
    .whereIn('id', content.photos.map(({ photoId }) => photoId))
    .where({ owner_id: actorId }).whereNull('removed_at').orderBy('id').forShare();
  return {
    memberClubs: new Map(clubs.filter((each) => each.is_member)
      .map(({ slug, id }) => [slug, id])),
    namedClubs: new Map(clubs.map(({ slug, id }) => [slug, id])),
    coinType,
    tells: new Map(tells.map(({ id, ...tell }) => [id, tell])),
    photos: new Set(photos.map(({ id }) => id)),
  };
}

/** The actor's own report; with `lock`, held until the transaction ends. */
export function findOwnReport(
  trx: Transaction, authorId: string, key: { readonly id: string } | { readonly number: string },
  lock = false,
): Promise<OwnReport | undefined> {
  const query = trx('report').select('id', 'number', 'state', 'club_id', 'current_version',
    'row_version').where({ ...key, author_id: authorId }).first();
  return lock ? query.forUpdate() : query;
}

/** False where the id or the number is taken. */
export async function addReport(trx: Transaction, report: {
  readonly id: string; readonly number: string; readonly authorId: string;
  readonly clubId: string; readonly content: ReportContent;
}): Promise<boolean> {
  const rows = await trx('report').insert({
    id: report.id, number: report.number, author_id: report.authorId, club_id: report.clubId,
    audience: report.content.audience, embargo_until: report.content.embargoUntil,
    author_named: report.content.authorNamed,
  }).onConflict().ignore().returning('id');
  return rows.length > 0;
}

export async function addReaderClubs(
  trx: Transaction, reportId: string, clubIds: readonly string[],
): Promise<void> {
  if (!clubIds.length) return;
  await trx('report_reader_club')
    .insert(clubIds.map((clubId) => ({ report_id: reportId, club_id: clubId })));
}

export async function replaceReaderClubs(
  trx: Transaction, reportId: string, clubIds: readonly string[],
): Promise<void> {
  await trx('report_reader_club').where({ report_id: reportId }).delete();
  await addReaderClubs(trx, reportId, clubIds);
}

export interface NewVersion {
  readonly reportId: string;
  readonly version: number;
  readonly cause: 'filed' | 'changes_made';
  readonly content: ReportContent;
  readonly facts: FilingFacts;
  readonly authorId: string;
  readonly title: string;
  readonly methodId: string | null;
  readonly accountHtml: string;
}

/** A version with everything that hangs on it. */
export async function addVersion(trx: Transaction, wanted: NewVersion): Promise<void> {
  const { content, facts } = wanted;
  const key = { report_id: wanted.reportId, version: wanted.version };
  const { coinType: _slug, ...piece } = content.presentedAs;
  await trx('report_version').insert({
    ...key, cause: wanted.cause, coin_type_id: facts.coinType?.id ?? null,
    coin_type_revision: facts.coinType?.revision ?? null,
    piece: JSON.stringify({ title: wanted.title, ...piece }),
    piece_count: content.pieceCount, condition: content.condition,
    whereabouts: content.whereabouts, method_id: wanted.methodId,
    account_source: content.account, account_html: wanted.accountHtml,
    photo_licence: content.photoLicence,
  });
  await addRows(trx, 'component', content.components.map((each) => ({ ...key, ...each })));
  await addRows(trx, 'report_photo', content.photos.map((photo, position) => ({
    ...key, position, photo_id: photo.photoId, side: photo.side,
    circle: photo.circle && JSON.stringify(photo.circle),
    upright_degrees: turned(photo.uprightDegrees, 360, 2), caption: photo.caption,
  })));
  await addTells(trx, wanted);
  await addRows(trx, 'measurement', content.measurements.map((each, position) => ({
    ...key, position, ...each,
  })));
  await addSurfacing(trx, key, content);
}

async function addTells(trx: Transaction, wanted: NewVersion): Promise<void> {
  const key = { report_id: wanted.reportId, version: wanted.version };
  const tells = wanted.content.tells.map((tell, position) => ({
    ...tell, position,
    disclosure: narrowerDisclosure(tell.disclosure,
      wanted.facts.tells.get(tell.tellId)?.disclosure ?? 'moderators'),
  }));
  await addRows(trx, 'report_tell', tells.map((tell) => ({
    ...key, position: tell.position, tell_id: tell.tellId, note: tell.note,
    disclosure: tell.disclosure,
  })));
  await addRows(trx, 'pin', tells.flatMap((tell) => tell.pins.map((pin) => ({
    ...key, pin_id: pin.id, tell_position: tell.position, photo_id: pin.photoId,
    layer: 'reporter', ...placeColumns(pin), note: pin.note, disclosure: tell.disclosure,
    placed_by: wanted.authorId,
  }))));
}

function placeColumns({ place }: Pin): Readonly<Record<string, string | number | null>> {
  return place.side === 'edge' ? {
    side: place.side, clock_hours: null, radius_fraction: null,
    edge_angle_degrees: turned(place.angleDegrees, 360, 2),
    edge_height_fraction: place.heightFraction,
  } : {
    side: place.side, clock_hours: turned(place.clockHours, 12, 4),
    radius_fraction: place.radiusFraction, edge_angle_degrees: null, edge_height_fraction: null,
  };
}

/** Rounded as the column keeps it: what rounds up to the whole turn is no turn at all. */
function turned(value: number, turn: number, places: number): number {
  return Number(value.toFixed(places)) % turn;
}

/** Three rows by who may see them. */
async function addSurfacing(
  trx: Transaction, key: { report_id: string; version: number }, { surfacing }: ReportContent,
): Promise<void> {
  const { surfacedOn, price, currency } = surfacing;
  const band = price === null ? undefined : priceBand(price);
  await trx('surfacing').insert({
    ...key, channel: surfacing.channel, surfaced_month: `${surfacedOn.slice(0, 7)}-01`,
    country: surfacing.country, region: surfacing.region, price_band_low: band?.low ?? null,
    price_band_high: band?.high ?? null, currency: price === null ? null : currency,
  });
  await trx('surfacing_detail').insert({
    ...key, surfaced_on: surfacedOn.length > 7 ? surfacedOn : null, town: surfacing.town, price,
  });
  await trx('surfacing_venue').insert({ ...key, venue: surfacing.venue });
}

async function addRows(
  trx: Transaction, table: string, rows: readonly Readonly<Record<string, unknown>>[],
): Promise<void> {
  if (rows.length) await trx(table).insert([...rows]);
}
