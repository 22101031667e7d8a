import type { Knex } from 'knex';
import { formatReportNumber } from '#shared/reports/report-number';

export interface GeneratedPeople {
  readonly memberEmail: string;
  readonly moderatorEmail: string;
}

/**
 * Reports made in SQL, as a superuser, since only one may put the triggers aside (row by row they
 * would take an hour): types, tells, channels, countries and words spread as finds
 * are (a few types make most of them), audiences as in a registry of clubs, 600 waiting.
 */
export async function generateReports(superuser: Knex, count: number): Promise<void> {
  const waiting = 600;
  const numbers = Array.from({ length: count + waiting }, (_, at) =>
    formatReportNumber(2020 + Math.floor(at / 90_000), String(at % 90_000).padStart(5, '0')));
  await superuser.raw(`create temporary table numbered as
    select number, n from unnest(?::text[]) with ordinality as t (number, n)`, [numbers]);
  await superuser.raw(`
set session_replication_role = replica;
create temporary table made as
select n, gen_random_uuid() as id, gen_random_uuid() as publication_id,
  number,
  case when n % 20 < 12 then 'clubs' when n % 20 < 17 then 'public'
    when n % 20 < 19 then 'club' else 'named_clubs' end as audience,
  timestamptz '2022-01-01' + n * interval '25 minutes' as at,
  -- A power law: the first types are reported most.
  floor(power(random(), 3) * (select count(*) from coin_type))::integer as type_at,
  (array['online_marketplace', 'coin_show', 'auction', 'flea_market', 'shop', 'private_sale',
    'inherited_lot', 'change', 'other'])[1 + floor(power(random(), 2) * 9)::integer] as channel,
  (array['GB', 'US', 'DE', 'NL', 'FR', 'NO', 'PL', 'AT', 'BE', 'IE', 'IT', 'ES', 'CA', 'AU'])
    [1 + floor(power(random(), 2) * 14)::integer] as country,
  n % 40 as club_at, n > ${count} as waits
from numbered;
alter table made add type_id uuid, add club_id uuid;
update made set type_id = t.id from (select id, row_number() over (order by slug) - 1 as at
  from coin_type) t where t.at = made.type_at;
update made set club_id = c.id from (select id, row_number() over (order by slug) - 1 as at
  from club) c where c.at = made.club_at;

insert into report (id, number, author_id, club_id, state, audience, published_audience,
  published_version, filed_at, decided_at)
select id, number, (select id from person where email = 'author@bench.example'), club_id,
  case when waits then 'filed' else 'published' end, audience,
  case when waits then null else audience end, case when waits then null else 1 end,
  case when waits then now() - (n % 600) * interval '20 minutes' else at end,
  case when waits then null else at end from made;
insert into report_reader_club select made.id, club.id from made, club
  where made.audience = 'named_clubs' and club.slug in ('bench-0', 'bench-1');
insert into report_version (report_id, version, cause, coin_type_id, coin_type_revision, piece,
  condition, whereabouts, photo_licence, account_html)
select id, 1, 'filed', type_id, (select current_revision from coin_type t where t.id = type_id),
  jsonb_build_object('year', 1800 + n % 220, 'mintMark', '', 'kind', 'coin',
    'description', '', 'title', (select name from coin_type t where t.id = type_id)),
  'worn', 'with_owner', 'registry_only', '<p>Found among other pieces '
    || (array['with rounded letters', 'with a bright field', 'with a seam', 'too light',
      'with a dull ring', 'from an old purse', 'in a tray of crowns'])[1 + n % 7]
    || ' and shown at the meeting ' || n % 500 || '.</p>' from made;
insert into photo (id, owner_id, master_key, sha256, bytes_received, width, height)
select md5(side || id)::uuid, (select id from person where email = 'author@bench.example'),
  side || id, sha256((side || id)::bytea), 4000000, 3000, 3000
  from made, unnest(array['obverse', 'reverse']) as side;
insert into report_photo (report_id, version, photo_id, position, side, circle)
select id, 1, md5(side || id)::uuid, position, side, '{"x": 0.5, "y": 0.5, "radius": 0.45}'
  from made, unnest(array['obverse', 'reverse']) with ordinality as s (side, position);
insert into report_tell (report_id, version, position, tell_id, disclosure)
select made.id, 1, p, (array(select id from tell order by id))[1 + (n * p * 7) % 46],
  case when (n + p) % 5 = 0 then 'clubs' else 'public' end
  from made, generate_series(1, 3) as p;
insert into component (report_id, version, kind, judgement)
select id, 1, 'piece', 'false' from made;
insert into measurement (report_id, version, position, quantity, value, unit, resolution)
select id, 1, 1, 'weight', 20 + n % 70 / 10.0, 'g', 0.01 from made;
insert into surfacing (report_id, version, channel, surfaced_month, country, region)
select id, 1, channel, date_trunc('month', at)::date, country,
  (array['north', 'south', 'east', 'west', 'inland', 'coast'])[1 + n % 6] from made;
insert into surfacing_detail (report_id, version, town) select id, 1, 'Town' from made;
insert into surfacing_venue (report_id, version, venue) select id, 1, 'Row ' || n % 9 from made;
insert into decision (report_id, version, row_version_seen, kind, moderator_id, club_id,
  lease_token, confidence, basis, reason, made_at)
select made.id, 1, 1, kind, (select id from person where email = 'moderator@bench.example'),
  club_id, 1, 'probable', '{photographs}', 'Plain to see.', at
  from made, unnest(array['publish', 'agree_public']) as kind
 where not waits and (kind = 'publish' or audience = 'public');
insert into publication (id, report_id, version, audience, confidence, basis, during)
select publication_id, id, 1, audience,
  (array['suspected', 'probable', 'probable', 'confirmed'])[1 + n % 4], '{photographs}',
  tstzrange(at, null) from made where not waits;
set session_replication_role = origin;`);
  await superuser.raw(`select count(renew_report_search(id)) from made where not waits`);
  await superuser.raw('drop table made, numbered');
  await superuser.raw('vacuum analyze');
}

export async function generatePeople(owner: Knex, passwordHash: string): Promise<GeneratedPeople> {
  await owner.raw(`
insert into club (slug, name) select 'bench-' || n, 'Bench club ' || n
  from generate_series(0, 39) as n;
insert into person (email, display_name, password_hash)
select unnest(array['author', 'member', 'moderator']) || '@bench.example', 'Somebody', '${
    passwordHash}';
insert into membership (person_id, club_id, role)
select p.id, c.id, r from person p, club c, unnest(array['member', 'moderator']) as r
 where c.slug = 'bench-0' and (r = 'member' or p.email = 'moderator@bench.example');`);
  return { memberEmail: 'member@bench.example', moderatorEmail: 'moderator@bench.example' };
}
