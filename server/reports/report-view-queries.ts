import type { Audience, Disclosure } from '#shared/access/audience';
import { nominalDiameterMillimetres,
  type QuantityStandard } from '#shared/coin-types/coin-type-standard';
import type { PlacedPhotoView } from '#shared/reports/photo';
import type { Channel, Component, Condition, Confidence, ConfidenceBasis, PieceKind, PinPlace,
  ReportState, Metal, Whereabouts } from '#shared/reports/report-content';
import type { MeasurementView, NamedTell, PublicationView, ReportTellView,
  ReportView } from '#shared/reports/report-view';
import type { Transaction } from '../db/database';

/** `published`: what its readers see; `newest`: the last version, for author and reviewers. */
export type WantedVersion = 'published' | 'newest' | number;

/**
 * The report as the actor may see it, in one statement through the tables' own row-level security.
 * Undefined where the actor may not see it, where it was never published (except `newest`), and
 * where a version was never published to the actor's circle.
 */
export async function findReportView(
  trx: Transaction, number: string, wanted: WantedVersion,
): Promise<ReportView | undefined> {
  const version = wanted === 'newest' ? 'r.current_version'
    : wanted === 'published' ? 'r.published_version' : '?::integer';
  // By name, so that the connection keeps its plan: planning takes longer than running it.
  const { rows: [row] } = await trx.raw(
    `${viewStatement(version)}${wanted === 'newest' ? '' : ' and p.id is not null'}`,
    typeof wanted === 'number' ? [wanted, number] : [number])
    .options({ name: `report-view-${typeof wanted === 'number' ? 'version' : wanted}` });
  return row && toView(row, wanted);
}

const viewStatement = (version: string): string => `
select r.number, r.state, r.row_version, r.audience as asked_audience, r.published_audience,
  r.embargo_until, r.filed_at, r.author_named, r.author_id = current_actor() as mine, v.version,
  v.piece,
  v.piece_count, v.condition, v.whereabouts, v.account_html, seen.evidence,
  case when r.author_named or seen.evidence then reporter_name(r.id) end as reporter_name,
  holds_back_tells(r.id, v.version) as held_back,
  m.id as method_id, m.name as method_name, ct.slug as type_slug, ct.name as type_name,
  ct.issuer as type_issuer, cr.standard -> 'diameter' as type_diameter,
  case when seen.evidence or cardinality(actor_clubs()) > 0 then c.slug end as club_slug,
  c.name as club_name, into_report.number as merged_into,
  case when r.state = 'retracted' then retraction_reason(r.id) end as retraction_reason,
  p.confidence, p.basis, lower(p.during) as published_at,
  s.channel, s.surfaced_month, s.country, s.region, s.price_band_low, s.price_band_high,
  s.currency, d.report_id is not null as has_detail, d.surfaced_on, d.town, d.price, e.venue,
  (select jsonb_agg(jsonb_build_object('kind', x.kind, 'judgement', x.judgement,
      'note', x.note) order by array_position(array['piece', 'holder', 'label', 'packaging'],
      x.kind)) from component x
    where x.report_id = r.id and x.version = v.version) as components,
  photos_of_version(r.id, v.version) as photos,
  (select jsonb_agg(jsonb_build_object('position', x.position, 'id', t.id, 'name', t.name,
      'seen', t.seen, 'note', x.note, 'disclosure', x.disclosure) order by x.position)
    from report_tell x join tell t on t.id = x.tell_id
    where x.report_id = r.id and x.version = v.version) as tells,
  (select jsonb_agg(jsonb_build_object('tell', x.tell_position, 'id', x.pin_id,
      'photoId', x.photo_id, 'layer', x.layer, 'side', x.side, 'clockHours', x.clock_hours,
      'radiusFraction', x.radius_fraction, 'angleDegrees', x.edge_angle_degrees,
      'heightFraction', x.edge_height_fraction, 'note', x.note)
      order by x.tell_position, x.side, x.clock_hours, x.edge_angle_degrees, x.pin_id)
    from pin x where x.report_id = r.id and x.version = v.version) as pins,
  (select jsonb_agg(jsonb_build_object('position', x.position, 'quantity', x.quantity,
      'value', x.value, 'unit', x.unit, 'resolution', x.resolution) order by x.position)
    from measurement x where x.report_id = r.id and x.version = v.version) as measurements,
  (select jsonb_agg(jsonb_build_object('version', x.version, 'audience', x.audience,
      'confidence', x.confidence, 'basis', x.basis, 'from', lower(x.during),
      'to', upper(x.during), 'endedAs', x.ended_as) order by lower(x.during) desc)
    from publication x where x.report_id = r.id) as history
from report r
cross join lateral (select sees_evidence(r.id) as evidence) seen
join report_version v on v.report_id = r.id and v.version = ${version}
join surfacing s on s.report_id = v.report_id and s.version = v.version
join club c on c.id = r.club_id
left join surfacing_detail d on d.report_id = v.report_id and d.version = v.version
left join surfacing_venue e on e.report_id = v.report_id and e.version = v.version
left join production_method m on m.id = v.method_id
left join coin_type ct on ct.id = v.coin_type_id
left join coin_type_revision cr on cr.coin_type_id = v.coin_type_id
  and cr.revision = v.coin_type_revision
left join report into_report on into_report.id = r.merged_into
left join lateral (select x.id, x.confidence, x.basis, x.during from publication x
  where x.report_id = r.id and x.version = v.version
  order by lower(x.during) desc limit 1) p on true
where r.number = ?`;

interface PinRow {
  readonly tell: number; readonly id: string; readonly photoId: string;
  readonly layer: 'reporter' | 'moderator'; readonly side: 'obverse' | 'reverse' | 'edge';
  readonly clockHours: number | null; readonly radiusFraction: number | null;
  readonly angleDegrees: number | null; readonly heightFraction: number | null;
  readonly note: string;
}

interface TellRow extends NamedTell {
  readonly position: number; readonly seen: string; readonly note: string;
  readonly disclosure: Disclosure;
}

/** What a report is presented as, kept with each version. */
export interface PieceRow {
  readonly title: string; readonly kind: PieceKind; readonly metal: Metal | null;
  readonly year: number | null; readonly mintMark: string; readonly description: string;
}

interface ViewRow {
  readonly number: string; readonly state: ReportState; readonly row_version: number;
  readonly asked_audience: Audience; readonly published_audience: Audience | null;
  readonly embargo_until: Date | null; readonly filed_at: Date; readonly mine: boolean;
  readonly author_named: boolean;
  readonly version: number; readonly piece: PieceRow; readonly piece_count: number;
  readonly condition: Condition; readonly whereabouts: Whereabouts;
  readonly account_html: string; readonly evidence: boolean;
  readonly reporter_name: string | null; readonly held_back: boolean;
  readonly method_id: string | null; readonly method_name: string | null;
  readonly type_slug: string | null; readonly type_name: string | null;
  readonly type_issuer: string | null;
  readonly type_diameter: QuantityStandard | null;
  readonly club_slug: string | null; readonly club_name: string;
  readonly merged_into: string | null; readonly retraction_reason: string | null;
  readonly confidence: Confidence | null; readonly basis: readonly ConfidenceBasis[] | null;
  readonly published_at: Date | null; readonly channel: Channel;
  readonly surfaced_month: string; readonly country: string; readonly region: string;
  readonly price_band_low: number | null; readonly price_band_high: number | null;
  readonly currency: string | null; readonly has_detail: boolean;
  readonly surfaced_on: string | null; readonly town: string | null;
  readonly price: number | null; readonly venue: string | null;
  readonly components: readonly Component[] | null;
  readonly photos: readonly PlacedPhotoView[];
  readonly tells: readonly TellRow[] | null; readonly pins: readonly PinRow[] | null;
  readonly measurements: readonly MeasurementView[] | null;
  readonly history: readonly PublicationView[] | null;
}

function toView(row: ViewRow, wanted: WantedVersion): ReportView {
  const { piece, evidence } = row;
  // A reviewer's look at private evidence is put on record, which the published page does not do.
  const isReadersPage = wanted !== 'newest' && !row.mine;
  const history = (row.history ?? []).map((each) => ({
    ...each, from: toInstant(each.from), to: each.to && toInstant(each.to),
  }));
  const retracted = history.find((each) => each.endedAs === 'retracted');
  return {
    number: row.number,
    state: row.state,
    version: row.version,
    rowVersion: row.row_version,
    title: piece.title,
    presentedAs: { coinType: row.type_slug, kind: piece.kind, metal: piece.metal,
      description: piece.description, year: piece.year, mintMark: piece.mintMark },
    coinType: row.type_slug === null ? null : { slug: row.type_slug, name: row.type_name ?? '',
      issuer: row.type_issuer ?? '',
      diameterMillimetres: row.type_diameter && nominalDiameterMillimetres(
        { diameter: row.type_diameter, variants: [], dateTable: null, notes: [] }) },
    components: row.components ?? [],
    pieceCount: row.piece_count,
    condition: row.condition,
    whereabouts: row.whereabouts,
    method: row.method_id === null ? null : { id: row.method_id, name: row.method_name ?? '' },
    photos: row.photos,
    tells: (row.tells ?? []).map((tell) => toTell(tell, row.pins ?? [])),
    someTellsHeldBack: row.held_back,
    measurements: row.measurements ?? [],
    surfacing: toSurfacing(row, isReadersPage ? null : row.venue),
    accountHtml: row.account_html,
    askedAudience: evidence ? row.asked_audience : null,
    audience: row.published_audience,
    embargoUntil: evidence ? row.embargo_until?.toISOString() ?? null : null,
    club: row.club_slug === null ? null : { slug: row.club_slug, name: row.club_name },
    reporterName: isReadersPage && !row.author_named ? null : row.reporter_name,
    // Filing dates follow meeting nights, so readers are not told them.
    filedAt: evidence ? row.filed_at.toISOString() : null,
    confidence: row.confidence,
    basis: row.basis ?? [],
    publishedAt: row.published_at?.toISOString() ?? null,
    history,
    mergedInto: row.merged_into,
    retraction: row.state === 'retracted'
      ? { at: retracted?.to ?? '', reason: row.retraction_reason ?? '' } : null,
    mine: row.mine ?? false,
  };
}

function toTell(tell: TellRow, pins: readonly PinRow[]): ReportTellView {
  return {
    position: tell.position,
    tell: { id: tell.id, name: tell.name, seen: tell.seen },
    note: tell.note,
    disclosure: tell.disclosure,
    pins: pins.filter((pin) => pin.tell === tell.position).map((pin) => ({
      id: pin.id, photoId: pin.photoId, place: toPlace(pin), note: pin.note, layer: pin.layer,
    })),
  };
}

/** The place of a pin, from the columns of its side. */
export function toPlace(pin: Omit<PinRow, 'tell' | 'layer'>): PinPlace {
  return pin.side === 'edge'
    ? { side: 'edge', angleDegrees: pin.angleDegrees ?? 0, heightFraction: pin.heightFraction ?? 0 }
    : { side: pin.side, clockHours: pin.clockHours ?? 0, radiusFraction: pin.radiusFraction ?? 0 };
}

function toSurfacing(row: ViewRow, venue: string | null): ReportView['surfacing'] {
  const { price_band_low: low, price_band_high: high, currency } = row;
  return {
    channel: row.channel,
    month: row.surfaced_month.slice(0, 7),
    country: row.country,
    region: row.region,
    priceBand: low !== null && high !== null && currency !== null ? { low, high, currency } : null,
    detail: row.has_detail ? { surfacedOn: row.surfaced_on, town: row.town ?? '',
      price: row.price, currency } : null,
    venue,
  };
}

/** jsonb writes instants in the session's zone. */
function toInstant(text: string): string {
  return new Date(text).toISOString();
}
