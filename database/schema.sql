CREATE SCHEMA pgboss;

CREATE EXTENSION IF NOT EXISTS btree_gin WITH SCHEMA public;

COMMENT ON EXTENSION btree_gin IS 'support for indexing common datatypes in GIN';

CREATE EXTENSION IF NOT EXISTS btree_gist WITH SCHEMA public;

COMMENT ON EXTENSION btree_gist IS 'support for indexing common datatypes in GiST';

CREATE EXTENSION IF NOT EXISTS citext WITH SCHEMA public;

COMMENT ON EXTENSION citext IS 'data type for case-insensitive character strings';

CREATE EXTENSION IF NOT EXISTS pg_trgm WITH SCHEMA public;

COMMENT ON EXTENSION pg_trgm IS 'text similarity measurement and index searching based on trigrams';

CREATE EXTENSION IF NOT EXISTS pgcrypto WITH SCHEMA public;

COMMENT ON EXTENSION pgcrypto IS 'cryptographic functions';

CREATE EXTENSION IF NOT EXISTS unaccent WITH SCHEMA public;

COMMENT ON EXTENSION unaccent IS 'text search dictionary that removes accents';

CREATE TYPE pgboss.job_state AS ENUM (
    'created',
    'retry',
    'active',
    'completed',
    'cancelled',
    'failed'
);

CREATE FUNCTION pgboss.create_queue(queue_name text, options json) RETURNS void
    LANGUAGE plpgsql
    AS $_$
    DECLARE
      table_name varchar := 'j' || encode(sha224(queue_name::bytea), 'hex');
      queue_created_on timestamptz;
    BEGIN

      WITH q as (
      INSERT INTO pgboss.queue (
        name,
        policy,
        retry_limit,
        retry_delay,
        retry_backoff,
        expire_seconds,
        retention_minutes,
        dead_letter,
        partition_name
      )
      VALUES (
        queue_name,
        options->>'policy',
        (options->>'retryLimit')::int,
        (options->>'retryDelay')::int,
        (options->>'retryBackoff')::bool,
        (options->>'expireInSeconds')::int,
        (options->>'retentionMinutes')::int,
        options->>'deadLetter',
        table_name
      )
      ON CONFLICT DO NOTHING
      RETURNING created_on
      )
      SELECT created_on into queue_created_on from q;

      IF queue_created_on IS NULL THEN
        RETURN;
      END IF;

      EXECUTE format('CREATE TABLE pgboss.%I (LIKE pgboss.job INCLUDING DEFAULTS)', table_name);

      EXECUTE format('ALTER TABLE pgboss.%1$I ADD PRIMARY KEY (name, id)', table_name);
      EXECUTE format('ALTER TABLE pgboss.%1$I ADD CONSTRAINT q_fkey FOREIGN KEY (name) REFERENCES pgboss.queue (name) ON DELETE RESTRICT DEFERRABLE INITIALLY DEFERRED', table_name);
      EXECUTE format('ALTER TABLE pgboss.%1$I ADD CONSTRAINT dlq_fkey FOREIGN KEY (dead_letter) REFERENCES pgboss.queue (name) ON DELETE RESTRICT DEFERRABLE INITIALLY DEFERRED', table_name);
      EXECUTE format('CREATE UNIQUE INDEX %1$s_i1 ON pgboss.%1$I (name, COALESCE(singleton_key, '''')) WHERE state = ''created'' AND policy = ''short''', table_name);
      EXECUTE format('CREATE UNIQUE INDEX %1$s_i2 ON pgboss.%1$I (name, COALESCE(singleton_key, '''')) WHERE state = ''active'' AND policy = ''singleton''', table_name);
      EXECUTE format('CREATE UNIQUE INDEX %1$s_i3 ON pgboss.%1$I (name, state, COALESCE(singleton_key, '''')) WHERE state <= ''active'' AND policy = ''stately''', table_name);
      EXECUTE format('CREATE UNIQUE INDEX %1$s_i4 ON pgboss.%1$I (name, singleton_on, COALESCE(singleton_key, '''')) WHERE state <> ''cancelled'' AND singleton_on IS NOT NULL', table_name);
      EXECUTE format('CREATE INDEX %1$s_i5 ON pgboss.%1$I (name, start_after) INCLUDE (priority, created_on, id) WHERE state < ''active''', table_name);

      EXECUTE format('ALTER TABLE pgboss.%I ADD CONSTRAINT cjc CHECK (name=%L)', table_name, queue_name);
      EXECUTE format('ALTER TABLE pgboss.job ATTACH PARTITION pgboss.%I FOR VALUES IN (%L)', table_name, queue_name);
    END;
    $_$;

CREATE FUNCTION pgboss.delete_queue(queue_name text) RETURNS void
    LANGUAGE plpgsql
    AS $$
    DECLARE
      table_name varchar;
    BEGIN
      WITH deleted as (
        DELETE FROM pgboss.queue
        WHERE name = queue_name
        RETURNING partition_name
      )
      SELECT partition_name from deleted INTO table_name;

      EXECUTE format('DROP TABLE IF EXISTS pgboss.%I', table_name);
    END;
    $$;

CREATE FUNCTION public.actor_clubs() RETURNS uuid[]
    LANGUAGE plpgsql STABLE
    AS $$
begin
  if current_actor() is null then return '{}'; end if;
  if has_rights_at_hand() then return current_setting('touchneedle.clubs')::uuid[]; end if;
  return find_clubs_of(current_actor(), null);
end $$;

CREATE FUNCTION public.actor_clubs_as(wanted_role text) RETURNS uuid[]
    LANGUAGE plpgsql STABLE
    AS $$
begin
  if current_actor() is null then return '{}'; end if;
  if wanted_role = 'moderator' and has_rights_at_hand() then
    return current_setting('touchneedle.clubs_moderated')::uuid[];
  end if;
  return find_clubs_of(current_actor(), wanted_role);
end $$;

CREATE FUNCTION public.actor_is_registrar() RETURNS boolean
    LANGUAGE plpgsql STABLE
    AS $$
begin
  if current_actor() is null then return false; end if;
  if has_rights_at_hand() then return current_setting('touchneedle.registrar')::boolean; end if;
  return find_is_registrar(current_actor());
end $$;

CREATE FUNCTION public.audit_entry_join_chain() RETURNS trigger
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
declare head audit_chain_head%rowtype; joined bytea;
begin
  select * into head from audit_chain_head for update;
  joined := digest(head.hash || convert_to(concat_ws('|', head.position + 1, new.seq, new.act,
    coalesce(new.actor_id::text, ''), coalesce(new.club_id::text, ''), new.subject_kind,
    new.subject_id, new.details::text,
    to_char(new.at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"')), 'UTF8'), 'sha256');
  perform set_config('touchneedle.joining_chain', 'on', true);
  update audit_entry set chain_position = head.position + 1, previous_hash = head.hash,
    hash = joined where seq = new.seq;
  perform set_config('touchneedle.joining_chain', '', true);
  update audit_chain_head set position = head.position + 1, hash = joined;
  return null;
end $$;

CREATE FUNCTION public.become_actor(wanted text) RETURNS void
    LANGUAGE plpgsql
    AS $$
begin
  perform set_config('touchneedle.actor', wanted, true),
    set_config('touchneedle.rights_of', '', true);
  if wanted in ('', 'system') then return; end if;
  perform
    set_config('touchneedle.clubs', find_clubs_of(wanted::uuid, null)::text, true),
    set_config('touchneedle.clubs_moderated', find_clubs_of(wanted::uuid, 'moderator')::text,
      true),
    set_config('touchneedle.registrar', find_is_registrar(wanted::uuid)::text, true),
    set_config('touchneedle.rights_of', wanted, true);
end $$;

CREATE FUNCTION public.current_actor() RETURNS uuid
    LANGUAGE sql STABLE PARALLEL SAFE
    AS $$
  select case when nullif(current_setting('touchneedle.actor', true), '') is null
                or current_setting('touchneedle.actor', true) = 'system' then null
              else current_setting('touchneedle.actor', true)::uuid end
$$;

CREATE FUNCTION public.decision_not_on_own_report() RETURNS trigger
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
begin
  if exists (select from report r where r.id = new.report_id and r.author_id = new.moderator_id)
     or exists (select from conflict_of_interest c
                 where c.report_id = new.report_id and c.person_id = new.moderator_id) then
    raise exception 'nobody decides on their own report or in a conflict of interest'
      using errcode = 'check_violation', constraint = 'decision_without_conflict';
  end if;
  return new;
end $$;

CREATE FUNCTION public.find_clubs_of(wanted_person uuid, wanted_role text) RETURNS uuid[]
    LANGUAGE plpgsql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
begin
  return (select coalesce(array_agg(distinct m.club_id order by m.club_id), '{}')
    from membership m join club c on c.id = m.club_id and c.closed_at is null
   where m.person_id = wanted_person and m.club_id is not null and m.during @> now()
     and (wanted_role is null or m.role = wanted_role));
end $$;

CREATE FUNCTION public.find_is_registrar(wanted_person uuid) RETURNS boolean
    LANGUAGE plpgsql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
begin
  return coalesce((select p.is_registrar from person p
    where p.id = wanted_person and p.closed_at is null), false);
end $$;

CREATE FUNCTION public.forget_rights() RETURNS trigger
    LANGUAGE plpgsql
    AS $$
begin
  perform set_config('touchneedle.rights_of', '', true);
  return null;
end $$;

CREATE FUNCTION public.has_rights_at_hand() RETURNS boolean
    LANGUAGE sql STABLE
    AS $$
  select current_setting('touchneedle.rights_of', true)
    = current_setting('touchneedle.actor', true)
$$;

CREATE FUNCTION public.holds_back_tells(wanted_report uuid, wanted_version integer) RETURNS boolean
    LANGUAGE plpgsql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
begin
  return exists (select from report_tell rt join tell t on t.id = rt.tell_id
      where rt.report_id = wanted_report and rt.version = wanted_version
        and (rt.disclosure <> 'public' or t.disclosure <> 'public')
        and not (sees_disclosure(rt.disclosure, rt.report_id)
          and (t.disclosure = 'public'
            or (t.disclosure = 'clubs' and cardinality(actor_clubs()) > 0)
            or cardinality(actor_clubs_as('moderator')) > 0)))
    or exists (select from pin p
      where p.report_id = wanted_report and p.version = wanted_version
        and p.disclosure <> 'public'
        and not sees_disclosure(p.disclosure, p.report_id));
end $$;

CREATE FUNCTION public.in_reporters_club(wanted_report uuid) RETURNS boolean
    LANGUAGE plpgsql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
begin
  return exists (select from report r where r.id = wanted_report
    and r.club_id = any (actor_clubs()));
end $$;

CREATE FUNCTION public.is_system_actor() RETURNS boolean
    LANGUAGE sql STABLE PARALLEL SAFE
    AS $$
  select coalesce(current_setting('touchneedle.actor', true), '') = 'system'
$$;

CREATE FUNCTION public.photos_of_version(wanted_report uuid, wanted_version integer) RETURNS jsonb
    LANGUAGE plpgsql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
begin
  if not sees_version(wanted_report, wanted_version) then return '[]'; end if;
  return (select coalesce(jsonb_agg(jsonb_build_object('id', p.id, 'width', p.width,
      'height', p.height, 'side', rp.side, 'circle', rp.circle,
      'uprightDegrees', rp.upright_degrees, 'caption', rp.caption) order by rp.position), '[]')
    from report_photo rp join photo p on p.id = rp.photo_id
   where rp.report_id = wanted_report and rp.version = wanted_version);
end $$;

CREATE FUNCTION public.publication_needs_two_voices() RETURNS trigger
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
declare voices integer; clubs integer;
begin
  if new.audience <> 'public' then return null; end if;
  select count(distinct d.moderator_id), count(distinct d.club_id) into voices, clubs
    from decision d
   where d.report_id = new.report_id and d.version = new.version and d.undone_at is null
     and d.kind in ('publish', 'agree_public');
  if voices < 2 or clubs < 2 then
    raise exception 'public audience needs two moderators of two clubs'
      using errcode = 'check_violation', constraint = 'publication_two_voices';
  end if;
  return null;
end $$;

CREATE FUNCTION public.reader_clubs_of(wanted_report uuid) RETURNS uuid[]
    LANGUAGE plpgsql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
begin
  return (select coalesce(array_agg(rc.club_id), '{}') from report_reader_club rc
    where rc.report_id = wanted_report);
end $$;

CREATE FUNCTION public.readers_of_report(wanted_report uuid, people uuid[]) RETURNS SETOF uuid
    LANGUAGE sql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
  select p.id from person p, report r
   where is_system_actor() and p.id = any (people) and p.closed_at is null
     and r.id = wanted_report and r.state = 'published'
     and (p.is_registrar or sees_as_published(r.published_audience, r.club_id, r.id,
       r.embargo_until, array(select m.club_id from membership m
         join club c on c.id = m.club_id and c.closed_at is null
        where m.person_id = p.id and m.during @> now())))
$$;

CREATE FUNCTION public.refuse_change() RETURNS trigger
    LANGUAGE plpgsql
    AS $$
begin
  if tg_table_name = 'audit_entry' and tg_op = 'UPDATE'
     and coalesce(current_setting('touchneedle.joining_chain', true), '') = 'on' then
    return new;
  end if;
  raise exception '% is append-only', tg_table_name using errcode = 'restrict_violation';
end $$;

CREATE FUNCTION public.renew_report_search(wanted_report uuid) RETURNS void
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    SET enable_seqscan TO 'off'
    AS $$
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

CREATE FUNCTION public.reporter_name(wanted_report uuid) RETURNS text
    LANGUAGE plpgsql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
begin
  return (select p.display_name from report r join person p on p.id = r.author_id
   where r.id = wanted_report and (r.author_named or sees_evidence(wanted_report)));
end $$;

CREATE FUNCTION public.reserve_mail(wanted_cause text, mail_kind text, recipient uuid, to_address text, mail_parameters jsonb) RETURNS void
    LANGUAGE sql SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
  insert into mail (cause, kind, person_id, address, parameters)
  values (wanted_cause, mail_kind, recipient, to_address, mail_parameters)
  on conflict (cause) do nothing
$$;

CREATE FUNCTION public.reserve_notice_mail(wanted_cause text, reporter uuid, about_report uuid, mail_parameters jsonb) RETURNS void
    LANGUAGE sql SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
  insert into mail (cause, kind, person_id, address, parameters)
  select wanted_cause, 'notice', p.id, p.email, mail_parameters
    from person p join report r on r.author_id = p.id
   where p.id = reporter and r.id = about_report and p.closed_at is null
     and (sees_evidence(r.id) or is_system_actor())
  on conflict (cause) do nothing
$$;

CREATE FUNCTION public.retraction_reason(wanted_report uuid) RETURNS text
    LANGUAGE plpgsql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
begin
  return (select d.reason from decision d join report r on r.id = d.report_id
   where d.report_id = wanted_report and d.kind = 'retract' and d.undone_at is null
     and r.state = 'retracted'
     and (sees_as_published(r.published_audience, r.club_id, r.id, r.embargo_until, actor_clubs())
          or sees_evidence(wanted_report))
   order by d.made_at desc limit 1);
end $$;

CREATE FUNCTION public.reviews_report(audience text, club_id uuid, report_id uuid, state text, clubs uuid[]) RETURNS boolean
    LANGUAGE plpgsql STABLE
    AS $$
begin
  return cardinality(clubs) > 0 and state not in ('withdrawn') and case audience
    when 'club' then club_id = any (clubs)
    when 'named_clubs' then club_id = any (clubs) or reader_clubs_of(report_id) && clubs
    else true end;
end $$;

CREATE FUNCTION public.search_audience() RETURNS TABLE(audience text, changed_at text)
    LANGUAGE sql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
  select case when is_system_actor() or actor_is_registrar() then 'all'
           else array_to_string(actor_clubs(), ' ') end,
    coalesce((select e.xid::text || '/' || e.id from registry_event e
       where e.xid < pg_snapshot_xmin(pg_current_snapshot())
         and e.kind not in ('report_filed', 'report_changed', 'report_withdrawn')
       order by e.xid desc, e.id desc limit 1), '')
$$;

CREATE FUNCTION public.search_query(wanted text) RETURNS tsquery
    LANGUAGE sql STABLE PARALLEL SAFE
    AS $_$
  select case when q::text ~ '''$' and wanted !~ '["[:space:]]$' then (q::text || ':*')::tsquery
              else q end
    from (select websearch_to_tsquery('touchneedle', wanted) as q) asked
$_$;

CREATE FUNCTION public.sees_as_published(published_audience text, club_id uuid, report_id uuid, embargo_until timestamp with time zone, clubs uuid[]) RETURNS boolean
    LANGUAGE plpgsql STABLE
    AS $$
begin
  return published_audience is not null
     and (embargo_until is null or embargo_until <= now())
     and case published_audience
       when 'public' then true
       when 'clubs' then cardinality(clubs) > 0
       when 'club' then club_id = any (clubs)
       else club_id = any (clubs) or reader_clubs_of(report_id) && clubs end;
end $$;

CREATE FUNCTION public.sees_disclosure(disclosure text, wanted_report uuid) RETURNS boolean
    LANGUAGE plpgsql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
begin
  return case disclosure when 'public' then true
    when 'clubs' then cardinality(actor_clubs()) > 0 or sees_evidence(wanted_report)
    else sees_evidence(wanted_report) end;
end $$;

CREATE FUNCTION public.sees_evidence(wanted_report uuid) RETURNS boolean
    LANGUAGE plpgsql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
begin
  if is_system_actor() then return true; end if;
  if current_actor() is null then return false; end if;
  return coalesce((select r.author_id = current_actor()
      or reviews_report(r.audience, r.club_id, r.id, r.state, actor_clubs_as('moderator'))
    from report r where r.id = wanted_report), false);
end $$;

CREATE FUNCTION public.sees_version(wanted_report uuid, wanted_version integer) RETURNS boolean
    LANGUAGE plpgsql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
declare clubs uuid[] := actor_clubs(); registrar boolean := actor_is_registrar();
begin
  if is_system_actor() then return true; end if;
  return coalesce((select
      (r.published_audience is not null
        and (registrar or sees_as_published(r.published_audience, r.club_id, r.id,
          r.embargo_until, clubs))
        and exists (select from publication p
          where p.report_id = r.id and p.version = wanted_version
            and (registrar or sees_as_published(p.audience, r.club_id, r.id, r.embargo_until,
              clubs))))
      or (current_actor() is not null and (r.author_id = current_actor()
        or reviews_report(r.audience, r.club_id, r.id, r.state, actor_clubs_as('moderator'))))
    from report r where r.id = wanted_report), false);
end $$;

CREATE FUNCTION public.send_mail_anew(lost uuid) RETURNS void
    LANGUAGE plpgsql SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
declare anew uuid;
begin
  if not (actor_is_registrar() or is_system_actor()) then
    raise exception 'only the registrar sends a lost mail anew' using errcode = '42501';
  end if;
  insert into mail (cause, kind, person_id, address, parameters)
  select m.cause || ':anew', m.kind, m.person_id, m.address, m.parameters
    from mail m where m.id = lost and m.state = 'settled_lost'
  on conflict (cause) do nothing returning id into anew;
  insert into mail_item (mail_id, report_id, publication_id, position, reasons)
  select anew, i.report_id, i.publication_id, i.position, i.reasons
    from mail_item i where i.mail_id = lost and anew is not null;
end $$;

CREATE FUNCTION public.signed_in_person(wanted uuid) RETURNS TABLE(is_registrar boolean, session_epoch integer, roles text[])
    LANGUAGE plpgsql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
begin
  return query select p.is_registrar, p.session_epoch, array(select distinct m.role
      from membership m left join club c on c.id = m.club_id
     where m.person_id = p.id and m.during @> now()
       and (m.club_id is null or c.closed_at is null))
    from person p where p.id = wanted and p.closed_at is null;
end $$;

CREATE FUNCTION public.unused_photos(created_before timestamp with time zone, at_most integer) RETURNS SETOF uuid
    LANGUAGE sql STABLE SECURITY DEFINER
    SET search_path TO 'public', 'pg_temp'
    AS $$
  select p.id from photo p
   where is_system_actor()
     and ((p.removed_at is not null
           and exists (select from photo_rendition pr where pr.photo_id = p.id))
       or (p.removed_at is null and p.created_at < created_before
         and not exists (select from report_photo rp where rp.photo_id = p.id)
         and not exists (select from draft d where d.author_id = p.owner_id
           and d.content -> 'photos' @> jsonb_build_array(jsonb_build_object('photoId', p.id)))))
   order by p.created_at, p.id limit at_most
$$;

CREATE TEXT SEARCH CONFIGURATION public.touchneedle (
    PARSER = pg_catalog."default" );

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR asciiword WITH public.unaccent, simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR word WITH public.unaccent, simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR numword WITH simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR email WITH simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR url WITH simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR host WITH simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR sfloat WITH simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR version WITH simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR hword_numpart WITH simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR hword_part WITH public.unaccent, simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR hword_asciipart WITH public.unaccent, simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR numhword WITH simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR asciihword WITH public.unaccent, simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR hword WITH public.unaccent, simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR url_path WITH simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR file WITH simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR "float" WITH simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR "int" WITH simple;

ALTER TEXT SEARCH CONFIGURATION public.touchneedle
    ADD MAPPING FOR uint WITH simple;

CREATE TABLE pgboss.archive (
    id uuid NOT NULL,
    name text NOT NULL,
    priority integer NOT NULL,
    data jsonb,
    state pgboss.job_state NOT NULL,
    retry_limit integer NOT NULL,
    retry_count integer NOT NULL,
    retry_delay integer NOT NULL,
    retry_backoff boolean NOT NULL,
    start_after timestamp with time zone NOT NULL,
    started_on timestamp with time zone,
    singleton_key text,
    singleton_on timestamp without time zone,
    expire_in interval NOT NULL,
    created_on timestamp with time zone NOT NULL,
    completed_on timestamp with time zone,
    keep_until timestamp with time zone NOT NULL,
    output jsonb,
    dead_letter text,
    policy text,
    archived_on timestamp with time zone DEFAULT now() NOT NULL
);

CREATE TABLE pgboss.job (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    name text NOT NULL,
    priority integer DEFAULT 0 NOT NULL,
    data jsonb,
    state pgboss.job_state DEFAULT 'created'::pgboss.job_state NOT NULL,
    retry_limit integer DEFAULT 2 NOT NULL,
    retry_count integer DEFAULT 0 NOT NULL,
    retry_delay integer DEFAULT 0 NOT NULL,
    retry_backoff boolean DEFAULT false NOT NULL,
    start_after timestamp with time zone DEFAULT now() NOT NULL,
    started_on timestamp with time zone,
    singleton_key text,
    singleton_on timestamp without time zone,
    expire_in interval DEFAULT '00:15:00'::interval NOT NULL,
    created_on timestamp with time zone DEFAULT now() NOT NULL,
    completed_on timestamp with time zone,
    keep_until timestamp with time zone DEFAULT (now() + '14 days'::interval) NOT NULL,
    output jsonb,
    dead_letter text,
    policy text
)
PARTITION BY LIST (name);

CREATE TABLE pgboss.j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502 (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    name text NOT NULL,
    priority integer DEFAULT 0 NOT NULL,
    data jsonb,
    state pgboss.job_state DEFAULT 'created'::pgboss.job_state NOT NULL,
    retry_limit integer DEFAULT 2 NOT NULL,
    retry_count integer DEFAULT 0 NOT NULL,
    retry_delay integer DEFAULT 0 NOT NULL,
    retry_backoff boolean DEFAULT false NOT NULL,
    start_after timestamp with time zone DEFAULT now() NOT NULL,
    started_on timestamp with time zone,
    singleton_key text,
    singleton_on timestamp without time zone,
    expire_in interval DEFAULT '00:15:00'::interval NOT NULL,
    created_on timestamp with time zone DEFAULT now() NOT NULL,
    completed_on timestamp with time zone,
    keep_until timestamp with time zone DEFAULT (now() + '14 days'::interval) NOT NULL,
    output jsonb,
    dead_letter text,
    policy text,
    CONSTRAINT cjc CHECK ((name = 'clean-up'::text))
);

CREATE TABLE pgboss.j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3 (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    name text NOT NULL,
    priority integer DEFAULT 0 NOT NULL,
    data jsonb,
    state pgboss.job_state DEFAULT 'created'::pgboss.job_state NOT NULL,
    retry_limit integer DEFAULT 2 NOT NULL,
    retry_count integer DEFAULT 0 NOT NULL,
    retry_delay integer DEFAULT 0 NOT NULL,
    retry_backoff boolean DEFAULT false NOT NULL,
    start_after timestamp with time zone DEFAULT now() NOT NULL,
    started_on timestamp with time zone,
    singleton_key text,
    singleton_on timestamp without time zone,
    expire_in interval DEFAULT '00:15:00'::interval NOT NULL,
    created_on timestamp with time zone DEFAULT now() NOT NULL,
    completed_on timestamp with time zone,
    keep_until timestamp with time zone DEFAULT (now() + '14 days'::interval) NOT NULL,
    output jsonb,
    dead_letter text,
    policy text,
    CONSTRAINT cjc CHECK ((name = '__pgboss__send-it'::text))
);

CREATE TABLE pgboss.j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14 (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    name text NOT NULL,
    priority integer DEFAULT 0 NOT NULL,
    data jsonb,
    state pgboss.job_state DEFAULT 'created'::pgboss.job_state NOT NULL,
    retry_limit integer DEFAULT 2 NOT NULL,
    retry_count integer DEFAULT 0 NOT NULL,
    retry_delay integer DEFAULT 0 NOT NULL,
    retry_backoff boolean DEFAULT false NOT NULL,
    start_after timestamp with time zone DEFAULT now() NOT NULL,
    started_on timestamp with time zone,
    singleton_key text,
    singleton_on timestamp without time zone,
    expire_in interval DEFAULT '00:15:00'::interval NOT NULL,
    created_on timestamp with time zone DEFAULT now() NOT NULL,
    completed_on timestamp with time zone,
    keep_until timestamp with time zone DEFAULT (now() + '14 days'::interval) NOT NULL,
    output jsonb,
    dead_letter text,
    policy text,
    CONSTRAINT cjc CHECK ((name = 'match-watches'::text))
);

CREATE TABLE pgboss.queue (
    name text NOT NULL,
    policy text,
    retry_limit integer,
    retry_delay integer,
    retry_backoff boolean,
    expire_seconds integer,
    retention_minutes integer,
    dead_letter text,
    partition_name text,
    created_on timestamp with time zone DEFAULT now() NOT NULL,
    updated_on timestamp with time zone DEFAULT now() NOT NULL
);

CREATE TABLE pgboss.schedule (
    name text NOT NULL,
    cron text NOT NULL,
    timezone text,
    data jsonb,
    options jsonb,
    created_on timestamp with time zone DEFAULT now() NOT NULL,
    updated_on timestamp with time zone DEFAULT now() NOT NULL
);

CREATE TABLE pgboss.subscription (
    event text NOT NULL,
    name text NOT NULL,
    created_on timestamp with time zone DEFAULT now() NOT NULL,
    updated_on timestamp with time zone DEFAULT now() NOT NULL
);

CREATE TABLE pgboss.version (
    version integer NOT NULL,
    maintained_on timestamp with time zone,
    cron_on timestamp with time zone,
    monitored_on timestamp with time zone
);

CREATE TABLE public.account_link (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    kind text NOT NULL,
    token_hash bytea NOT NULL,
    email public.citext,
    display_name text,
    person_id uuid,
    club_id uuid,
    roles text[] DEFAULT '{}'::text[] NOT NULL,
    invited_by uuid,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    expires_at timestamp with time zone NOT NULL,
    used_at timestamp with time zone,
    withdrawn_at timestamp with time zone,
    CONSTRAINT account_link_kind_known CHECK ((kind = ANY (ARRAY['reset'::text, 'invitation'::text, 'registration'::text, 'first_registrar'::text]))),
    CONSTRAINT account_link_roles_known CHECK ((roles <@ ARRAY['subscriber'::text, 'member'::text, 'moderator'::text, 'secretary'::text]))
);

CREATE TABLE public.alert (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    watch_id uuid NOT NULL,
    person_id uuid NOT NULL,
    report_id uuid NOT NULL,
    publication_id uuid NOT NULL,
    reasons jsonb NOT NULL,
    made_at timestamp with time zone DEFAULT now() NOT NULL,
    mail_id uuid
);

CREATE TABLE public.audit_chain_head (
    only_row boolean DEFAULT true NOT NULL,
    "position" bigint DEFAULT 0 NOT NULL,
    hash bytea DEFAULT decode(repeat('00'::text, 32), 'hex'::text) NOT NULL,
    CONSTRAINT audit_chain_head_only_row_check CHECK (only_row)
);

CREATE TABLE public.audit_entry (
    seq bigint NOT NULL,
    act text NOT NULL,
    actor_id uuid,
    club_id uuid,
    subject_kind text NOT NULL,
    subject_id text NOT NULL,
    details jsonb DEFAULT '{}'::jsonb NOT NULL,
    at timestamp with time zone DEFAULT clock_timestamp() NOT NULL,
    chain_position bigint,
    previous_hash bytea,
    hash bytea
);

ALTER TABLE public.audit_entry ALTER COLUMN seq ADD GENERATED ALWAYS AS IDENTITY (
    SEQUENCE NAME public.audit_entry_seq_seq
    START WITH 1
    INCREMENT BY 1
    NO MINVALUE
    NO MAXVALUE
    CACHE 1
);

CREATE TABLE public.club (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    slug text NOT NULL,
    name text NOT NULL,
    postal_address text DEFAULT ''::text NOT NULL,
    time_zone text DEFAULT 'UTC'::text NOT NULL,
    default_audience text DEFAULT 'clubs'::text NOT NULL,
    default_place_precision text DEFAULT 'region'::text NOT NULL,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    closed_at timestamp with time zone,
    CONSTRAINT club_default_audience_known CHECK ((default_audience = ANY (ARRAY['club'::text, 'named_clubs'::text, 'clubs'::text, 'public'::text]))),
    CONSTRAINT club_default_place_precision_known CHECK ((default_place_precision = ANY (ARRAY['country'::text, 'region'::text, 'town'::text]))),
    CONSTRAINT club_name_length CHECK (((length(btrim(name)) >= 1) AND (length(btrim(name)) <= 120))),
    CONSTRAINT club_slug_form CHECK (((slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$'::text) AND (length(slug) <= 60)))
);

CREATE TABLE public.coin_type (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    slug text NOT NULL,
    kind text NOT NULL,
    name text NOT NULL,
    issuer text NOT NULL,
    issuer_country text,
    metal text,
    is_demonstration boolean DEFAULT false NOT NULL,
    current_revision integer DEFAULT 1 NOT NULL,
    "position" integer DEFAULT 0 NOT NULL,
    CONSTRAINT coin_type_issuer_country_form CHECK (((issuer_country IS NULL) OR (issuer_country ~ '^[A-Z]{2}$'::text))),
    CONSTRAINT coin_type_kind_known CHECK ((kind = ANY (ARRAY['coin'::text, 'ancient'::text, 'hammered'::text, 'token'::text, 'medal'::text, 'bar'::text]))),
    CONSTRAINT coin_type_metal_known CHECK (((metal IS NULL) OR (metal = ANY (ARRAY['gold'::text, 'silver'::text, 'copper'::text, 'bronze'::text, 'brass'::text, 'nickel'::text, 'cupro_nickel'::text, 'steel'::text, 'zinc'::text, 'platinum'::text, 'bimetal'::text, 'other'::text])))),
    CONSTRAINT coin_type_slug_form CHECK ((slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$'::text))
);

CREATE TABLE public.coin_type_issue (
    coin_type_id uuid NOT NULL,
    year integer NOT NULL,
    mint_mark text DEFAULT ''::text NOT NULL,
    state text NOT NULL,
    known_count integer,
    note text DEFAULT ''::text NOT NULL,
    source text DEFAULT ''::text NOT NULL,
    CONSTRAINT coin_type_issue_state_known CHECK ((state = ANY (ARRAY['struck'::text, 'never_struck'::text, 'none_released'::text, 'few_known'::text, 'proof_only'::text])))
);

CREATE TABLE public.coin_type_legal_status (
    coin_type_id uuid NOT NULL,
    country text NOT NULL,
    status text NOT NULL,
    source text NOT NULL,
    source_kind text NOT NULL,
    CONSTRAINT coin_type_legal_status_country_form CHECK ((country ~ '^[A-Z]{2}$'::text)),
    CONSTRAINT coin_type_legal_status_known CHECK ((status = ANY (ARRAY['current'::text, 'redeemable'::text, 'obsolete'::text, 'protected'::text, 'not_money'::text]))),
    CONSTRAINT coin_type_legal_status_source_kind_known CHECK ((source_kind = ANY (ARRAY['statute'::text, 'secondary'::text, 'memory'::text])))
);

CREATE TABLE public.coin_type_revision (
    coin_type_id uuid NOT NULL,
    revision integer NOT NULL,
    standard jsonb NOT NULL,
    content_hash text NOT NULL,
    approved_by uuid,
    approved_at timestamp with time zone,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT coin_type_revision_positive CHECK ((revision >= 1))
);

CREATE TABLE public.component (
    report_id uuid NOT NULL,
    version integer NOT NULL,
    kind text NOT NULL,
    judgement text NOT NULL,
    note text DEFAULT ''::text NOT NULL,
    CONSTRAINT component_judgement_known CHECK ((judgement = ANY (ARRAY['false'::text, 'altered'::text, 'genuine'::text, 'cannot_tell'::text, 'not_present'::text]))),
    CONSTRAINT component_kind_known CHECK ((kind = ANY (ARRAY['piece'::text, 'holder'::text, 'label'::text, 'packaging'::text])))
);

CREATE TABLE public.conflict_of_interest (
    person_id uuid NOT NULL,
    report_id uuid NOT NULL,
    source text NOT NULL,
    note text DEFAULT ''::text NOT NULL,
    declared_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT conflict_of_interest_source_known CHECK ((source = ANY (ARRAY['declared'::text, 'data'::text])))
);

CREATE TABLE public.decision (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    report_id uuid NOT NULL,
    version integer NOT NULL,
    row_version_seen integer NOT NULL,
    kind text NOT NULL,
    moderator_id uuid NOT NULL,
    club_id uuid NOT NULL,
    lease_token bigint NOT NULL,
    confidence text,
    basis text[] DEFAULT '{}'::text[] NOT NULL,
    reason text NOT NULL,
    made_at timestamp with time zone DEFAULT now() NOT NULL,
    effective_at timestamp with time zone DEFAULT now() NOT NULL,
    undone_at timestamp with time zone,
    CONSTRAINT decision_basis_known CHECK ((basis <@ ARRAY['photographs'::text, 'piece_in_hand'::text, 'weight_outside'::text, 'size_outside'::text, 'density_outside'::text, 'date_never_struck'::text, 'composition_wrong'::text, 'shared_marks'::text, 'tells_named'::text])),
    CONSTRAINT decision_confidence_known CHECK (((confidence IS NULL) OR (confidence = ANY (ARRAY['suspected'::text, 'probable'::text, 'confirmed'::text])))),
    CONSTRAINT decision_confidence_when_publishing CHECK (((kind = ANY (ARRAY['publish'::text, 'agree_public'::text])) = (confidence IS NOT NULL))),
    CONSTRAINT decision_confirmed_needs_piece CHECK (((confidence IS DISTINCT FROM 'confirmed'::text) OR ((basis @> ARRAY['piece_in_hand'::text]) AND (basis && ARRAY['weight_outside'::text, 'size_outside'::text, 'density_outside'::text, 'date_never_struck'::text, 'composition_wrong'::text])))),
    CONSTRAINT decision_kind_known CHECK ((kind = ANY (ARRAY['publish'::text, 'return'::text, 'decline'::text, 'unresolved'::text, 'agree_public'::text, 'refuse_public'::text, 'retract'::text, 'agree_retract'::text]))),
    CONSTRAINT decision_reason_length CHECK (((length(btrim(reason)) >= 1) AND (length(btrim(reason)) <= 4000)))
);

CREATE TABLE public.draft (
    id uuid NOT NULL,
    author_id uuid NOT NULL,
    content jsonb NOT NULL,
    revision integer DEFAULT 1 NOT NULL,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    updated_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT draft_content_size CHECK ((pg_column_size(content) <= 262144))
);

CREATE TABLE public.genuine_feature (
    id text NOT NULL,
    seen text NOT NULL,
    "position" integer NOT NULL
);

CREATE TABLE public.mail (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    cause text NOT NULL,
    kind text NOT NULL,
    person_id uuid,
    address public.citext NOT NULL,
    state text DEFAULT 'reserved'::text NOT NULL,
    message_id text,
    parameters jsonb DEFAULT '{}'::jsonb NOT NULL,
    not_before timestamp with time zone DEFAULT now() NOT NULL,
    attempts integer DEFAULT 0 NOT NULL,
    claim_token uuid,
    claimed_until timestamp with time zone,
    answer text,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    frozen_at timestamp with time zone,
    settled_at timestamp with time zone,
    settled_by uuid,
    CONSTRAINT mail_frozen_before_ready CHECK (((state = 'reserved'::text) OR ((message_id IS NOT NULL) AND (frozen_at IS NOT NULL)))),
    CONSTRAINT mail_kind_known CHECK ((kind = ANY (ARRAY['reset'::text, 'invitation'::text, 'registration'::text, 'notice'::text, 'digest'::text, 'erratum'::text]))),
    CONSTRAINT mail_sending_iff_claimed CHECK ((((state = 'sending'::text) = (claim_token IS NOT NULL)) AND ((state = 'sending'::text) = (claimed_until IS NOT NULL)))),
    CONSTRAINT mail_state_known CHECK ((state = ANY (ARRAY['reserved'::text, 'ready'::text, 'sending'::text, 'sent'::text, 'refused'::text, 'uncertain'::text, 'dropped'::text, 'settled_sent'::text, 'settled_lost'::text])))
);

CREATE TABLE public.mail_item (
    mail_id uuid NOT NULL,
    report_id uuid NOT NULL,
    publication_id uuid NOT NULL,
    "position" integer NOT NULL,
    reasons jsonb NOT NULL,
    shown boolean
);

CREATE TABLE public.measurement (
    report_id uuid NOT NULL,
    version integer NOT NULL,
    "position" integer NOT NULL,
    quantity text NOT NULL,
    value numeric NOT NULL,
    unit text NOT NULL,
    resolution numeric,
    accuracy numeric,
    repeats integer DEFAULT 1 NOT NULL,
    spread numeric,
    CONSTRAINT measurement_quantity_known CHECK ((quantity = ANY (ARRAY['weight'::text, 'diameter'::text, 'thickness'::text, 'weight_in_water'::text, 'water_temperature'::text, 'die_axis'::text, 'magnetic'::text, 'lowest_tone'::text]))),
    CONSTRAINT measurement_repeats_range CHECK (((repeats >= 1) AND (repeats <= 1000))),
    CONSTRAINT measurement_value_range CHECK (((value >= (0)::numeric) AND (value < '10000000'::numeric)))
);

CREATE TABLE public.membership (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    person_id uuid NOT NULL,
    club_id uuid,
    role text NOT NULL,
    during tstzrange DEFAULT tstzrange(now(), NULL::timestamp with time zone, '[)'::text) NOT NULL,
    granted_by uuid,
    CONSTRAINT membership_club_unless_subscriber CHECK (((club_id IS NOT NULL) OR (role = 'subscriber'::text))),
    CONSTRAINT membership_during_not_empty CHECK ((NOT isempty(during))),
    CONSTRAINT membership_role_known CHECK ((role = ANY (ARRAY['subscriber'::text, 'member'::text, 'moderator'::text, 'secretary'::text])))
);

CREATE TABLE public.migration (
    id integer NOT NULL,
    name character varying(255),
    batch integer,
    migration_time timestamp with time zone
);

CREATE SEQUENCE public.migration_id_seq
    AS integer
    START WITH 1
    INCREMENT BY 1
    NO MINVALUE
    NO MAXVALUE
    CACHE 1;

ALTER SEQUENCE public.migration_id_seq OWNED BY public.migration.id;

CREATE TABLE public.migration_lock (
    index integer NOT NULL,
    is_locked integer
);

CREATE SEQUENCE public.migration_lock_index_seq
    AS integer
    START WITH 1
    INCREMENT BY 1
    NO MINVALUE
    NO MAXVALUE
    CACHE 1;

ALTER SEQUENCE public.migration_lock_index_seq OWNED BY public.migration_lock.index;

CREATE TABLE public.notice (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    person_id uuid NOT NULL,
    kind text NOT NULL,
    report_id uuid,
    parameters jsonb DEFAULT '{}'::jsonb NOT NULL,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    read_at timestamp with time zone,
    CONSTRAINT notice_kind_known CHECK ((kind = ANY (ARRAY['report_filed'::text, 'report_published'::text, 'report_returned'::text, 'report_declined'::text, 'report_unresolved'::text, 'report_made_public'::text, 'report_retracted'::text])))
);

CREATE TABLE public.person (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    email public.citext NOT NULL,
    display_name text NOT NULL,
    password_hash text,
    locale text DEFAULT 'en'::text NOT NULL,
    time_zone text DEFAULT 'UTC'::text NOT NULL,
    is_registrar boolean DEFAULT false NOT NULL,
    session_epoch integer DEFAULT 0 NOT NULL,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    closed_at timestamp with time zone,
    CONSTRAINT person_display_name_length CHECK (((length(btrim(display_name)) >= 1) AND (length(btrim(display_name)) <= 120))),
    CONSTRAINT person_email_form CHECK (((email OPERATOR(public.~) '^[^@[:space:]]+@[^@[:space:]]+$'::public.citext) AND (length((email)::text) <= 254)))
);

CREATE TABLE public.photo (
    id uuid NOT NULL,
    owner_id uuid NOT NULL,
    master_key text NOT NULL,
    sha256 bytea NOT NULL,
    bytes_received integer NOT NULL,
    width integer NOT NULL,
    height integer NOT NULL,
    blurs jsonb DEFAULT '[]'::jsonb NOT NULL,
    likeness_code bytea,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    removed_at timestamp with time zone,
    CONSTRAINT photo_sha256_length CHECK ((length(sha256) = 32)),
    CONSTRAINT photo_size_positive CHECK (((width > 0) AND (height > 0) AND (bytes_received > 0)))
);

CREATE TABLE public.photo_rendition (
    photo_id uuid NOT NULL,
    size text NOT NULL,
    format text NOT NULL,
    object_key text NOT NULL,
    width integer NOT NULL,
    height integer NOT NULL,
    bytes integer NOT NULL,
    CONSTRAINT photo_rendition_format_known CHECK ((format = ANY (ARRAY['webp'::text, 'jpeg'::text]))),
    CONSTRAINT photo_rendition_size_known CHECK ((size = ANY (ARRAY['small'::text, 'medium'::text, 'large'::text])))
);

CREATE TABLE public.pin (
    pin_id uuid NOT NULL,
    report_id uuid NOT NULL,
    version integer NOT NULL,
    tell_position integer NOT NULL,
    photo_id uuid NOT NULL,
    layer text DEFAULT 'reporter'::text NOT NULL,
    side text NOT NULL,
    clock_hours numeric(6,4),
    radius_fraction numeric(6,5),
    edge_angle_degrees numeric(6,2),
    edge_height_fraction numeric(6,5),
    note text DEFAULT ''::text NOT NULL,
    disclosure text NOT NULL,
    placed_by uuid,
    CONSTRAINT pin_clock_range CHECK (((clock_hours >= (0)::numeric) AND (clock_hours < (12)::numeric))),
    CONSTRAINT pin_disclosure_known CHECK ((disclosure = ANY (ARRAY['public'::text, 'clubs'::text, 'moderators'::text]))),
    CONSTRAINT pin_edge_angle_range CHECK (((edge_angle_degrees >= (0)::numeric) AND (edge_angle_degrees < (360)::numeric))),
    CONSTRAINT pin_edge_height_range CHECK (((edge_height_fraction >= (0)::numeric) AND (edge_height_fraction <= (1)::numeric))),
    CONSTRAINT pin_layer_known CHECK ((layer = ANY (ARRAY['reporter'::text, 'moderator'::text]))),
    CONSTRAINT pin_place_of_its_side CHECK (
CASE
    WHEN (side = 'edge'::text) THEN ((edge_angle_degrees IS NOT NULL) AND (edge_height_fraction IS NOT NULL) AND (clock_hours IS NULL) AND (radius_fraction IS NULL))
    ELSE ((clock_hours IS NOT NULL) AND (radius_fraction IS NOT NULL) AND (edge_angle_degrees IS NULL) AND (edge_height_fraction IS NULL))
END),
    CONSTRAINT pin_radius_range CHECK (((radius_fraction >= (0)::numeric) AND (radius_fraction <= 1.2))),
    CONSTRAINT pin_side_known CHECK ((side = ANY (ARRAY['obverse'::text, 'reverse'::text, 'edge'::text])))
);

CREATE TABLE public.production_method (
    id text NOT NULL,
    name text NOT NULL,
    "position" integer NOT NULL,
    CONSTRAINT production_method_id_form CHECK ((id ~ '^[a-z0-9]+(-[a-z0-9]+)*$'::text))
);

CREATE TABLE public.publication (
    id uuid DEFAULT gen_random_uuid() NOT NULL,
    report_id uuid NOT NULL,
    version integer NOT NULL,
    audience text NOT NULL,
    confidence text NOT NULL,
    basis text[] NOT NULL,
    during tstzrange DEFAULT tstzrange(now(), NULL::timestamp with time zone, '[)'::text) NOT NULL,
    ended_as text,
    provisional boolean DEFAULT false NOT NULL,
    CONSTRAINT publication_audience_known CHECK ((audience = ANY (ARRAY['club'::text, 'named_clubs'::text, 'clubs'::text, 'public'::text]))),
    CONSTRAINT publication_confidence_known CHECK ((confidence = ANY (ARRAY['suspected'::text, 'probable'::text, 'confirmed'::text]))),
    CONSTRAINT publication_ended_as_known CHECK (((ended_as IS NULL) OR (ended_as = ANY (ARRAY['widened'::text, 'corrected'::text, 'retracted'::text, 'merged'::text, 'withheld'::text, 'confidence_changed'::text])))),
    CONSTRAINT publication_ended_iff_closed CHECK ((upper_inf(during) = (ended_as IS NULL)))
);

CREATE TABLE public.registry_event (
    id bigint NOT NULL,
    xid xid8 DEFAULT pg_current_xact_id() NOT NULL,
    kind text NOT NULL,
    report_id uuid,
    publication_id uuid,
    at timestamp with time zone DEFAULT now() NOT NULL
);

ALTER TABLE public.registry_event ALTER COLUMN id ADD GENERATED ALWAYS AS IDENTITY (
    SEQUENCE NAME public.registry_event_id_seq
    START WITH 1
    INCREMENT BY 1
    NO MINVALUE
    NO MAXVALUE
    CACHE 1
);

CREATE TABLE public.report (
    id uuid NOT NULL,
    number text NOT NULL,
    author_id uuid NOT NULL,
    club_id uuid NOT NULL,
    state text DEFAULT 'filed'::text NOT NULL,
    audience text NOT NULL,
    published_audience text,
    embargo_until timestamp with time zone,
    current_version integer DEFAULT 1 NOT NULL,
    published_version integer,
    merged_into uuid,
    author_named boolean DEFAULT false NOT NULL,
    filed_at timestamp with time zone DEFAULT now() NOT NULL,
    decided_at timestamp with time zone,
    row_version integer DEFAULT 1 NOT NULL,
    CONSTRAINT report_audience_known CHECK ((audience = ANY (ARRAY['club'::text, 'named_clubs'::text, 'clubs'::text, 'public'::text]))),
    CONSTRAINT report_merged_iff_target CHECK (((state = 'merged'::text) = (merged_into IS NOT NULL))),
    CONSTRAINT report_number_form CHECK ((number ~ '^TN-[0-9]{2}-[0-9]{5,6}-[0-9A-Z]$'::text)),
    CONSTRAINT report_published_audience_known CHECK (((published_audience IS NULL) OR (published_audience = ANY (ARRAY['club'::text, 'named_clubs'::text, 'clubs'::text, 'public'::text])))),
    CONSTRAINT report_published_has_audience CHECK ((((published_audience IS NULL) = (published_version IS NULL)) AND ((state <> 'published'::text) OR (published_audience IS NOT NULL)))),
    CONSTRAINT report_state_known CHECK ((state = ANY (ARRAY['filed'::text, 'published'::text, 'declined'::text, 'unresolved'::text, 'returned'::text, 'withdrawn'::text, 'retracted'::text, 'merged'::text, 'withheld'::text])))
);

CREATE TABLE public.report_card (
    report_id uuid NOT NULL,
    tier text NOT NULL,
    card jsonb NOT NULL,
    CONSTRAINT report_card_tier_known CHECK ((tier = ANY (ARRAY['public'::text, 'clubs'::text])))
);

CREATE TABLE public.report_photo (
    report_id uuid NOT NULL,
    version integer NOT NULL,
    photo_id uuid NOT NULL,
    "position" integer NOT NULL,
    side text NOT NULL,
    circle jsonb,
    upright_degrees numeric(6,2) DEFAULT 0 NOT NULL,
    caption text DEFAULT ''::text NOT NULL,
    CONSTRAINT report_photo_side_known CHECK ((side = ANY (ARRAY['obverse'::text, 'reverse'::text, 'edge'::text, 'detail'::text]))),
    CONSTRAINT report_photo_upright_range CHECK (((upright_degrees >= (0)::numeric) AND (upright_degrees < (360)::numeric)))
);

CREATE TABLE public.report_reader_club (
    report_id uuid NOT NULL,
    club_id uuid NOT NULL
);

CREATE TABLE public.report_search (
    report_id uuid NOT NULL,
    tier text NOT NULL,
    number text NOT NULL,
    publication_id uuid NOT NULL,
    published_audience text NOT NULL,
    club_id uuid NOT NULL,
    reader_clubs uuid[] DEFAULT '{}'::uuid[] NOT NULL,
    embargo_until timestamp with time zone,
    state text NOT NULL,
    version integer NOT NULL,
    coin_type_id uuid,
    coin_type_slug text,
    coin_type_name text,
    title text NOT NULL,
    kind text NOT NULL,
    metal text,
    year integer,
    mint_mark text,
    confidence text NOT NULL,
    channel text NOT NULL,
    country text NOT NULL,
    region text NOT NULL,
    surfaced_month date NOT NULL,
    tells text[] NOT NULL,
    published_at timestamp with time zone NOT NULL,
    first_published_at timestamp with time zone NOT NULL,
    words tsvector NOT NULL
)
PARTITION BY LIST (tier);

CREATE TABLE public.report_search_clubs (
    report_id uuid NOT NULL,
    tier text NOT NULL,
    number text NOT NULL,
    publication_id uuid NOT NULL,
    published_audience text NOT NULL,
    club_id uuid NOT NULL,
    reader_clubs uuid[] DEFAULT '{}'::uuid[] NOT NULL,
    embargo_until timestamp with time zone,
    state text NOT NULL,
    version integer NOT NULL,
    coin_type_id uuid,
    coin_type_slug text,
    coin_type_name text,
    title text NOT NULL,
    kind text NOT NULL,
    metal text,
    year integer,
    mint_mark text,
    confidence text NOT NULL,
    channel text NOT NULL,
    country text NOT NULL,
    region text NOT NULL,
    surfaced_month date NOT NULL,
    tells text[] NOT NULL,
    published_at timestamp with time zone NOT NULL,
    first_published_at timestamp with time zone NOT NULL,
    words tsvector NOT NULL
);

CREATE TABLE public.report_search_public (
    report_id uuid NOT NULL,
    tier text NOT NULL,
    number text NOT NULL,
    publication_id uuid NOT NULL,
    published_audience text NOT NULL,
    club_id uuid NOT NULL,
    reader_clubs uuid[] DEFAULT '{}'::uuid[] NOT NULL,
    embargo_until timestamp with time zone,
    state text NOT NULL,
    version integer NOT NULL,
    coin_type_id uuid,
    coin_type_slug text,
    coin_type_name text,
    title text NOT NULL,
    kind text NOT NULL,
    metal text,
    year integer,
    mint_mark text,
    confidence text NOT NULL,
    channel text NOT NULL,
    country text NOT NULL,
    region text NOT NULL,
    surfaced_month date NOT NULL,
    tells text[] NOT NULL,
    published_at timestamp with time zone NOT NULL,
    first_published_at timestamp with time zone NOT NULL,
    words tsvector NOT NULL
);

CREATE TABLE public.report_sequence (
    year smallint NOT NULL,
    last integer DEFAULT 0 NOT NULL
);

CREATE TABLE public.report_tell (
    report_id uuid NOT NULL,
    version integer NOT NULL,
    "position" integer NOT NULL,
    tell_id text NOT NULL,
    note text DEFAULT ''::text NOT NULL,
    disclosure text NOT NULL,
    CONSTRAINT report_tell_disclosure_known CHECK ((disclosure = ANY (ARRAY['public'::text, 'clubs'::text, 'moderators'::text])))
);

CREATE TABLE public.report_version (
    report_id uuid NOT NULL,
    version integer NOT NULL,
    cause text NOT NULL,
    coin_type_id uuid,
    coin_type_revision integer,
    piece jsonb NOT NULL,
    piece_count integer DEFAULT 1 NOT NULL,
    condition text NOT NULL,
    whereabouts text NOT NULL,
    method_id text,
    account_source text DEFAULT ''::text NOT NULL,
    account_html text DEFAULT ''::text NOT NULL,
    locale text DEFAULT 'en'::text NOT NULL,
    photo_licence text NOT NULL,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    CONSTRAINT report_version_cause_known CHECK ((cause = ANY (ARRAY['filed'::text, 'changes_made'::text, 'correction'::text]))),
    CONSTRAINT report_version_condition_known CHECK ((condition = ANY (ARRAY['little_worn'::text, 'worn'::text, 'mounted'::text, 'holed'::text, 'corroded'::text]))),
    CONSTRAINT report_version_photo_licence_known CHECK ((photo_licence = ANY (ARRAY['registry_only'::text, 'bulletins_and_exports'::text]))),
    CONSTRAINT report_version_piece_count_range CHECK (((piece_count >= 1) AND (piece_count <= 100000))),
    CONSTRAINT report_version_revision_with_type CHECK (((coin_type_id IS NULL) = (coin_type_revision IS NULL))),
    CONSTRAINT report_version_whereabouts_known CHECK ((whereabouts = ANY (ARRAY['with_owner'::text, 'kept_for_study'::text, 'returned'::text, 'handed_to_authority'::text, 'destroyed'::text, 'unknown'::text])))
);

CREATE TABLE public.review_lease (
    report_id uuid NOT NULL,
    moderator_id uuid NOT NULL,
    token bigint NOT NULL,
    version_seen integer NOT NULL,
    expires_at timestamp with time zone NOT NULL
);

CREATE SEQUENCE public.review_lease_token
    START WITH 1
    INCREMENT BY 1
    NO MINVALUE
    NO MAXVALUE
    CACHE 1;

CREATE TABLE public.search_word (
    word text NOT NULL,
    weight integer DEFAULT 1 NOT NULL
);

CREATE TABLE public.session (
    sid text NOT NULL,
    sess jsonb NOT NULL,
    expire timestamp with time zone NOT NULL,
    person_id uuid GENERATED ALWAYS AS (((sess ->> 'personId'::text))::uuid) STORED
);

CREATE TABLE public.surfacing (
    report_id uuid NOT NULL,
    version integer NOT NULL,
    channel text NOT NULL,
    surfaced_month date NOT NULL,
    country text NOT NULL,
    region text DEFAULT ''::text NOT NULL,
    price_band_low numeric,
    price_band_high numeric,
    currency text,
    CONSTRAINT surfacing_channel_known CHECK ((channel = ANY (ARRAY['online_marketplace'::text, 'auction'::text, 'coin_show'::text, 'shop'::text, 'flea_market'::text, 'private_sale'::text, 'inherited_lot'::text, 'change'::text, 'other'::text]))),
    CONSTRAINT surfacing_country_form CHECK ((country ~ '^[A-Z]{2}$'::text)),
    CONSTRAINT surfacing_currency_form CHECK (((currency IS NULL) OR (currency ~ '^[A-Z]{3}$'::text))),
    CONSTRAINT surfacing_month_first_day CHECK ((EXTRACT(day FROM surfaced_month) = (1)::numeric)),
    CONSTRAINT surfacing_price_band_order CHECK (((price_band_low IS NULL) OR ((price_band_low >= (0)::numeric) AND (price_band_high > price_band_low) AND (currency IS NOT NULL))))
);

CREATE TABLE public.surfacing_detail (
    report_id uuid NOT NULL,
    version integer NOT NULL,
    surfaced_on date,
    town text DEFAULT ''::text NOT NULL,
    price numeric,
    CONSTRAINT surfacing_detail_price_range CHECK (((price IS NULL) OR ((price >= (0)::numeric) AND (price <= '1000000000000'::numeric))))
);

CREATE TABLE public.surfacing_venue (
    report_id uuid NOT NULL,
    version integer NOT NULL,
    venue text NOT NULL,
    receipt_note text DEFAULT ''::text NOT NULL
);

CREATE TABLE public.tell (
    id text NOT NULL,
    name text NOT NULL,
    seen text NOT NULL,
    place text NOT NULL,
    form text,
    methods text[] NOT NULL,
    confused_with text[] DEFAULT '{}'::text[] NOT NULL,
    disclosure text NOT NULL,
    "position" integer NOT NULL,
    CONSTRAINT tell_disclosure_known CHECK ((disclosure = ANY (ARRAY['public'::text, 'clubs'::text, 'moderators'::text]))),
    CONSTRAINT tell_form_known CHECK (((form IS NULL) OR (form = ANY (ARRAY['raised'::text, 'sunk'::text])))),
    CONSTRAINT tell_id_form CHECK ((id ~ '^[a-z0-9]+(-[a-z0-9]+)*$'::text)),
    CONSTRAINT tell_place_known CHECK ((place = ANY (ARRAY['any'::text, 'edge'::text, 'border'::text, 'whole'::text])))
);

CREATE VIEW public.visible_report_search WITH (security_barrier='false') AS
 SELECT s.report_id,
    s.tier,
    s.number,
    s.publication_id,
    s.published_audience,
    s.club_id,
    s.reader_clubs,
    s.embargo_until,
    s.state,
    s.version,
    s.coin_type_id,
    s.coin_type_slug,
    s.coin_type_name,
    s.title,
    s.kind,
    s.metal,
    s.year,
    s.mint_mark,
    s.confidence,
    s.channel,
    s.country,
    s.region,
    s.surfaced_month,
    s.tells,
    s.published_at,
    s.first_published_at,
    s.words,
    c.card
   FROM (public.report_search s
     LEFT JOIN public.report_card c ON (((c.report_id = s.report_id) AND (c.tier = s.tier))))
  WHERE ((s.tier = ANY (ARRAY[( SELECT
                CASE
                    WHEN (public.is_system_actor() OR public.actor_is_registrar() OR (cardinality(public.actor_clubs()) > 0)) THEN 'clubs'::text
                    ELSE 'public'::text
                END AS "case"), ( SELECT
                CASE
                    WHEN public.is_system_actor() THEN 'public'::text
                    WHEN (public.actor_is_registrar() OR (cardinality(public.actor_clubs()) > 0)) THEN 'clubs'::text
                    ELSE 'public'::text
                END AS "case")])) AND ((s.embargo_until IS NULL) OR (s.embargo_until <= now()) OR ( SELECT public.is_system_actor() AS is_system_actor)) AND ((s.published_audience = ANY (ARRAY['public'::text, 'clubs'::text])) OR (s.club_id = ANY (( SELECT public.actor_clubs() AS actor_clubs)::uuid[])) OR ((s.published_audience = 'named_clubs'::text) AND (s.reader_clubs && ( SELECT public.actor_clubs() AS actor_clubs))) OR ( SELECT public.is_system_actor() AS is_system_actor) OR ( SELECT public.actor_is_registrar() AS actor_is_registrar)));

CREATE TABLE public.watch (
    id uuid NOT NULL,
    person_id uuid NOT NULL,
    name text NOT NULL,
    filter jsonb NOT NULL,
    filter_format integer DEFAULT 1 NOT NULL,
    cadence text NOT NULL,
    created_at timestamp with time zone DEFAULT now() NOT NULL,
    paused_until timestamp with time zone,
    deleted_at timestamp with time zone,
    CONSTRAINT watch_cadence_known CHECK ((cadence = ANY (ARRAY['at_once'::text, 'daily'::text, 'weekly'::text]))),
    CONSTRAINT watch_name_length CHECK (((length(btrim(name)) >= 1) AND (length(btrim(name)) <= 200)))
);

ALTER TABLE ONLY pgboss.job ATTACH PARTITION pgboss.j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502 FOR VALUES IN ('clean-up');

ALTER TABLE ONLY pgboss.job ATTACH PARTITION pgboss.j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3 FOR VALUES IN ('__pgboss__send-it');

ALTER TABLE ONLY pgboss.job ATTACH PARTITION pgboss.j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14 FOR VALUES IN ('match-watches');

ALTER TABLE ONLY public.report_search ATTACH PARTITION public.report_search_clubs FOR VALUES IN ('clubs');

ALTER TABLE ONLY public.report_search ATTACH PARTITION public.report_search_public FOR VALUES IN ('public');

ALTER TABLE ONLY public.migration ALTER COLUMN id SET DEFAULT nextval('public.migration_id_seq'::regclass);

ALTER TABLE ONLY public.migration_lock ALTER COLUMN index SET DEFAULT nextval('public.migration_lock_index_seq'::regclass);

ALTER TABLE ONLY pgboss.archive
    ADD CONSTRAINT archive_pkey PRIMARY KEY (name, id);

ALTER TABLE ONLY pgboss.job
    ADD CONSTRAINT job_pkey PRIMARY KEY (name, id);

ALTER TABLE ONLY pgboss.j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502
    ADD CONSTRAINT j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502_pkey PRIMARY KEY (name, id);

ALTER TABLE ONLY pgboss.j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3
    ADD CONSTRAINT j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3_pkey PRIMARY KEY (name, id);

ALTER TABLE ONLY pgboss.j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14
    ADD CONSTRAINT j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14_pkey PRIMARY KEY (name, id);

ALTER TABLE ONLY pgboss.queue
    ADD CONSTRAINT queue_pkey PRIMARY KEY (name);

ALTER TABLE ONLY pgboss.schedule
    ADD CONSTRAINT schedule_pkey PRIMARY KEY (name);

ALTER TABLE ONLY pgboss.subscription
    ADD CONSTRAINT subscription_pkey PRIMARY KEY (event, name);

ALTER TABLE ONLY pgboss.version
    ADD CONSTRAINT version_pkey PRIMARY KEY (version);

ALTER TABLE ONLY public.account_link
    ADD CONSTRAINT account_link_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.account_link
    ADD CONSTRAINT account_link_token_unique UNIQUE (token_hash);

ALTER TABLE ONLY public.alert
    ADD CONSTRAINT alert_once UNIQUE (watch_id, report_id);

ALTER TABLE ONLY public.alert
    ADD CONSTRAINT alert_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.audit_chain_head
    ADD CONSTRAINT audit_chain_head_pkey PRIMARY KEY (only_row);

ALTER TABLE ONLY public.audit_entry
    ADD CONSTRAINT audit_entry_chain_unique UNIQUE (chain_position);

ALTER TABLE ONLY public.audit_entry
    ADD CONSTRAINT audit_entry_pkey PRIMARY KEY (seq);

ALTER TABLE ONLY public.club
    ADD CONSTRAINT club_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.club
    ADD CONSTRAINT club_slug_unique UNIQUE (slug);

ALTER TABLE ONLY public.coin_type_issue
    ADD CONSTRAINT coin_type_issue_pkey PRIMARY KEY (coin_type_id, year, mint_mark, state);

ALTER TABLE ONLY public.coin_type_legal_status
    ADD CONSTRAINT coin_type_legal_status_pkey PRIMARY KEY (coin_type_id, country);

ALTER TABLE ONLY public.coin_type
    ADD CONSTRAINT coin_type_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.coin_type_revision
    ADD CONSTRAINT coin_type_revision_pkey PRIMARY KEY (coin_type_id, revision);

ALTER TABLE ONLY public.coin_type
    ADD CONSTRAINT coin_type_slug_unique UNIQUE (slug);

ALTER TABLE ONLY public.component
    ADD CONSTRAINT component_pkey PRIMARY KEY (report_id, version, kind);

ALTER TABLE ONLY public.conflict_of_interest
    ADD CONSTRAINT conflict_of_interest_pkey PRIMARY KEY (person_id, report_id);

ALTER TABLE ONLY public.decision
    ADD CONSTRAINT decision_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.draft
    ADD CONSTRAINT draft_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.genuine_feature
    ADD CONSTRAINT genuine_feature_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.mail
    ADD CONSTRAINT mail_cause_unique UNIQUE (cause);

ALTER TABLE ONLY public.mail_item
    ADD CONSTRAINT mail_item_pkey PRIMARY KEY (mail_id, report_id);

ALTER TABLE ONLY public.mail_item
    ADD CONSTRAINT mail_item_position_unique UNIQUE (mail_id, "position");

ALTER TABLE ONLY public.mail
    ADD CONSTRAINT mail_message_id_unique UNIQUE (message_id);

ALTER TABLE ONLY public.mail
    ADD CONSTRAINT mail_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.measurement
    ADD CONSTRAINT measurement_pkey PRIMARY KEY (report_id, version, "position");

ALTER TABLE ONLY public.membership
    ADD CONSTRAINT membership_once_at_a_time EXCLUDE USING gist (person_id WITH =, COALESCE(club_id, '00000000-0000-0000-0000-000000000000'::uuid) WITH =, role WITH =, during WITH &&);

ALTER TABLE ONLY public.membership
    ADD CONSTRAINT membership_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.migration_lock
    ADD CONSTRAINT migration_lock_pkey PRIMARY KEY (index);

ALTER TABLE ONLY public.migration
    ADD CONSTRAINT migration_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.notice
    ADD CONSTRAINT notice_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.person
    ADD CONSTRAINT person_email_unique UNIQUE (email);

ALTER TABLE ONLY public.person
    ADD CONSTRAINT person_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.photo
    ADD CONSTRAINT photo_master_key_unique UNIQUE (master_key);

ALTER TABLE ONLY public.photo
    ADD CONSTRAINT photo_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.photo_rendition
    ADD CONSTRAINT photo_rendition_object_key_unique UNIQUE (object_key);

ALTER TABLE ONLY public.photo_rendition
    ADD CONSTRAINT photo_rendition_pkey PRIMARY KEY (photo_id, size, format);

ALTER TABLE ONLY public.pin
    ADD CONSTRAINT pin_pkey PRIMARY KEY (report_id, version, pin_id);

ALTER TABLE ONLY public.production_method
    ADD CONSTRAINT production_method_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.publication
    ADD CONSTRAINT publication_one_at_a_time EXCLUDE USING gist (report_id WITH =, during WITH &&);

ALTER TABLE ONLY public.publication
    ADD CONSTRAINT publication_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.registry_event
    ADD CONSTRAINT registry_event_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.report_card
    ADD CONSTRAINT report_card_pkey PRIMARY KEY (report_id, tier);

ALTER TABLE ONLY public.report
    ADD CONSTRAINT report_number_unique UNIQUE (number);

ALTER TABLE ONLY public.report_photo
    ADD CONSTRAINT report_photo_pkey PRIMARY KEY (report_id, version, photo_id);

ALTER TABLE ONLY public.report_photo
    ADD CONSTRAINT report_photo_position_unique UNIQUE (report_id, version, "position");

ALTER TABLE ONLY public.report
    ADD CONSTRAINT report_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.report_reader_club
    ADD CONSTRAINT report_reader_club_pkey PRIMARY KEY (report_id, club_id);

ALTER TABLE ONLY public.report_search
    ADD CONSTRAINT report_search_pkey PRIMARY KEY (report_id, tier);

ALTER TABLE ONLY public.report_search_clubs
    ADD CONSTRAINT report_search_clubs_pkey PRIMARY KEY (report_id, tier);

ALTER TABLE ONLY public.report_search_public
    ADD CONSTRAINT report_search_public_pkey PRIMARY KEY (report_id, tier);

ALTER TABLE ONLY public.report_sequence
    ADD CONSTRAINT report_sequence_pkey PRIMARY KEY (year);

ALTER TABLE ONLY public.report_tell
    ADD CONSTRAINT report_tell_pkey PRIMARY KEY (report_id, version, "position");

ALTER TABLE ONLY public.report_version
    ADD CONSTRAINT report_version_pkey PRIMARY KEY (report_id, version);

ALTER TABLE ONLY public.review_lease
    ADD CONSTRAINT review_lease_pkey PRIMARY KEY (report_id);

ALTER TABLE ONLY public.search_word
    ADD CONSTRAINT search_word_pkey PRIMARY KEY (word);

ALTER TABLE ONLY public.session
    ADD CONSTRAINT session_pkey PRIMARY KEY (sid);

ALTER TABLE ONLY public.surfacing_detail
    ADD CONSTRAINT surfacing_detail_pkey PRIMARY KEY (report_id, version);

ALTER TABLE ONLY public.surfacing
    ADD CONSTRAINT surfacing_pkey PRIMARY KEY (report_id, version);

ALTER TABLE ONLY public.surfacing_venue
    ADD CONSTRAINT surfacing_venue_pkey PRIMARY KEY (report_id, version);

ALTER TABLE ONLY public.tell
    ADD CONSTRAINT tell_pkey PRIMARY KEY (id);

ALTER TABLE ONLY public.watch
    ADD CONSTRAINT watch_pkey PRIMARY KEY (id);

CREATE INDEX archive_i1 ON pgboss.archive USING btree (archived_on);

CREATE UNIQUE INDEX j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502_i1 ON pgboss.j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502 USING btree (name, COALESCE(singleton_key, ''::text)) WHERE ((state = 'created'::pgboss.job_state) AND (policy = 'short'::text));

CREATE UNIQUE INDEX j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502_i2 ON pgboss.j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502 USING btree (name, COALESCE(singleton_key, ''::text)) WHERE ((state = 'active'::pgboss.job_state) AND (policy = 'singleton'::text));

CREATE UNIQUE INDEX j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502_i3 ON pgboss.j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502 USING btree (name, state, COALESCE(singleton_key, ''::text)) WHERE ((state <= 'active'::pgboss.job_state) AND (policy = 'stately'::text));

CREATE UNIQUE INDEX j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502_i4 ON pgboss.j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502 USING btree (name, singleton_on, COALESCE(singleton_key, ''::text)) WHERE ((state <> 'cancelled'::pgboss.job_state) AND (singleton_on IS NOT NULL));

CREATE INDEX j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502_i5 ON pgboss.j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502 USING btree (name, start_after) INCLUDE (priority, created_on, id) WHERE (state < 'active'::pgboss.job_state);

CREATE UNIQUE INDEX j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3_i1 ON pgboss.j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3 USING btree (name, COALESCE(singleton_key, ''::text)) WHERE ((state = 'created'::pgboss.job_state) AND (policy = 'short'::text));

CREATE UNIQUE INDEX j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3_i2 ON pgboss.j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3 USING btree (name, COALESCE(singleton_key, ''::text)) WHERE ((state = 'active'::pgboss.job_state) AND (policy = 'singleton'::text));

CREATE UNIQUE INDEX j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3_i3 ON pgboss.j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3 USING btree (name, state, COALESCE(singleton_key, ''::text)) WHERE ((state <= 'active'::pgboss.job_state) AND (policy = 'stately'::text));

CREATE UNIQUE INDEX j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3_i4 ON pgboss.j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3 USING btree (name, singleton_on, COALESCE(singleton_key, ''::text)) WHERE ((state <> 'cancelled'::pgboss.job_state) AND (singleton_on IS NOT NULL));

CREATE INDEX j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3_i5 ON pgboss.j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3 USING btree (name, start_after) INCLUDE (priority, created_on, id) WHERE (state < 'active'::pgboss.job_state);

CREATE UNIQUE INDEX j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14_i1 ON pgboss.j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14 USING btree (name, COALESCE(singleton_key, ''::text)) WHERE ((state = 'created'::pgboss.job_state) AND (policy = 'short'::text));

CREATE UNIQUE INDEX j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14_i2 ON pgboss.j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14 USING btree (name, COALESCE(singleton_key, ''::text)) WHERE ((state = 'active'::pgboss.job_state) AND (policy = 'singleton'::text));

CREATE UNIQUE INDEX j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14_i3 ON pgboss.j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14 USING btree (name, state, COALESCE(singleton_key, ''::text)) WHERE ((state <= 'active'::pgboss.job_state) AND (policy = 'stately'::text));

CREATE UNIQUE INDEX j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14_i4 ON pgboss.j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14 USING btree (name, singleton_on, COALESCE(singleton_key, ''::text)) WHERE ((state <> 'cancelled'::pgboss.job_state) AND (singleton_on IS NOT NULL));

CREATE INDEX j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14_i5 ON pgboss.j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14 USING btree (name, start_after) INCLUDE (priority, created_on, id) WHERE (state < 'active'::pgboss.job_state);

CREATE INDEX account_link_club_index ON public.account_link USING btree (club_id);

CREATE INDEX account_link_email_index ON public.account_link USING btree (email);

CREATE INDEX alert_report_index ON public.alert USING btree (report_id);

CREATE INDEX alert_waiting_index ON public.alert USING btree (person_id, made_at) WHERE (mail_id IS NULL);

CREATE INDEX audit_entry_subject_index ON public.audit_entry USING btree (subject_kind, subject_id);

CREATE UNIQUE INDEX decision_once ON public.decision USING btree (report_id, version, kind, moderator_id) WHERE (undone_at IS NULL);

CREATE INDEX decision_report_index ON public.decision USING btree (report_id, made_at);

CREATE INDEX draft_author_index ON public.draft USING btree (author_id, updated_at DESC, id);

CREATE INDEX mail_claimed_index ON public.mail USING btree (claimed_until) WHERE (state = 'sending'::text);

CREATE INDEX mail_due_index ON public.mail USING btree (not_before, id) WHERE (state = ANY (ARRAY['reserved'::text, 'ready'::text]));

CREATE INDEX mail_person_index ON public.mail USING btree (person_id, created_at DESC, id);

CREATE INDEX membership_club_index ON public.membership USING btree (club_id);

CREATE INDEX notice_person_index ON public.notice USING btree (person_id, created_at DESC, id);

CREATE INDEX photo_owner_index ON public.photo USING btree (owner_id, created_at DESC);

CREATE INDEX photo_sha256_index ON public.photo USING btree (sha256);

CREATE INDEX registry_event_order_index ON public.registry_event USING btree (xid, id);

CREATE INDEX report_author_index ON public.report USING btree (author_id, filed_at DESC, id);

CREATE INDEX report_photo_photo_index ON public.report_photo USING btree (photo_id);

CREATE INDEX report_search_type_index ON ONLY public.report_search USING btree (coin_type_slug, published_at DESC, report_id DESC);

CREATE INDEX report_search_clubs_coin_type_slug_published_at_report_id_idx ON public.report_search_clubs USING btree (coin_type_slug, published_at DESC, report_id DESC);

CREATE INDEX report_search_number_index ON ONLY public.report_search USING btree (number);

CREATE INDEX report_search_clubs_number_idx ON public.report_search_clubs USING btree (number);

CREATE INDEX report_search_order_index ON ONLY public.report_search USING btree (published_at DESC, report_id DESC);

CREATE INDEX report_search_clubs_published_at_report_id_idx ON public.report_search_clubs USING btree (published_at DESC, report_id DESC);

CREATE INDEX report_search_filter_index ON ONLY public.report_search USING gin (words, tells, coin_type_slug, metal, kind, channel, country, confidence, (ARRAY[(year / 10)]));

CREATE INDEX report_search_clubs_words_tells_coin_type_slug_metal_kind_c_idx ON public.report_search_clubs USING gin (words, tells, coin_type_slug, metal, kind, channel, country, confidence, (ARRAY[(year / 10)]));

CREATE INDEX report_search_year_index ON ONLY public.report_search USING btree (year, coin_type_slug, country, channel, metal, kind, confidence) INCLUDE (tier, report_id, published_audience, club_id, reader_clubs, embargo_until);

CREATE INDEX report_search_clubs_year_coin_type_slug_country_channel_met_idx ON public.report_search_clubs USING btree (year, coin_type_slug, country, channel, metal, kind, confidence) INCLUDE (tier, report_id, published_audience, club_id, reader_clubs, embargo_until);

CREATE INDEX report_search_public_coin_type_slug_published_at_report_id_idx ON public.report_search_public USING btree (coin_type_slug, published_at DESC, report_id DESC);

CREATE INDEX report_search_public_number_idx ON public.report_search_public USING btree (number);

CREATE INDEX report_search_public_published_at_report_id_idx ON public.report_search_public USING btree (published_at DESC, report_id DESC);

CREATE INDEX report_search_public_words_tells_coin_type_slug_metal_kind__idx ON public.report_search_public USING gin (words, tells, coin_type_slug, metal, kind, channel, country, confidence, (ARRAY[(year / 10)]));

CREATE INDEX report_search_public_year_coin_type_slug_country_channel_me_idx ON public.report_search_public USING btree (year, coin_type_slug, country, channel, metal, kind, confidence) INCLUDE (tier, report_id, published_audience, club_id, reader_clubs, embargo_until);

CREATE INDEX report_second_voice_index ON public.report USING btree (filed_at, id) WHERE ((state = 'published'::text) AND (audience = 'public'::text) AND (published_audience <> 'public'::text));

CREATE INDEX report_tell_tell_index ON public.report_tell USING btree (tell_id);

CREATE INDEX report_version_coin_type_index ON public.report_version USING btree (coin_type_id);

CREATE INDEX report_waiting_index ON public.report USING btree (filed_at, id) WHERE (state = 'filed'::text);

CREATE INDEX search_word_trigram_index ON public.search_word USING gin (word public.gin_trgm_ops);

CREATE INDEX session_expire_index ON public.session USING btree (expire);

CREATE INDEX session_person_index ON public.session USING btree (person_id);

CREATE INDEX watch_person_index ON public.watch USING btree (person_id, created_at DESC, id) WHERE (deleted_at IS NULL);

ALTER INDEX pgboss.job_pkey ATTACH PARTITION pgboss.j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502_pkey;

ALTER INDEX pgboss.job_pkey ATTACH PARTITION pgboss.j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3_pkey;

ALTER INDEX pgboss.job_pkey ATTACH PARTITION pgboss.j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14_pkey;

ALTER INDEX public.report_search_type_index ATTACH PARTITION public.report_search_clubs_coin_type_slug_published_at_report_id_idx;

ALTER INDEX public.report_search_number_index ATTACH PARTITION public.report_search_clubs_number_idx;

ALTER INDEX public.report_search_pkey ATTACH PARTITION public.report_search_clubs_pkey;

ALTER INDEX public.report_search_order_index ATTACH PARTITION public.report_search_clubs_published_at_report_id_idx;

ALTER INDEX public.report_search_filter_index ATTACH PARTITION public.report_search_clubs_words_tells_coin_type_slug_metal_kind_c_idx;

ALTER INDEX public.report_search_year_index ATTACH PARTITION public.report_search_clubs_year_coin_type_slug_country_channel_met_idx;

ALTER INDEX public.report_search_type_index ATTACH PARTITION public.report_search_public_coin_type_slug_published_at_report_id_idx;

ALTER INDEX public.report_search_number_index ATTACH PARTITION public.report_search_public_number_idx;

ALTER INDEX public.report_search_pkey ATTACH PARTITION public.report_search_public_pkey;

ALTER INDEX public.report_search_order_index ATTACH PARTITION public.report_search_public_published_at_report_id_idx;

ALTER INDEX public.report_search_filter_index ATTACH PARTITION public.report_search_public_words_tells_coin_type_slug_metal_kind__idx;

ALTER INDEX public.report_search_year_index ATTACH PARTITION public.report_search_public_year_coin_type_slug_country_channel_me_idx;

CREATE TRIGGER audit_entry_append_only BEFORE DELETE OR UPDATE ON public.audit_entry FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

CREATE CONSTRAINT TRIGGER audit_entry_joins_chain AFTER INSERT ON public.audit_entry DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION public.audit_entry_join_chain();

CREATE TRIGGER audit_entry_no_truncate BEFORE TRUNCATE ON public.audit_entry FOR EACH STATEMENT EXECUTE FUNCTION public.refuse_change();

CREATE TRIGGER club_forgets_rights AFTER DELETE OR UPDATE ON public.club FOR EACH STATEMENT EXECUTE FUNCTION public.forget_rights();

CREATE TRIGGER coin_type_revision_append_only BEFORE DELETE OR UPDATE ON public.coin_type_revision FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

CREATE TRIGGER decision_without_conflict BEFORE INSERT ON public.decision FOR EACH ROW EXECUTE FUNCTION public.decision_not_on_own_report();

CREATE TRIGGER membership_forgets_rights AFTER INSERT OR DELETE OR UPDATE ON public.membership FOR EACH STATEMENT EXECUTE FUNCTION public.forget_rights();

CREATE TRIGGER person_forgets_rights AFTER DELETE OR UPDATE ON public.person FOR EACH STATEMENT EXECUTE FUNCTION public.forget_rights();

CREATE CONSTRAINT TRIGGER publication_two_voices AFTER INSERT OR UPDATE ON public.publication DEFERRABLE INITIALLY DEFERRED FOR EACH ROW EXECUTE FUNCTION public.publication_needs_two_voices();

CREATE TRIGGER report_version_append_only BEFORE DELETE OR UPDATE ON public.report_version FOR EACH ROW EXECUTE FUNCTION public.refuse_change();

ALTER TABLE ONLY pgboss.j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502
    ADD CONSTRAINT dlq_fkey FOREIGN KEY (dead_letter) REFERENCES pgboss.queue(name) ON DELETE RESTRICT DEFERRABLE INITIALLY DEFERRED;

ALTER TABLE ONLY pgboss.j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3
    ADD CONSTRAINT dlq_fkey FOREIGN KEY (dead_letter) REFERENCES pgboss.queue(name) ON DELETE RESTRICT DEFERRABLE INITIALLY DEFERRED;

ALTER TABLE ONLY pgboss.j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14
    ADD CONSTRAINT dlq_fkey FOREIGN KEY (dead_letter) REFERENCES pgboss.queue(name) ON DELETE RESTRICT DEFERRABLE INITIALLY DEFERRED;

ALTER TABLE ONLY pgboss.j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502
    ADD CONSTRAINT q_fkey FOREIGN KEY (name) REFERENCES pgboss.queue(name) ON DELETE RESTRICT DEFERRABLE INITIALLY DEFERRED;

ALTER TABLE ONLY pgboss.j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3
    ADD CONSTRAINT q_fkey FOREIGN KEY (name) REFERENCES pgboss.queue(name) ON DELETE RESTRICT DEFERRABLE INITIALLY DEFERRED;

ALTER TABLE ONLY pgboss.j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14
    ADD CONSTRAINT q_fkey FOREIGN KEY (name) REFERENCES pgboss.queue(name) ON DELETE RESTRICT DEFERRABLE INITIALLY DEFERRED;

ALTER TABLE ONLY pgboss.queue
    ADD CONSTRAINT queue_dead_letter_fkey FOREIGN KEY (dead_letter) REFERENCES pgboss.queue(name);

ALTER TABLE ONLY pgboss.schedule
    ADD CONSTRAINT schedule_name_fkey FOREIGN KEY (name) REFERENCES pgboss.queue(name) ON DELETE CASCADE;

ALTER TABLE ONLY pgboss.subscription
    ADD CONSTRAINT subscription_name_fkey FOREIGN KEY (name) REFERENCES pgboss.queue(name) ON DELETE CASCADE;

ALTER TABLE ONLY public.account_link
    ADD CONSTRAINT account_link_club_id_fkey FOREIGN KEY (club_id) REFERENCES public.club(id);

ALTER TABLE ONLY public.account_link
    ADD CONSTRAINT account_link_invited_by_fkey FOREIGN KEY (invited_by) REFERENCES public.person(id);

ALTER TABLE ONLY public.account_link
    ADD CONSTRAINT account_link_person_id_fkey FOREIGN KEY (person_id) REFERENCES public.person(id);

ALTER TABLE ONLY public.alert
    ADD CONSTRAINT alert_mail_id_fkey FOREIGN KEY (mail_id) REFERENCES public.mail(id);

ALTER TABLE ONLY public.alert
    ADD CONSTRAINT alert_person_id_fkey FOREIGN KEY (person_id) REFERENCES public.person(id);

ALTER TABLE ONLY public.alert
    ADD CONSTRAINT alert_publication_id_fkey FOREIGN KEY (publication_id) REFERENCES public.publication(id);

ALTER TABLE ONLY public.alert
    ADD CONSTRAINT alert_report_id_fkey FOREIGN KEY (report_id) REFERENCES public.report(id);

ALTER TABLE ONLY public.alert
    ADD CONSTRAINT alert_watch_id_fkey FOREIGN KEY (watch_id) REFERENCES public.watch(id);

ALTER TABLE ONLY public.coin_type
    ADD CONSTRAINT coin_type_current_revision_exists FOREIGN KEY (id, current_revision) REFERENCES public.coin_type_revision(coin_type_id, revision) DEFERRABLE INITIALLY DEFERRED;

ALTER TABLE ONLY public.coin_type_issue
    ADD CONSTRAINT coin_type_issue_coin_type_id_fkey FOREIGN KEY (coin_type_id) REFERENCES public.coin_type(id);

ALTER TABLE ONLY public.coin_type_legal_status
    ADD CONSTRAINT coin_type_legal_status_coin_type_id_fkey FOREIGN KEY (coin_type_id) REFERENCES public.coin_type(id);

ALTER TABLE ONLY public.coin_type_revision
    ADD CONSTRAINT coin_type_revision_approved_by_fkey FOREIGN KEY (approved_by) REFERENCES public.person(id);

ALTER TABLE ONLY public.coin_type_revision
    ADD CONSTRAINT coin_type_revision_coin_type_id_fkey FOREIGN KEY (coin_type_id) REFERENCES public.coin_type(id);

ALTER TABLE ONLY public.component
    ADD CONSTRAINT component_report_id_version_fkey FOREIGN KEY (report_id, version) REFERENCES public.report_version(report_id, version);

ALTER TABLE ONLY public.conflict_of_interest
    ADD CONSTRAINT conflict_of_interest_person_id_fkey FOREIGN KEY (person_id) REFERENCES public.person(id);

ALTER TABLE ONLY public.conflict_of_interest
    ADD CONSTRAINT conflict_of_interest_report_id_fkey FOREIGN KEY (report_id) REFERENCES public.report(id);

ALTER TABLE ONLY public.decision
    ADD CONSTRAINT decision_club_id_fkey FOREIGN KEY (club_id) REFERENCES public.club(id);

ALTER TABLE ONLY public.decision
    ADD CONSTRAINT decision_moderator_id_fkey FOREIGN KEY (moderator_id) REFERENCES public.person(id);

ALTER TABLE ONLY public.decision
    ADD CONSTRAINT decision_report_id_version_fkey FOREIGN KEY (report_id, version) REFERENCES public.report_version(report_id, version);

ALTER TABLE ONLY public.draft
    ADD CONSTRAINT draft_author_id_fkey FOREIGN KEY (author_id) REFERENCES public.person(id);

ALTER TABLE ONLY public.mail_item
    ADD CONSTRAINT mail_item_mail_id_fkey FOREIGN KEY (mail_id) REFERENCES public.mail(id);

ALTER TABLE ONLY public.mail_item
    ADD CONSTRAINT mail_item_publication_id_fkey FOREIGN KEY (publication_id) REFERENCES public.publication(id);

ALTER TABLE ONLY public.mail_item
    ADD CONSTRAINT mail_item_report_id_fkey FOREIGN KEY (report_id) REFERENCES public.report(id);

ALTER TABLE ONLY public.mail
    ADD CONSTRAINT mail_person_id_fkey FOREIGN KEY (person_id) REFERENCES public.person(id);

ALTER TABLE ONLY public.mail
    ADD CONSTRAINT mail_settled_by_fkey FOREIGN KEY (settled_by) REFERENCES public.person(id);

ALTER TABLE ONLY public.measurement
    ADD CONSTRAINT measurement_report_id_version_fkey FOREIGN KEY (report_id, version) REFERENCES public.report_version(report_id, version);

ALTER TABLE ONLY public.membership
    ADD CONSTRAINT membership_club_id_fkey FOREIGN KEY (club_id) REFERENCES public.club(id);

ALTER TABLE ONLY public.membership
    ADD CONSTRAINT membership_granted_by_fkey FOREIGN KEY (granted_by) REFERENCES public.person(id);

ALTER TABLE ONLY public.membership
    ADD CONSTRAINT membership_person_id_fkey FOREIGN KEY (person_id) REFERENCES public.person(id);

ALTER TABLE ONLY public.notice
    ADD CONSTRAINT notice_person_id_fkey FOREIGN KEY (person_id) REFERENCES public.person(id);

ALTER TABLE ONLY public.notice
    ADD CONSTRAINT notice_report_id_fkey FOREIGN KEY (report_id) REFERENCES public.report(id);

ALTER TABLE ONLY public.photo
    ADD CONSTRAINT photo_owner_id_fkey FOREIGN KEY (owner_id) REFERENCES public.person(id);

ALTER TABLE ONLY public.photo_rendition
    ADD CONSTRAINT photo_rendition_photo_id_fkey FOREIGN KEY (photo_id) REFERENCES public.photo(id);

ALTER TABLE ONLY public.pin
    ADD CONSTRAINT pin_placed_by_fkey FOREIGN KEY (placed_by) REFERENCES public.person(id);

ALTER TABLE ONLY public.pin
    ADD CONSTRAINT pin_report_id_version_photo_id_fkey FOREIGN KEY (report_id, version, photo_id) REFERENCES public.report_photo(report_id, version, photo_id);

ALTER TABLE ONLY public.pin
    ADD CONSTRAINT pin_report_id_version_tell_position_fkey FOREIGN KEY (report_id, version, tell_position) REFERENCES public.report_tell(report_id, version, "position");

ALTER TABLE ONLY public.publication
    ADD CONSTRAINT publication_report_id_version_fkey FOREIGN KEY (report_id, version) REFERENCES public.report_version(report_id, version);

ALTER TABLE ONLY public.registry_event
    ADD CONSTRAINT registry_event_publication_id_fkey FOREIGN KEY (publication_id) REFERENCES public.publication(id);

ALTER TABLE ONLY public.registry_event
    ADD CONSTRAINT registry_event_report_id_fkey FOREIGN KEY (report_id) REFERENCES public.report(id);

ALTER TABLE ONLY public.report
    ADD CONSTRAINT report_author_id_fkey FOREIGN KEY (author_id) REFERENCES public.person(id);

ALTER TABLE ONLY public.report_card
    ADD CONSTRAINT report_card_report_id_fkey FOREIGN KEY (report_id) REFERENCES public.report(id);

ALTER TABLE ONLY public.report
    ADD CONSTRAINT report_club_id_fkey FOREIGN KEY (club_id) REFERENCES public.club(id);

ALTER TABLE ONLY public.report
    ADD CONSTRAINT report_current_version_exists FOREIGN KEY (id, current_version) REFERENCES public.report_version(report_id, version) DEFERRABLE INITIALLY DEFERRED;

ALTER TABLE ONLY public.report
    ADD CONSTRAINT report_merged_into_fkey FOREIGN KEY (merged_into) REFERENCES public.report(id);

ALTER TABLE ONLY public.report_photo
    ADD CONSTRAINT report_photo_photo_id_fkey FOREIGN KEY (photo_id) REFERENCES public.photo(id);

ALTER TABLE ONLY public.report_photo
    ADD CONSTRAINT report_photo_report_id_version_fkey FOREIGN KEY (report_id, version) REFERENCES public.report_version(report_id, version);

ALTER TABLE ONLY public.report
    ADD CONSTRAINT report_published_version_exists FOREIGN KEY (id, published_version) REFERENCES public.report_version(report_id, version) DEFERRABLE INITIALLY DEFERRED;

ALTER TABLE ONLY public.report_reader_club
    ADD CONSTRAINT report_reader_club_club_id_fkey FOREIGN KEY (club_id) REFERENCES public.club(id);

ALTER TABLE ONLY public.report_reader_club
    ADD CONSTRAINT report_reader_club_report_id_fkey FOREIGN KEY (report_id) REFERENCES public.report(id);

ALTER TABLE public.report_search
    ADD CONSTRAINT report_search_publication_id_fkey FOREIGN KEY (publication_id) REFERENCES public.publication(id);

ALTER TABLE public.report_search
    ADD CONSTRAINT report_search_report_id_fkey FOREIGN KEY (report_id) REFERENCES public.report(id);

ALTER TABLE ONLY public.report_tell
    ADD CONSTRAINT report_tell_report_id_version_fkey FOREIGN KEY (report_id, version) REFERENCES public.report_version(report_id, version);

ALTER TABLE ONLY public.report_tell
    ADD CONSTRAINT report_tell_tell_id_fkey FOREIGN KEY (tell_id) REFERENCES public.tell(id);

ALTER TABLE ONLY public.report_version
    ADD CONSTRAINT report_version_coin_type_id_coin_type_revision_fkey FOREIGN KEY (coin_type_id, coin_type_revision) REFERENCES public.coin_type_revision(coin_type_id, revision);

ALTER TABLE ONLY public.report_version
    ADD CONSTRAINT report_version_coin_type_id_fkey FOREIGN KEY (coin_type_id) REFERENCES public.coin_type(id);

ALTER TABLE ONLY public.report_version
    ADD CONSTRAINT report_version_method_id_fkey FOREIGN KEY (method_id) REFERENCES public.production_method(id);

ALTER TABLE ONLY public.report_version
    ADD CONSTRAINT report_version_report_id_fkey FOREIGN KEY (report_id) REFERENCES public.report(id);

ALTER TABLE ONLY public.review_lease
    ADD CONSTRAINT review_lease_moderator_id_fkey FOREIGN KEY (moderator_id) REFERENCES public.person(id);

ALTER TABLE ONLY public.review_lease
    ADD CONSTRAINT review_lease_report_id_fkey FOREIGN KEY (report_id) REFERENCES public.report(id);

ALTER TABLE ONLY public.surfacing_detail
    ADD CONSTRAINT surfacing_detail_report_id_version_fkey FOREIGN KEY (report_id, version) REFERENCES public.surfacing(report_id, version);

ALTER TABLE ONLY public.surfacing
    ADD CONSTRAINT surfacing_report_id_version_fkey FOREIGN KEY (report_id, version) REFERENCES public.report_version(report_id, version);

ALTER TABLE ONLY public.surfacing_venue
    ADD CONSTRAINT surfacing_venue_report_id_version_fkey FOREIGN KEY (report_id, version) REFERENCES public.surfacing(report_id, version);

ALTER TABLE ONLY public.watch
    ADD CONSTRAINT watch_person_id_fkey FOREIGN KEY (person_id) REFERENCES public.person(id);

ALTER TABLE public.account_link ENABLE ROW LEVEL SECURITY;

CREATE POLICY account_link_added ON public.account_link FOR INSERT TO touchneedle_app WITH CHECK ((( SELECT public.is_system_actor() AS is_system_actor) OR ( SELECT public.actor_is_registrar() AS actor_is_registrar) OR (club_id = ANY (( SELECT public.actor_clubs_as('secretary'::text) AS actor_clubs_as)::uuid[]))));

CREATE POLICY account_link_changed ON public.account_link FOR UPDATE TO touchneedle_app USING ((( SELECT public.is_system_actor() AS is_system_actor) OR ( SELECT public.actor_is_registrar() AS actor_is_registrar) OR (club_id = ANY (( SELECT public.actor_clubs_as('secretary'::text) AS actor_clubs_as)::uuid[])))) WITH CHECK (true);

CREATE POLICY account_link_seen ON public.account_link FOR SELECT TO touchneedle_app USING ((( SELECT public.is_system_actor() AS is_system_actor) OR ( SELECT public.actor_is_registrar() AS actor_is_registrar) OR (club_id = ANY (( SELECT public.actor_clubs_as('secretary'::text) AS actor_clubs_as)::uuid[]))));

ALTER TABLE public.alert ENABLE ROW LEVEL SECURITY;

CREATE POLICY alert_own ON public.alert FOR SELECT TO touchneedle_app USING (((person_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor)));

CREATE POLICY alert_written ON public.alert TO touchneedle_app USING (( SELECT public.is_system_actor() AS is_system_actor)) WITH CHECK (( SELECT public.is_system_actor() AS is_system_actor));

ALTER TABLE public.audit_entry ENABLE ROW LEVEL SECURITY;

CREATE POLICY audit_entry_added ON public.audit_entry FOR INSERT TO touchneedle_app WITH CHECK ((( SELECT public.is_system_actor() AS is_system_actor) OR (NOT (actor_id IS DISTINCT FROM ( SELECT public.current_actor() AS current_actor)))));

CREATE POLICY audit_entry_seen ON public.audit_entry FOR SELECT TO touchneedle_app USING ((( SELECT public.is_system_actor() AS is_system_actor) OR ( SELECT public.actor_is_registrar() AS actor_is_registrar)));

ALTER TABLE public.component ENABLE ROW LEVEL SECURITY;

CREATE POLICY component_added ON public.component FOR INSERT TO touchneedle_app WITH CHECK (public.sees_evidence(report_id));

CREATE POLICY component_seen ON public.component FOR SELECT TO touchneedle_app USING (public.sees_version(report_id, version));

ALTER TABLE public.conflict_of_interest ENABLE ROW LEVEL SECURITY;

CREATE POLICY conflict_of_interest_added ON public.conflict_of_interest FOR INSERT TO touchneedle_app WITH CHECK (((person_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor)));

CREATE POLICY conflict_of_interest_seen ON public.conflict_of_interest FOR SELECT TO touchneedle_app USING (public.sees_evidence(report_id));

ALTER TABLE public.decision ENABLE ROW LEVEL SECURITY;

CREATE POLICY decision_added ON public.decision FOR INSERT TO touchneedle_app WITH CHECK (((moderator_id = ( SELECT public.current_actor() AS current_actor)) AND (club_id = ANY (( SELECT public.actor_clubs_as('moderator'::text) AS actor_clubs_as)::uuid[]))));

CREATE POLICY decision_seen ON public.decision FOR SELECT TO touchneedle_app USING (public.sees_evidence(report_id));

CREATE POLICY decision_undone ON public.decision FOR UPDATE TO touchneedle_app USING ((moderator_id = ( SELECT public.current_actor() AS current_actor))) WITH CHECK (true);

ALTER TABLE public.draft ENABLE ROW LEVEL SECURITY;

CREATE POLICY draft_own ON public.draft TO touchneedle_app USING ((author_id = ( SELECT public.current_actor() AS current_actor))) WITH CHECK ((author_id = ( SELECT public.current_actor() AS current_actor)));

ALTER TABLE public.mail ENABLE ROW LEVEL SECURITY;

CREATE POLICY mail_changed ON public.mail FOR UPDATE TO touchneedle_app USING ((( SELECT public.is_system_actor() AS is_system_actor) OR ( SELECT public.actor_is_registrar() AS actor_is_registrar))) WITH CHECK (true);

ALTER TABLE public.mail_item ENABLE ROW LEVEL SECURITY;

CREATE POLICY mail_item_system ON public.mail_item TO touchneedle_app USING (( SELECT public.is_system_actor() AS is_system_actor)) WITH CHECK (( SELECT public.is_system_actor() AS is_system_actor));

CREATE POLICY mail_reserved ON public.mail FOR INSERT TO touchneedle_app WITH CHECK (( SELECT public.is_system_actor() AS is_system_actor));

CREATE POLICY mail_seen ON public.mail FOR SELECT TO touchneedle_app USING ((( SELECT public.is_system_actor() AS is_system_actor) OR (person_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.actor_is_registrar() AS actor_is_registrar) OR ((kind = 'invitation'::text) AND (((parameters ->> 'clubId'::text))::uuid = ANY (( SELECT public.actor_clubs_as('secretary'::text) AS actor_clubs_as)::uuid[])))));

ALTER TABLE public.measurement ENABLE ROW LEVEL SECURITY;

CREATE POLICY measurement_added ON public.measurement FOR INSERT TO touchneedle_app WITH CHECK (public.sees_evidence(report_id));

CREATE POLICY measurement_seen ON public.measurement FOR SELECT TO touchneedle_app USING (public.sees_version(report_id, version));

ALTER TABLE public.membership ENABLE ROW LEVEL SECURITY;

CREATE POLICY membership_added ON public.membership FOR INSERT TO touchneedle_app WITH CHECK ((( SELECT public.is_system_actor() AS is_system_actor) OR ( SELECT public.actor_is_registrar() AS actor_is_registrar) OR (club_id = ANY (( SELECT public.actor_clubs_as('secretary'::text) AS actor_clubs_as)::uuid[])) OR ((person_id = ( SELECT public.current_actor() AS current_actor)) AND (role = 'subscriber'::text) AND (club_id IS NULL))));

CREATE POLICY membership_changed ON public.membership FOR UPDATE TO touchneedle_app USING ((( SELECT public.is_system_actor() AS is_system_actor) OR ( SELECT public.actor_is_registrar() AS actor_is_registrar) OR (club_id = ANY (( SELECT public.actor_clubs_as('secretary'::text) AS actor_clubs_as)::uuid[])))) WITH CHECK (true);

CREATE POLICY membership_seen ON public.membership FOR SELECT TO touchneedle_app USING (((person_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor) OR ( SELECT public.actor_is_registrar() AS actor_is_registrar) OR (club_id = ANY (( SELECT public.actor_clubs_as('secretary'::text) AS actor_clubs_as)::uuid[]))));

ALTER TABLE public.notice ENABLE ROW LEVEL SECURITY;

CREATE POLICY notice_added ON public.notice FOR INSERT TO touchneedle_app WITH CHECK (true);

CREATE POLICY notice_own ON public.notice FOR SELECT TO touchneedle_app USING (((person_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor)));

CREATE POLICY notice_read ON public.notice FOR UPDATE TO touchneedle_app USING ((person_id = ( SELECT public.current_actor() AS current_actor)));

ALTER TABLE public.person ENABLE ROW LEVEL SECURITY;

CREATE POLICY person_added ON public.person FOR INSERT TO touchneedle_app WITH CHECK (( SELECT public.is_system_actor() AS is_system_actor));

CREATE POLICY person_changed ON public.person FOR UPDATE TO touchneedle_app USING (((id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor))) WITH CHECK (true);

CREATE POLICY person_seen ON public.person FOR SELECT TO touchneedle_app USING (((id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor) OR ( SELECT public.actor_is_registrar() AS actor_is_registrar) OR (id IN ( SELECT m.person_id
   FROM public.membership m
  WHERE (m.club_id = ANY (( SELECT public.actor_clubs_as('secretary'::text) AS actor_clubs_as)::uuid[]))))));

ALTER TABLE public.photo ENABLE ROW LEVEL SECURITY;

CREATE POLICY photo_added ON public.photo FOR INSERT TO touchneedle_app WITH CHECK (((owner_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor)));

CREATE POLICY photo_changed ON public.photo FOR UPDATE TO touchneedle_app USING (((owner_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor)));

ALTER TABLE public.photo_rendition ENABLE ROW LEVEL SECURITY;

CREATE POLICY photo_rendition_added ON public.photo_rendition FOR INSERT TO touchneedle_app WITH CHECK ((EXISTS ( SELECT
   FROM public.photo p
  WHERE ((p.id = photo_rendition.photo_id) AND ((p.owner_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor))))));

CREATE POLICY photo_rendition_removed ON public.photo_rendition FOR DELETE TO touchneedle_app USING ((EXISTS ( SELECT
   FROM public.photo p
  WHERE ((p.id = photo_rendition.photo_id) AND ((p.owner_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor))))));

CREATE POLICY photo_rendition_seen ON public.photo_rendition FOR SELECT TO touchneedle_app USING ((EXISTS ( SELECT
   FROM public.photo p
  WHERE (p.id = photo_rendition.photo_id))));

CREATE POLICY photo_seen ON public.photo FOR SELECT TO touchneedle_app USING (((owner_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor) OR (EXISTS ( SELECT
   FROM public.report_photo rp
  WHERE (rp.photo_id = photo.id)))));

ALTER TABLE public.pin ENABLE ROW LEVEL SECURITY;

CREATE POLICY pin_added ON public.pin FOR INSERT TO touchneedle_app WITH CHECK (public.sees_evidence(report_id));

CREATE POLICY pin_seen ON public.pin FOR SELECT TO touchneedle_app USING ((public.sees_version(report_id, version) AND public.sees_disclosure(disclosure, report_id)));

ALTER TABLE public.publication ENABLE ROW LEVEL SECURITY;

CREATE POLICY publication_added ON public.publication FOR INSERT TO touchneedle_app WITH CHECK (public.sees_evidence(report_id));

CREATE POLICY publication_changed ON public.publication FOR UPDATE TO touchneedle_app USING (public.sees_evidence(report_id)) WITH CHECK (true);

CREATE POLICY publication_seen ON public.publication FOR SELECT TO touchneedle_app USING (public.sees_version(report_id, version));

ALTER TABLE public.registry_event ENABLE ROW LEVEL SECURITY;

CREATE POLICY registry_event_added ON public.registry_event FOR INSERT TO touchneedle_app WITH CHECK (true);

CREATE POLICY registry_event_seen ON public.registry_event FOR SELECT TO touchneedle_app USING ((( SELECT public.is_system_actor() AS is_system_actor) OR (EXISTS ( SELECT
   FROM public.report r
  WHERE (r.id = registry_event.report_id)))));

ALTER TABLE public.report ENABLE ROW LEVEL SECURITY;

CREATE POLICY report_added ON public.report FOR INSERT TO touchneedle_app WITH CHECK (((author_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor)));

CREATE POLICY report_changed ON public.report FOR UPDATE TO touchneedle_app USING (((author_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor) OR public.reviews_report(audience, club_id, id, state, ( SELECT public.actor_clubs_as('moderator'::text) AS actor_clubs_as)))) WITH CHECK (true);

ALTER TABLE public.report_photo ENABLE ROW LEVEL SECURITY;

CREATE POLICY report_photo_added ON public.report_photo FOR INSERT TO touchneedle_app WITH CHECK (public.sees_evidence(report_id));

CREATE POLICY report_photo_seen ON public.report_photo FOR SELECT TO touchneedle_app USING (public.sees_version(report_id, version));

ALTER TABLE public.report_reader_club ENABLE ROW LEVEL SECURITY;

CREATE POLICY report_reader_club_added ON public.report_reader_club FOR INSERT TO touchneedle_app WITH CHECK (public.sees_evidence(report_id));

CREATE POLICY report_reader_club_removed ON public.report_reader_club FOR DELETE TO touchneedle_app USING (public.sees_evidence(report_id));

CREATE POLICY report_reader_club_seen ON public.report_reader_club FOR SELECT TO touchneedle_app USING ((public.sees_evidence(report_id) OR (club_id = ANY (( SELECT public.actor_clubs() AS actor_clubs)::uuid[]))));

CREATE POLICY report_seen ON public.report FOR SELECT TO touchneedle_app USING (((author_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor) OR public.sees_as_published(published_audience, club_id, id, embargo_until, ( SELECT public.actor_clubs() AS actor_clubs)) OR public.reviews_report(audience, club_id, id, state, ( SELECT public.actor_clubs_as('moderator'::text) AS actor_clubs_as)) OR ((published_audience IS NOT NULL) AND ( SELECT public.actor_is_registrar() AS actor_is_registrar))));

ALTER TABLE public.report_tell ENABLE ROW LEVEL SECURITY;

CREATE POLICY report_tell_added ON public.report_tell FOR INSERT TO touchneedle_app WITH CHECK (public.sees_evidence(report_id));

CREATE POLICY report_tell_seen ON public.report_tell FOR SELECT TO touchneedle_app USING ((public.sees_version(report_id, version) AND public.sees_disclosure(disclosure, report_id)));

ALTER TABLE public.report_version ENABLE ROW LEVEL SECURITY;

CREATE POLICY report_version_added ON public.report_version FOR INSERT TO touchneedle_app WITH CHECK (public.sees_evidence(report_id));

CREATE POLICY report_version_seen ON public.report_version FOR SELECT TO touchneedle_app USING (public.sees_version(report_id, version));

ALTER TABLE public.review_lease ENABLE ROW LEVEL SECURITY;

CREATE POLICY review_lease_seen ON public.review_lease FOR SELECT TO touchneedle_app USING (public.sees_evidence(report_id));

CREATE POLICY review_lease_written ON public.review_lease TO touchneedle_app USING (public.sees_evidence(report_id)) WITH CHECK ((moderator_id = ( SELECT public.current_actor() AS current_actor)));

ALTER TABLE public.surfacing ENABLE ROW LEVEL SECURITY;

CREATE POLICY surfacing_added ON public.surfacing FOR INSERT TO touchneedle_app WITH CHECK (public.sees_evidence(report_id));

ALTER TABLE public.surfacing_detail ENABLE ROW LEVEL SECURITY;

CREATE POLICY surfacing_detail_added ON public.surfacing_detail FOR INSERT TO touchneedle_app WITH CHECK (public.sees_evidence(report_id));

CREATE POLICY surfacing_detail_seen ON public.surfacing_detail FOR SELECT TO touchneedle_app USING ((public.sees_version(report_id, version) AND (public.in_reporters_club(report_id) OR public.sees_evidence(report_id))));

CREATE POLICY surfacing_seen ON public.surfacing FOR SELECT TO touchneedle_app USING (public.sees_version(report_id, version));

ALTER TABLE public.surfacing_venue ENABLE ROW LEVEL SECURITY;

CREATE POLICY surfacing_venue_added ON public.surfacing_venue FOR INSERT TO touchneedle_app WITH CHECK (public.sees_evidence(report_id));

CREATE POLICY surfacing_venue_seen ON public.surfacing_venue FOR SELECT TO touchneedle_app USING (public.sees_evidence(report_id));

ALTER TABLE public.tell ENABLE ROW LEVEL SECURITY;

CREATE POLICY tell_seen ON public.tell FOR SELECT TO touchneedle_app USING (((disclosure = 'public'::text) OR ( SELECT public.is_system_actor() AS is_system_actor) OR ((disclosure = 'clubs'::text) AND (cardinality(( SELECT public.actor_clubs() AS actor_clubs)) > 0)) OR (cardinality(( SELECT public.actor_clubs_as('moderator'::text) AS actor_clubs_as)) > 0)));

ALTER TABLE public.watch ENABLE ROW LEVEL SECURITY;

CREATE POLICY watch_own ON public.watch TO touchneedle_app USING (((person_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor))) WITH CHECK (((person_id = ( SELECT public.current_actor() AS current_actor)) OR ( SELECT public.is_system_actor() AS is_system_actor)));

GRANT USAGE ON SCHEMA pgboss TO touchneedle_app;

GRANT USAGE ON SCHEMA public TO touchneedle_app;

GRANT ALL ON FUNCTION pgboss.create_queue(queue_name text, options json) TO touchneedle_app;

GRANT ALL ON FUNCTION pgboss.delete_queue(queue_name text) TO touchneedle_app;

GRANT ALL ON FUNCTION public.actor_clubs() TO touchneedle_app;

GRANT ALL ON FUNCTION public.actor_clubs_as(wanted_role text) TO touchneedle_app;

GRANT ALL ON FUNCTION public.actor_is_registrar() TO touchneedle_app;

GRANT ALL ON FUNCTION public.current_actor() TO touchneedle_app;

REVOKE ALL ON FUNCTION public.find_clubs_of(wanted_person uuid, wanted_role text) FROM PUBLIC;
GRANT ALL ON FUNCTION public.find_clubs_of(wanted_person uuid, wanted_role text) TO touchneedle_app;

REVOKE ALL ON FUNCTION public.find_is_registrar(wanted_person uuid) FROM PUBLIC;
GRANT ALL ON FUNCTION public.find_is_registrar(wanted_person uuid) TO touchneedle_app;

GRANT ALL ON FUNCTION public.is_system_actor() TO touchneedle_app;

REVOKE ALL ON FUNCTION public.renew_report_search(wanted_report uuid) FROM PUBLIC;
GRANT ALL ON FUNCTION public.renew_report_search(wanted_report uuid) TO touchneedle_app;

REVOKE ALL ON FUNCTION public.reserve_mail(wanted_cause text, mail_kind text, recipient uuid, to_address text, mail_parameters jsonb) FROM PUBLIC;
GRANT ALL ON FUNCTION public.reserve_mail(wanted_cause text, mail_kind text, recipient uuid, to_address text, mail_parameters jsonb) TO touchneedle_app;

REVOKE ALL ON FUNCTION public.reserve_notice_mail(wanted_cause text, reporter uuid, about_report uuid, mail_parameters jsonb) FROM PUBLIC;
GRANT ALL ON FUNCTION public.reserve_notice_mail(wanted_cause text, reporter uuid, about_report uuid, mail_parameters jsonb) TO touchneedle_app;

REVOKE ALL ON FUNCTION public.send_mail_anew(lost uuid) FROM PUBLIC;
GRANT ALL ON FUNCTION public.send_mail_anew(lost uuid) TO touchneedle_app;

REVOKE ALL ON FUNCTION public.signed_in_person(wanted uuid) FROM PUBLIC;
GRANT ALL ON FUNCTION public.signed_in_person(wanted uuid) TO touchneedle_app;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE pgboss.archive TO touchneedle_app;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE pgboss.job TO touchneedle_app;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE pgboss.j298f10a8091f0e07d21c83cb6e262c98802f182855ded1fa17449502 TO touchneedle_app;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE pgboss.j3f168501ed9816b51a9f5765e0742e1eb034ab6bf72c9ae3f3a975e3 TO touchneedle_app;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE pgboss.j69f179e3849614f7f3d0451c65bd10ad19c0db9930ca2a6814658d14 TO touchneedle_app;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE pgboss.queue TO touchneedle_app;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE pgboss.schedule TO touchneedle_app;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE pgboss.subscription TO touchneedle_app;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE pgboss.version TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.account_link TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.alert TO touchneedle_app;

GRANT SELECT,INSERT ON TABLE public.audit_entry TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.club TO touchneedle_app;

GRANT SELECT ON TABLE public.coin_type TO touchneedle_app;

GRANT SELECT ON TABLE public.coin_type_issue TO touchneedle_app;

GRANT SELECT ON TABLE public.coin_type_legal_status TO touchneedle_app;

GRANT SELECT ON TABLE public.coin_type_revision TO touchneedle_app;

GRANT SELECT,INSERT ON TABLE public.component TO touchneedle_app;

GRANT SELECT,INSERT ON TABLE public.conflict_of_interest TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.decision TO touchneedle_app;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE public.draft TO touchneedle_app;

GRANT SELECT ON TABLE public.genuine_feature TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.mail TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.mail_item TO touchneedle_app;

GRANT SELECT,INSERT ON TABLE public.measurement TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.membership TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.notice TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.person TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.photo TO touchneedle_app;

GRANT SELECT,INSERT,DELETE ON TABLE public.photo_rendition TO touchneedle_app;

GRANT SELECT,INSERT ON TABLE public.pin TO touchneedle_app;

GRANT SELECT ON TABLE public.production_method TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.publication TO touchneedle_app;

GRANT SELECT,INSERT ON TABLE public.registry_event TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.report TO touchneedle_app;

GRANT SELECT,INSERT ON TABLE public.report_photo TO touchneedle_app;

GRANT SELECT,INSERT,DELETE ON TABLE public.report_reader_club TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.report_sequence TO touchneedle_app;

GRANT SELECT,INSERT ON TABLE public.report_tell TO touchneedle_app;

GRANT SELECT,INSERT ON TABLE public.report_version TO touchneedle_app;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE public.review_lease TO touchneedle_app;

GRANT USAGE ON SEQUENCE public.review_lease_token TO touchneedle_app;

GRANT SELECT ON TABLE public.search_word TO touchneedle_app;

GRANT SELECT,INSERT,DELETE,UPDATE ON TABLE public.session TO touchneedle_app;

GRANT SELECT,INSERT ON TABLE public.surfacing TO touchneedle_app;

GRANT SELECT,INSERT ON TABLE public.surfacing_detail TO touchneedle_app;

GRANT SELECT,INSERT ON TABLE public.surfacing_venue TO touchneedle_app;

GRANT SELECT ON TABLE public.tell TO touchneedle_app;

GRANT SELECT ON TABLE public.visible_report_search TO touchneedle_app;

GRANT SELECT,INSERT,UPDATE ON TABLE public.watch TO touchneedle_app;
