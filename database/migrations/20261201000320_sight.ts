import type { Knex } from 'knex';

/** Who sees which report and which of its parts: row-level security, and the rights of the app. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
-- Sight. One function says who sees a report; every child row asks by its version.
create function reader_clubs_of(wanted_report uuid) returns uuid[] language plpgsql stable
  security definer set search_path = public, pg_temp as $$
begin
  return (select coalesce(array_agg(rc.club_id), '{}') from report_reader_club rc
    where rc.report_id = wanted_report);
end $$;
create function sees_as_published(published_audience text, club_id uuid, report_id uuid,
  embargo_until timestamptz, clubs uuid[]) returns boolean language plpgsql stable as $$
begin
  return published_audience is not null
     and (embargo_until is null or embargo_until <= now())
     and case published_audience
       when 'public' then true
       when 'clubs' then cardinality(clubs) > 0
       when 'club' then club_id = any (clubs)
       else club_id = any (clubs) or reader_clubs_of(report_id) && clubs end;
end $$;
-- A moderator reviews what is meant for their club: their own club's reports, and those whose
-- asked audience reaches them.
create function reviews_report(audience text, club_id uuid, report_id uuid, state text,
  clubs uuid[]) returns boolean language plpgsql stable as $$
begin
  return cardinality(clubs) > 0 and state not in ('withdrawn') and case audience
    when 'club' then club_id = any (clubs)
    when 'named_clubs' then club_id = any (clubs) or reader_clubs_of(report_id) && clubs
    else true end;
end $$;

alter table report enable row level security;
create policy report_seen on report for select to touchneedle_app using (
  author_id = (select current_actor())
  or (select is_system_actor())
  or sees_as_published(published_audience, club_id, id, embargo_until,
       (select actor_clubs())::uuid[])
  or reviews_report(audience, club_id, id, state, (select actor_clubs_as('moderator'))::uuid[])
  or (published_audience is not null and (select actor_is_registrar())));
create policy report_added on report for insert to touchneedle_app
  with check (author_id = (select current_actor()) or (select is_system_actor()));
create policy report_changed on report for update to touchneedle_app using (
  author_id = (select current_actor()) or (select is_system_actor())
  or reviews_report(audience, club_id, id, state, (select actor_clubs_as('moderator'))::uuid[]))
  with check (true);

-- True where the actor sees unpublished versions and moderators' evidence of this report.
create function sees_evidence(wanted_report uuid) returns boolean language plpgsql stable
  security definer set search_path = public, pg_temp as $$
declare r record;
begin
  if is_system_actor() then return true; end if;
  if current_actor() is null then return false; end if;
  select author_id, audience, club_id, state into r from report where id = wanted_report;
  return found and (r.author_id = current_actor()
    or reviews_report(r.audience, r.club_id, wanted_report, r.state,
         actor_clubs_as('moderator')));
end $$;
create function in_reporters_club(wanted_report uuid) returns boolean language plpgsql stable
  security definer set search_path = public, pg_temp as $$
begin
  return exists (select from report r where r.id = wanted_report
    and r.club_id = any (actor_clubs()));
end $$;
-- The versions of a report that the actor may read: of a report that they may see, the published
-- ones whose publication reached the actor's circle, and every one for author and reviewers.
create function sees_version(wanted_report uuid, wanted_version integer) returns boolean
  language plpgsql stable security definer set search_path = public, pg_temp as $$
declare r record; clubs uuid[];
begin
  if is_system_actor() then return true; end if;
  select author_id, audience, published_audience, club_id, embargo_until, state into r
    from report where id = wanted_report;
  if not found then return false; end if;
  if r.published_audience is not null then
    if actor_is_registrar() then
      if exists (select from publication p where p.report_id = wanted_report
                   and p.version = wanted_version) then return true; end if;
    else
      clubs := actor_clubs();
      if sees_as_published(r.published_audience, r.club_id, wanted_report, r.embargo_until, clubs)
         and exists (select from publication p
           where p.report_id = wanted_report and p.version = wanted_version
             and sees_as_published(p.audience, r.club_id, wanted_report, r.embargo_until, clubs))
      then return true; end if;
    end if;
  end if;
  return current_actor() is not null and (r.author_id = current_actor()
    or reviews_report(r.audience, r.club_id, wanted_report, r.state,
         actor_clubs_as('moderator')));
end $$;
create function sees_disclosure(disclosure text, wanted_report uuid) returns boolean
  language plpgsql stable security definer set search_path = public, pg_temp as $$
begin
  return case disclosure when 'public' then true
    when 'clubs' then cardinality(actor_clubs()) > 0 or sees_evidence(wanted_report)
    else sees_evidence(wanted_report) end;
end $$;

${['report_version', 'component', 'report_photo', 'measurement', 'surfacing']
  .map((table) => `
alter table ${table} enable row level security;
create policy ${table}_seen on ${table} for select to touchneedle_app
  using (sees_version(${table}.report_id, ${table}.version));
create policy ${table}_added on ${table} for insert to touchneedle_app
  with check (sees_evidence(${table}.report_id));
`).join('')}
${['report_tell', 'pin'].map((table) => `
alter table ${table} enable row level security;
create policy ${table}_seen on ${table} for select to touchneedle_app using (
  sees_version(${table}.report_id, ${table}.version)
  and sees_disclosure(${table}.disclosure, ${table}.report_id));
create policy ${table}_added on ${table} for insert to touchneedle_app
  with check (sees_evidence(${table}.report_id));
`).join('')}
alter table surfacing_detail enable row level security;
create policy surfacing_detail_seen on surfacing_detail for select to touchneedle_app using (
  sees_version(report_id, version)
  and (in_reporters_club(report_id) or sees_evidence(report_id)));
create policy surfacing_detail_added on surfacing_detail for insert to touchneedle_app
  with check (sees_evidence(report_id));
alter table surfacing_venue enable row level security;
create policy surfacing_venue_seen on surfacing_venue for select to touchneedle_app
  using (sees_evidence(report_id));
create policy surfacing_venue_added on surfacing_venue for insert to touchneedle_app
  with check (sees_evidence(report_id));

alter table report_reader_club enable row level security;
create policy report_reader_club_seen on report_reader_club for select to touchneedle_app using (
  sees_evidence(report_id) or club_id = any ((select actor_clubs())::uuid[]));
create policy report_reader_club_added on report_reader_club for insert to touchneedle_app
  with check (sees_evidence(report_id));
create policy report_reader_club_removed on report_reader_club for delete to touchneedle_app
  using (sees_evidence(report_id));

alter table photo enable row level security;
create policy photo_seen on photo for select to touchneedle_app using (
  owner_id = (select current_actor()) or (select is_system_actor())
  or exists (select from report_photo rp where rp.photo_id = photo.id));
create policy photo_added on photo for insert to touchneedle_app
  with check (owner_id = (select current_actor()) or (select is_system_actor()));
create policy photo_changed on photo for update to touchneedle_app
  using (owner_id = (select current_actor()) or (select is_system_actor()));
alter table photo_rendition enable row level security;
create policy photo_rendition_seen on photo_rendition for select to touchneedle_app
  using (exists (select from photo p where p.id = photo_id));
create policy photo_rendition_added on photo_rendition for insert to touchneedle_app
  with check (exists (select from photo p where p.id = photo_id
    and (p.owner_id = (select current_actor()) or (select is_system_actor()))));
create policy photo_rendition_removed on photo_rendition for delete to touchneedle_app
  using (exists (select from photo p where p.id = photo_id
    and (p.owner_id = (select current_actor()) or (select is_system_actor()))));

alter table draft enable row level security;
create policy draft_own on draft to touchneedle_app
  using (author_id = (select current_actor()))
  with check (author_id = (select current_actor()));

${['review_lease', 'conflict_of_interest', 'decision'].map((table) => `
alter table ${table} enable row level security;
create policy ${table}_seen on ${table} for select to touchneedle_app
  using (sees_evidence(report_id));
`).join('')}
create policy review_lease_written on review_lease to touchneedle_app
  using (sees_evidence(report_id)) with check (moderator_id = (select current_actor()));
create policy conflict_of_interest_added on conflict_of_interest for insert to touchneedle_app
  with check (person_id = (select current_actor()) or (select is_system_actor()));
create policy decision_added on decision for insert to touchneedle_app
  with check (moderator_id = (select current_actor())
    and club_id = any ((select actor_clubs_as('moderator'))::uuid[]));
create policy decision_undone on decision for update to touchneedle_app
  using (moderator_id = (select current_actor())) with check (true);

alter table publication enable row level security;
create policy publication_seen on publication for select to touchneedle_app
  using (sees_version(report_id, version));
create policy publication_added on publication for insert to touchneedle_app
  with check (sees_evidence(report_id));
create policy publication_changed on publication for update to touchneedle_app
  using (sees_evidence(report_id)) with check (true);

alter table registry_event enable row level security;
create policy registry_event_seen on registry_event for select to touchneedle_app
  using ((select is_system_actor()) or exists (select from report r where r.id = report_id));
create policy registry_event_added on registry_event for insert to touchneedle_app
  with check (true);

alter table notice enable row level security;
create policy notice_own on notice for select to touchneedle_app
  using (person_id = (select current_actor()) or (select is_system_actor()));
create policy notice_read on notice for update to touchneedle_app
  using (person_id = (select current_actor()));
create policy notice_added on notice for insert to touchneedle_app with check (true);

-- The reporter's name: for the moderators who decide, and for readers where the reporter chose.
create function reporter_name(wanted_report uuid) returns text language plpgsql stable
  security definer set search_path = public, pg_temp as $$
begin
  return (select p.display_name from report r join person p on p.id = r.author_id
   where r.id = wanted_report and (r.author_named or sees_evidence(wanted_report)));
end $$;

-- True where tells or pins of this version exist that the actor may not see; not which, nor how
-- many.
create function holds_back_tells(wanted_report uuid, wanted_version integer) returns boolean
  language plpgsql stable security definer set search_path = public, pg_temp as $$
begin
  return exists (select from report_tell rt join tell t on t.id = rt.tell_id
      where rt.report_id = wanted_report and rt.version = wanted_version
        and not (sees_disclosure(rt.disclosure, rt.report_id)
          and (t.disclosure = 'public'
            or (t.disclosure = 'clubs' and cardinality(actor_clubs()) > 0)
            or cardinality(actor_clubs_as('moderator')) > 0)))
    or exists (select from pin p
      where p.report_id = wanted_report and p.version = wanted_version
        and not sees_disclosure(p.disclosure, p.report_id));
end $$;

-- Why a published report was retracted: shown to whoever may see the report.
create function retraction_reason(wanted_report uuid) returns text language plpgsql stable
  security definer set search_path = public, pg_temp as $$
begin
  return (select d.reason from decision d join report r on r.id = d.report_id
   where d.report_id = wanted_report and d.kind = 'retract' and d.undone_at is null
     and r.state = 'retracted'
     and (sees_as_published(r.published_audience, r.club_id, r.id, r.embargo_until, actor_clubs())
          or sees_evidence(wanted_report))
   order by d.made_at desc limit 1);
end $$;

-- For the worker: photos that no report has and no draft has had for a while, and removed ones
-- whose objects may still lie in the store. Drafts are hidden from the worker itself.
create function unused_photos(created_before timestamptz, at_most integer) returns setof uuid
  language sql stable security definer set search_path = public, pg_temp as $$
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

grant select, insert, update on report, photo, decision, publication, notice to touchneedle_app;
grant select, insert on report_version, component, report_photo, report_tell, pin, measurement,
  surfacing, surfacing_detail, surfacing_venue, report_reader_club, conflict_of_interest,
  registry_event to touchneedle_app;
grant select, insert, delete on photo_rendition, report_reader_club to touchneedle_app;
grant select, insert, update, delete on draft, review_lease to touchneedle_app;
grant select, insert, update on report_sequence to touchneedle_app;
grant usage on sequence review_lease_token to touchneedle_app;
`);
}

const tables = ['report', 'report_reader_club', 'report_version', 'component', 'report_photo',
  'report_tell', 'pin', 'measurement', 'surfacing', 'surfacing_detail', 'surfacing_venue', 'photo',
  'photo_rendition', 'draft', 'review_lease', 'conflict_of_interest', 'decision', 'publication',
  'registry_event', 'notice'];

export async function down(knex: Knex): Promise<void> {
  const { rows } = await knex.raw(`select policyname, tablename from pg_policies
    where schemaname = 'public' and tablename = any (?)`, [tables]);
  for (const { policyname, tablename } of rows) {
    await knex.raw('drop policy ?? on ??', [policyname, tablename]);
  }
  for (const table of tables) {
    await knex.raw('alter table ?? disable row level security', [table]);
  }
  await knex.raw(`
revoke all on ${tables.join(', ')}, report_sequence from touchneedle_app;
revoke all on sequence review_lease_token from touchneedle_app;
drop function holds_back_tells(uuid, integer), retraction_reason(uuid),
  unused_photos(timestamptz, integer), reporter_name(uuid), sees_disclosure(text, uuid),
  sees_version(uuid, integer), in_reporters_club(uuid), sees_evidence(uuid),
  reviews_report(text, uuid, uuid, text, uuid[]),
  sees_as_published(text, uuid, uuid, timestamptz, uuid[]), reader_clubs_of(uuid);
`);
}
