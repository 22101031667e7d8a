import type { PlacedPhotoView } from '#shared/reports/photo';
import type { QueueAnswer, QueueItem, ReviewView } from '#shared/review/review';
import type { Transaction } from '../db/database';
import { InvalidInput } from '../errors';
import { stageOf, whyBarred } from './review-policy';
import type { QueueQuery } from './review-schemas';

const conditionOfFlag: Readonly<Record<string, string>> = {
  public_asked: `r.audience = 'public' and r.state = 'filed'`,
  second_voice: `r.state = 'published'`,
  returned_and_changed: `r.current_version > 1 and r.state = 'filed'`,
  lot: 'v.piece_count > 1',
  many_pieces: 'v.piece_count >= 10',
  no_photo: `not exists (select from report_photo rp where rp.report_id = r.id
    and rp.version = r.current_version)`,
  oldest: `r.filed_at < now() - interval '7 days'`,
};

const joinOfVersion = `join report_version v on v.report_id = r.id and v.version = r.current_version
       left join coin_type ct on ct.id = v.coin_type_id`;

/**
 * What waits for a decision of the actor's: filed reports, and published ones that want a second
 * voice for the public; the oldest first. One statement, whatever the number of rows; all that
 * costs a look at who may see it is asked for the rows of the page alone.
 */
export async function listQueue(trx: Transaction, query: QueueQuery): Promise<QueueAnswer> {
  const conditions: string[] = [];
  const values: string[] = [];
  const asksOfVersion = query.coinType || ['lot', 'many_pieces'].includes(query.flag ?? '');
  if (query.flag) conditions.push(conditionOfFlag[query.flag] ?? 'true');
  if (query.club) { conditions.push('c.slug = ?'); values.push(query.club); }
  if (query.coinType) { conditions.push('ct.slug = ?'); values.push(query.coinType); }
  if (query.after) {
    conditions.push('(r.filed_at, r.id) > (?::timestamptz, ?::uuid)');
    values.push(...readCursor(query.after));
  }
  const flags = Object.entries(conditionOfFlag)
    .map(([flag, condition]) => `case when ${flag === 'no_photo' ? `shown.photos = '[]'`
      : condition} then '${flag}' end`).join(', ');
  // By name, so that the connection keeps its plan: planning takes longer than running it.
  const name = ['review-queue', query.flag ?? 'any', query.club && 'club',
    query.coinType && 'type', query.after && 'after'].filter(Boolean).join('-');
  const { rows } = await trx.raw(
    `with mine as materialized (select actor_clubs_as('moderator') as clubs),
     waiting as (
       select r.* from report r, mine
        where (r.state = 'filed' or (r.state = 'published' and r.audience = 'public'
                 and r.published_audience <> 'public'))
          and reviews_report(r.audience, r.club_id, r.id, r.state, mine.clubs)),
     totals as (select count(*) as waiting, min(filed_at) as oldest from waiting),
     paged as materialized (
       select r.* from waiting r
       ${asksOfVersion ? joinOfVersion : ''}
       join club c on c.id = r.club_id
       where ${conditions.length ? conditions.join(' and ') : 'true'}
       order by r.filed_at, r.id limit ?)
     select totals.waiting, totals.oldest, page.* from totals left join lateral (
       select r.id, r.number, r.filed_at, r.filed_at::text as filed_exactly,
         r.current_version, r.audience, r.published_audience,
         r.state, v.piece, ct.slug as type_slug, ct.name as type_name, c.slug as club_slug,
         c.name as club_name, array_remove(array[${flags}], null) as flags,
         (select case when l.moderator_id = current_actor() then 'mine' else 'other' end
            from review_lease l where l.report_id = r.id and l.expires_at > now()) as lease,
         r.author_id = current_actor() as "isAuthor",
         exists (select from conflict_of_interest ci
           where ci.report_id = r.id and ci.person_id = current_actor()) as "hasConflict",
         exists (select from decision d where d.report_id = r.id and d.version = r.current_version
           and d.undone_at is null and d.moderator_id = current_actor()) as "hasSpoken",
         array(select d.club_id from decision d where d.report_id = r.id
           and d.version = r.current_version and d.undone_at is null
           and d.kind in ('publish', 'agree_public')) as "clubsWithVoice",
         array(select m from mine, unnest(mine.clubs) as m
           where reviews_report(r.audience, r.club_id, r.id, r.state, array[m]))
           as "clubsOfModerator",
         shown.photos
       from paged r
       cross join lateral (select photos_of_version(r.id, r.current_version) as photos
         offset 0) shown
       ${joinOfVersion}
       join club c on c.id = r.club_id) page on true
     order by page.filed_at, page.id`,
    [...values, query.limit + 1]).options({ name });
  const items = rows.filter((row: { id: string | null }) => row.id !== null);
  const page = items.slice(0, query.limit);
  const last = page.at(-1);
  return {
    items: page.map(toItem),
    next: items.length > query.limit && last
      ? writeCursor(last.filed_exactly, last.id) : null,
    waiting: rows[0].waiting,
    oldestFiledAt: rows[0].oldest?.toISOString() ?? null,
  };
}

interface QueueRow {
  readonly number: string; readonly piece: { title?: string }; readonly type_slug: string | null;
  readonly type_name: string | null; readonly club_slug: string; readonly club_name: string;
  readonly filed_at: Date; readonly current_version: number; readonly id: string;
  readonly audience: QueueItem['askedAudience']; readonly published_audience: string | null;
  readonly state: string; readonly flags: QueueItem['flags']; readonly lease: QueueItem['lease'];
  readonly isAuthor: boolean; readonly hasConflict: boolean; readonly hasSpoken: boolean;
  readonly clubsWithVoice: readonly string[]; readonly clubsOfModerator: readonly string[];
  readonly photos: readonly PlacedPhotoView[];
}

function toItem(row: QueueRow): QueueItem {
  return {
    number: row.number,
    title: row.piece.title ?? row.type_name ?? '',
    coinType: row.type_slug ? { slug: row.type_slug, name: row.type_name ?? '' } : null,
    club: { slug: row.club_slug, name: row.club_name },
    filedAt: row.filed_at.toISOString(),
    version: row.current_version,
    askedAudience: row.audience,
    flags: row.flags,
    lease: row.lease,
    barred: whyBarred(stageOf(row), row),
    photos: row.photos.filter(({ side }) => side === 'obverse' || side === 'reverse')
      .slice(0, 2).map(({ caption: _caption, ...photo }) => photo),
  };
}

/** With the microseconds that a Date would drop, else the last row would come twice. */
function writeCursor(filedExactly: string, id: string): string {
  return Buffer.from(`${filedExactly}|${id}`).toString('base64url');
}

function readCursor(cursor: string): [string, string] {
  const [filedAt = '', id = ''] = Buffer.from(cursor, 'base64url').toString().split('|');
  if (!/^\d{4}-\d\d-\d\d [\d:.]+[+-]\d\d(:\d\d)?$/.test(filedAt) || !/^[0-9a-f-]{36}$/.test(id)) {
    throw new InvalidInput([{ field: 'after', code: 'invalid' }]);
  }
  return [filedAt, id];
}

/** How the reporter's earlier reports ended, and the clubs this one names. */
export async function findReporter(
  trx: Transaction, reportId: string, authorId: string,
): Promise<{ reporter: ReviewView['reporter']; namedClubs: string[] }> {
  const { rows: [row] } = await trx.raw(
    `select reporter_name(?) as name, count(*) as filed,
       count(*) filter (where r.state = 'published') as published,
       count(*) filter (where r.state = 'returned') as returned,
       count(*) filter (where r.state = 'declined') as declined,
       count(*) filter (where r.state = 'unresolved') as unresolved,
       array(select c.name from report_reader_club rc join club c on c.id = rc.club_id
         where rc.report_id = ? order by c.name) as "namedClubs"
     from report r where r.author_id = ?`, [reportId, reportId, authorId]);
  const { namedClubs, ...reporter } = row;
  return { reporter: { ...reporter, name: reporter.name ?? '' }, namedClubs };
}

/** Puts a publication into the stream of events that feeds and live pages read. */
export async function recordPublication(
  trx: Transaction, publication: { readonly reportId: string; readonly publicationId: string },
): Promise<void> {
  await trx('registry_event').insert({ kind: 'published', report_id: publication.reportId,
    publication_id: publication.publicationId });
}
