import type { Knex } from 'knex';

/**
 * The one projection that search, facets, suggestions and watches read. It has a row per published
 * report and tier: the clubs' row knows tells disclosed to clubs, the public row only public ones,
 * so that neither words nor counts can tell a visitor what is held back.
 */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
create table report_search (
  report_id uuid not null references report (id),
  tier text not null,
  number text not null,
  publication_id uuid not null references publication (id),
  published_audience text not null,
  club_id uuid not null,
  reader_clubs uuid[] not null default '{}',
  embargo_until timestamptz,
  state text not null,
  version integer not null,
  coin_type_id uuid,
  coin_type_slug text,
  coin_type_name text,
  title text not null,
  kind text not null,
  metal text,
  year integer,
  mint_mark text,
  confidence text not null,
  channel text not null,
  country text not null,
  region text not null,
  surfaced_month date not null,
  tells text[] not null,
  published_at timestamptz not null,
  first_published_at timestamptz not null,
  words tsvector not null,
  primary key (report_id, tier)
) partition by list (tier);
-- A reader reads one tier only; counting thousands of hits is reading as few pages as can be.
create table report_search_public partition of report_search for values in ('public');
create table report_search_clubs partition of report_search for values in ('clubs');

-- What a card shows beside that, apart, since counts never read it.
create table report_card (
  report_id uuid not null references report (id),
  tier text not null,
  card jsonb not null,
  primary key (report_id, tier),
  constraint report_card_tier_known check (tier in ('public', 'clubs'))
);

create index report_search_words_index on report_search using gin (words);
create index report_search_order_index on report_search (published_at desc, report_id desc);
create index report_search_type_index on report_search
  (coin_type_slug, published_at desc, report_id desc);
create index report_search_tells_index on report_search using gin (tells);
create index report_search_number_index on report_search (number);

-- The same rule as sees_as_published, said over the projection's own columns, and owned by the
-- owner: the operators of full text and trigrams keep their indexes here, which row-level
-- security would switch off.
create view visible_report_search with (security_barrier = false) as
  select s.*, c.card from report_search s
    left join report_card c on c.report_id = s.report_id and c.tier = s.tier
   -- A list of two, so that the planner leaves the other tier out at run time.
   where s.tier in (
       (select case when is_system_actor() or actor_is_registrar()
          or cardinality(actor_clubs()) > 0 then 'clubs' else 'public' end),
       (select case when is_system_actor() then 'public' when actor_is_registrar()
          or cardinality(actor_clubs()) > 0 then 'clubs' else 'public' end))
     and ((s.embargo_until is null or s.embargo_until <= now()) or (select is_system_actor()))
     and (s.published_audience in ('public', 'clubs')
          or s.club_id = any ((select actor_clubs())::uuid[])
          or (s.published_audience = 'named_clubs'
              and s.reader_clubs && (select actor_clubs())::uuid[])
          or (select is_system_actor()) or (select actor_is_registrar()));

-- The words of a search as a query: all of them, the last one also as a beginning. Search and the
-- matching of watches both ask it, so that a saved search finds what the search found.
create function search_query(wanted text) returns tsquery language sql stable parallel safe as $$
  select case when q::text ~ '''$' and wanted !~ '["[:space:]]$' then (q::text || ':*')::tsquery
              else q end
    from (select websearch_to_tsquery('touchneedle', wanted) as q) asked
$$;

-- Whose totals the actor shares, and the last change of what is published that every transaction
-- sees: totals kept in memory hold while both are the same.
create function search_audience() returns table (audience text, changed_at text)
  language sql stable security definer set search_path = public, pg_temp as $$
  select case when is_system_actor() or actor_is_registrar() then 'all'
           else array_to_string(actor_clubs(), ' ') end,
    coalesce((select e.xid::text || '/' || e.id from registry_event e
       where e.xid < pg_snapshot_xmin(pg_current_snapshot())
         and e.kind not in ('report_filed', 'report_changed', 'report_withdrawn')
       order by e.xid desc, e.id desc limit 1), '')
$$;

-- Which of these people may read this published report now; for the matching of watches, which
-- runs for nobody. At sending time each is asked again, as the recipient.
create function readers_of_report(wanted_report uuid, people uuid[]) returns setof uuid
  language sql stable security definer set search_path = public, pg_temp as $$
  select p.id from person p, report r
   where is_system_actor() and p.id = any (people) and p.closed_at is null
     and r.id = wanted_report and r.state = 'published'
     and (p.is_registrar or sees_as_published(r.published_audience, r.club_id, r.id,
       r.embargo_until, array(select m.club_id from membership m
         join club c on c.id = m.club_id and c.closed_at is null
        where m.person_id = p.id and m.during @> now())))
$$;

-- Renewed by the application in the transaction that publishes, widens, corrects or retracts.
-- Its plans are kept by the connection: made while tables are empty they would read them whole
-- ever after, hence the setting.
create function renew_report_search(wanted_report uuid) returns void language plpgsql
  security definer set search_path = public, pg_temp set enable_seqscan = off as $$
begin
  delete from report_search where report_id = wanted_report;
  delete from report_card where report_id = wanted_report;
  with made as materialized (
  select r.id, t.tier, r.number, p.id as publication_id, p.audience, r.club_id,
    reader_clubs_of(r.id) as reader_clubs, r.embargo_until, r.state, v.version, v.coin_type_id,
    ct.slug, ct.name, coalesce(v.piece ->> 'title', ct.name, 'Piece') as title,
    coalesce(ct.kind, v.piece ->> 'kind', 'coin') as kind,
    coalesce(ct.metal, v.piece ->> 'metal') as metal,
    (v.piece ->> 'year')::integer as year, v.piece ->> 'mintMark' as mint_mark, p.confidence,
    s.channel, s.country, s.region, s.surfaced_month,
    coalesce(tells.ids, '{}') as tells, lower(p.during) as published_at,
    (select min(lower(p2.during)) from publication p2 where p2.report_id = r.id)
      as first_published_at,
    jsonb_build_object('photos', coalesce(photos.list, '[]'::jsonb), 'tells',
      coalesce(tells.named, '[]'::jsonb), 'methodId', v.method_id,
      'pieceCount', v.piece_count) as card,
    setweight(to_tsvector('touchneedle', concat_ws(' ', v.piece ->> 'title', ct.name,
      ct.issuer, v.piece ->> 'year', v.piece ->> 'mintMark',
      v.piece ->> 'description')), 'A')
    || setweight(to_tsvector('touchneedle', concat_ws(' ', tells.words, pm.name,
      replace(s.channel, '_', ' '), s.region, ct.kind, replace(ct.metal, '_', ' '))), 'B')
    || setweight(to_tsvector('touchneedle', case when t.tier = 'clubs'
      then regexp_replace(v.account_html, '<[^>]*>', ' ', 'g') else '' end), 'D')
      as words
  from report r
  join publication p on p.report_id = r.id and upper_inf(p.during)
  join report_version v on v.report_id = r.id and v.version = p.version
  join surfacing s on s.report_id = v.report_id and s.version = v.version
  left join coin_type ct on ct.id = v.coin_type_id
  left join production_method pm on pm.id = v.method_id
  cross join (values ('clubs'), ('public')) as t (tier)
  left join lateral (
    select array_agg(distinct rt.tell_id) as ids,
      string_agg(te.name || ' ' || te.seen, ' ') as words,
      jsonb_agg(jsonb_build_object('id', te.id, 'name', te.name) order by rt.position) as named
    from report_tell rt join tell te on te.id = rt.tell_id
    where rt.report_id = v.report_id and rt.version = v.version
      and (rt.disclosure = 'public' or (t.tier = 'clubs' and rt.disclosure = 'clubs'))
      and (te.disclosure = 'public' or (t.tier = 'clubs' and te.disclosure = 'clubs'))
  ) tells on true
  left join lateral (
    select jsonb_agg(jsonb_build_object('id', ph.id, 'side', rp.side, 'width', ph.width,
        'height', ph.height, 'circle', rp.circle, 'uprightDegrees', rp.upright_degrees)
        order by rp.position) as list
    from report_photo rp join photo ph on ph.id = rp.photo_id
    where rp.report_id = v.report_id and rp.version = v.version
      and rp.side in ('obverse', 'reverse')
  ) photos on true
  where r.id = wanted_report and r.state = 'published'
    and (t.tier = 'clubs' or p.audience = 'public')
  ), cards as (
    insert into report_card (report_id, tier, card) select m.id, m.tier, m.card from made m)
  insert into report_search (report_id, tier, number, publication_id, published_audience, club_id,
    reader_clubs, embargo_until, state, version, coin_type_id, coin_type_slug, coin_type_name,
    title, kind, metal, year, mint_mark, confidence, channel, country, region, surfaced_month,
    tells, published_at, first_published_at, words)
  select m.id, m.tier, m.number, m.publication_id, m.audience, m.club_id, m.reader_clubs,
    m.embargo_until, m.state, m.version, m.coin_type_id, m.slug, m.name, m.title, m.kind, m.metal,
    m.year, m.mint_mark, m.confidence, m.channel, m.country, m.region, m.surfaced_month, m.tells,
    m.published_at, m.first_published_at, m.words
  from made m;
end $$;
revoke execute on function renew_report_search(uuid) from public;
grant execute on function renew_report_search(uuid) to touchneedle_app;
grant select on visible_report_search to touchneedle_app;
`);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
drop view visible_report_search;
drop function search_audience(), renew_report_search(uuid), readers_of_report(uuid, uuid[]),
  search_query(text);
drop table report_card, report_search;
`);
}
