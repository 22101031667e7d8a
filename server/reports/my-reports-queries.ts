import type { Audience } from '#shared/access/audience';
import type { PlacedPhoto, PlacedPhotoView } from '#shared/reports/photo';
import type { Component, Measurement, Pin, ReportContent, ReportState, ReportTell,
  Surfacing } from '#shared/reports/report-content';
import type { MyReport, MyReportContent } from '#shared/reports/report-view';
import type { Transaction } from '../db/database';
import { toPlace, type PieceRow } from './report-view-queries';

export interface MyReportsCursor {
  readonly filedAt: string;
  readonly id: string;
}

interface MyReportRow {
  readonly id: string; readonly number: string; readonly state: ReportState;
  readonly audience: Audience; readonly published_audience: Audience | null;
  readonly filed_at: Date; readonly cursor_at: string; readonly decided_at: Date | null;
  readonly piece: PieceRow; readonly in_review: boolean; readonly last_reason: string | null;
  readonly photos: readonly Omit<PlacedPhotoView, 'caption'>[];
}

/** The actor's own reports, the last filed first; one statement. */
export async function listMyReports(
  trx: Transaction, authorId: string, limit: number, after: MyReportsCursor | undefined,
): Promise<{ readonly items: MyReport[]; readonly next: MyReportsCursor | null }> {
  const { rows }: { rows: MyReportRow[] } = await trx.raw(
    `select r.id, r.number, r.state, r.audience, r.published_audience, r.filed_at,
       to_char(r.filed_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"') as cursor_at,
       r.decided_at, v.piece,
       r.state = 'filed' and exists (select from review_lease l
         where l.report_id = r.id and l.expires_at > now()) as in_review,
       (select d.reason from decision d where d.report_id = r.id and d.undone_at is null
         order by d.made_at desc limit 1) as last_reason,
       (select coalesce(jsonb_agg(jsonb_build_object('id', p.id, 'width', p.width,
           'height', p.height, 'side', rp.side, 'circle', rp.circle,
           'uprightDegrees', rp.upright_degrees) order by rp.position), '[]')
         from report_photo rp join photo p on p.id = rp.photo_id
         where rp.report_id = r.id and rp.version = r.current_version
           and rp.side in ('obverse', 'reverse')) as photos
     from report r
     join report_version v on v.report_id = r.id and v.version = r.current_version
     where r.author_id = ? ${after ? 'and (r.filed_at, r.id) < (?::timestamptz, ?::uuid)' : ''}
     order by r.filed_at desc, r.id desc limit ?`,
    [authorId, ...(after ? [after.filedAt, after.id] : []), limit + 1]);
  const page = rows.slice(0, limit);
  const last = page.at(-1);
  return {
    items: page.map(toMyReport),
    next: rows.length > limit && last ? { filedAt: last.cursor_at, id: last.id } : null,
  };
}

function toMyReport(row: MyReportRow): MyReport {
  return {
    number: row.number, title: row.piece.title, state: row.state, inReview: row.in_review,
    filedAt: row.filed_at.toISOString(), decidedAt: row.decided_at?.toISOString() ?? null,
    audience: row.audience, publishedAudience: row.published_audience,
    lastReason: row.last_reason,
    photos: (['obverse', 'reverse'] as const)
      .flatMap((side) => row.photos.find((photo) => photo.side === side) ?? []),
  };
}

interface ContentRow extends Omit<ReportContent, 'presentedAs' | 'tells' | 'surfacing'
  | 'embargoUntil'> {
  readonly version: number; readonly row_version: number; readonly piece: PieceRow;
  readonly coin_type: string | null; readonly embargo_until: Date | null;
  readonly components: readonly Component[]; readonly photos: readonly PlacedPhoto[];
  readonly measurements: readonly Measurement[];
  readonly tells: readonly (Omit<ReportTell, 'pins'> & { readonly position: number })[];
  readonly pins: readonly (Parameters<typeof toPlace>[0] & Omit<Pin, 'place'> & {
    readonly tell: number; })[];
  readonly surfacing: Omit<Surfacing, 'surfacedOn'> & { readonly month: string;
    readonly day: string | null };
}

/** What the author filed last, as the form takes it. */
export async function findMyContent(
  trx: Transaction, authorId: string, number: string,
): Promise<MyReportContent | undefined> {
  const list = (columns: string, from: string, order = 'x.position'): string =>
    `(select coalesce(jsonb_agg(jsonb_build_object(${columns}) order by ${order}), '[]')
       from ${from} x where x.report_id = r.id and x.version = v.version)`;
  const { rows: [row] }: { rows: (ContentRow | undefined)[] } = await trx.raw(
    `select v.version, r.row_version, v.piece, ct.slug as coin_type, c.slug as club,
       v.piece_count as "pieceCount", v.condition, v.whereabouts, v.account_source as account,
       r.audience, r.embargo_until, v.photo_licence as "photoLicence",
       r.author_named as "authorNamed",
       array(select nc.slug from report_reader_club rc join club nc on nc.id = rc.club_id
         where rc.report_id = r.id order by nc.slug) as "namedClubs",
       ${list(`'kind', x.kind, 'judgement', x.judgement, 'note', x.note`, 'component',
    'x.kind')} as components,
       ${list(`'photoId', x.photo_id, 'side', x.side, 'circle', x.circle,
         'uprightDegrees', x.upright_degrees, 'caption', x.caption`, 'report_photo')} as photos,
       ${list(`'position', x.position, 'tellId', x.tell_id, 'note', x.note,
         'disclosure', x.disclosure`, 'report_tell')} as tells,
       ${list(`'tell', x.tell_position, 'id', x.pin_id, 'photoId', x.photo_id, 'side', x.side,
         'clockHours', x.clock_hours, 'radiusFraction', x.radius_fraction,
         'angleDegrees', x.edge_angle_degrees, 'heightFraction', x.edge_height_fraction,
         'note', x.note`, `(select * from pin where layer = 'reporter')`, 'x.pin_id')} as pins,
       ${list(`'quantity', x.quantity, 'value', x.value, 'unit', x.unit,
         'resolution', x.resolution`, 'measurement')} as measurements,
       jsonb_build_object('channel', s.channel, 'month', s.surfaced_month,
         'day', d.surfaced_on, 'country', s.country, 'region', s.region, 'town', d.town,
         'venue', e.venue, 'price', d.price, 'currency', s.currency) as surfacing
     from report r
     join report_version v on v.report_id = r.id and v.version = r.current_version
     join club c on c.id = r.club_id
     join surfacing s on s.report_id = r.id and s.version = v.version
     join surfacing_detail d on d.report_id = r.id and d.version = v.version
     join surfacing_venue e on e.report_id = r.id and e.version = v.version
     left join coin_type ct on ct.id = v.coin_type_id
     where r.number = ? and r.author_id = ?`, [number, authorId]);
  return row && { version: row.version, rowVersion: row.row_version, content: toContent(row) };
}

function toContent(row: ContentRow): ReportContent {
  const { month, day, ...surfacing } = row.surfacing;
  const { kind, metal, year, mintMark, description } = row.piece;
  return {
    club: row.club,
    presentedAs: { coinType: row.coin_type, kind, metal, year, mintMark, description },
    components: row.components, pieceCount: row.pieceCount, condition: row.condition,
    whereabouts: row.whereabouts, photos: row.photos,
    tells: row.tells.map(({ position, ...tell }) => ({
      ...tell,
      pins: row.pins.filter((pin) => pin.tell === position).map((pin) => ({
        id: pin.id, photoId: pin.photoId, place: toPlace(pin), note: pin.note,
      })),
    })),
    measurements: row.measurements,
    surfacing: { ...surfacing, surfacedOn: day ?? month.slice(0, 7) },
    account: row.account, audience: row.audience, namedClubs: row.namedClubs,
    embargoUntil: row.embargo_until?.toISOString() ?? null, photoLicence: row.photoLicence,
    authorNamed: row.authorNamed,
  };
}

