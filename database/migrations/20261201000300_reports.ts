import type { Knex } from 'knex';

/** Drafts, photos, reports with their versions, evidence, review, publication, and who sees them. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
create table photo (
  id uuid primary key,
  owner_id uuid not null references person (id),
  master_key text not null,
  sha256 bytea not null,
  bytes_received integer not null,
  width integer not null,
  height integer not null,
  blurs jsonb not null default '[]',
  likeness_code bytea,
  created_at timestamptz not null default now(),
  removed_at timestamptz,
  constraint photo_master_key_unique unique (master_key),
  constraint photo_sha256_length check (length(sha256) = 32),
  constraint photo_size_positive check (width > 0 and height > 0 and bytes_received > 0)
);
create index photo_owner_index on photo (owner_id, created_at desc);
create index photo_sha256_index on photo (sha256);

create table photo_rendition (
  photo_id uuid not null references photo (id),
  size text not null,
  format text not null,
  object_key text not null,
  width integer not null,
  height integer not null,
  bytes integer not null,
  primary key (photo_id, size, format),
  constraint photo_rendition_object_key_unique unique (object_key),
  constraint photo_rendition_size_known check (size in ('small', 'medium', 'large')),
  constraint photo_rendition_format_known check (format in ('webp', 'jpeg'))
);

create table draft (
  id uuid primary key,
  author_id uuid not null references person (id),
  content jsonb not null,
  revision integer not null default 1,
  created_at timestamptz not null default now(),
  updated_at timestamptz not null default now(),
  constraint draft_content_size check (pg_column_size(content) <= 262144)
);
create index draft_author_index on draft (author_id, updated_at desc, id);

create table report_sequence (
  year smallint primary key,
  last integer not null default 0
);

create table report (
  id uuid primary key,
  number text not null,
  author_id uuid not null references person (id),
  club_id uuid not null references club (id),
  state text not null default 'filed',
  audience text not null,
  published_audience text,
  embargo_until timestamptz,
  current_version integer not null default 1,
  published_version integer,
  merged_into uuid references report (id),
  author_named boolean not null default false,
  filed_at timestamptz not null default now(),
  decided_at timestamptz,
  row_version integer not null default 1,
  constraint report_number_unique unique (number),
  constraint report_number_form check (number ~ '^TN-[0-9]{2}-[0-9]{5,6}-[0-9A-Z]$'),
  constraint report_state_known check (state in ('filed', 'published', 'declined', 'unresolved',
    'returned', 'withdrawn', 'retracted', 'merged', 'withheld')),
  constraint report_audience_known
    check (audience in ('club', 'named_clubs', 'clubs', 'public')),
  constraint report_published_audience_known check (published_audience is null
    or published_audience in ('club', 'named_clubs', 'clubs', 'public')),
  constraint report_merged_iff_target check ((state = 'merged') = (merged_into is not null)),
  constraint report_published_has_audience check ((published_audience is null) =
    (published_version is null) and (state <> 'published' or published_audience is not null))
);
create index report_author_index on report (author_id, filed_at desc, id);
create index report_waiting_index on report (filed_at, id) where state = 'filed';
create index report_second_voice_index on report (filed_at, id)
  where state = 'published' and audience = 'public' and published_audience <> 'public';

create table report_reader_club (
  report_id uuid not null references report (id),
  club_id uuid not null references club (id),
  primary key (report_id, club_id)
);

create table report_version (
  report_id uuid not null references report (id),
  version integer not null,
  cause text not null,
  coin_type_id uuid references coin_type (id),
  coin_type_revision integer,
  piece jsonb not null,
  piece_count integer not null default 1,
  condition text not null,
  whereabouts text not null,
  method_id text references production_method (id),
  account_source text not null default '',
  account_html text not null default '',
  locale text not null default 'en',
  photo_licence text not null,
  created_at timestamptz not null default now(),
  primary key (report_id, version),
  foreign key (coin_type_id, coin_type_revision)
    references coin_type_revision (coin_type_id, revision),
  constraint report_version_cause_known
    check (cause in ('filed', 'changes_made', 'correction')),
  constraint report_version_piece_count_range check (piece_count between 1 and 100000),
  constraint report_version_condition_known
    check (condition in ('little_worn', 'worn', 'mounted', 'holed', 'corroded')),
  constraint report_version_whereabouts_known check (whereabouts in ('with_owner',
    'kept_for_study', 'returned', 'handed_to_authority', 'destroyed', 'unknown')),
  constraint report_version_photo_licence_known
    check (photo_licence in ('registry_only', 'bulletins_and_exports')),
  constraint report_version_revision_with_type
    check ((coin_type_id is null) = (coin_type_revision is null))
);
create trigger report_version_append_only before update or delete on report_version
  for each row execute function refuse_change();
create index report_version_coin_type_index on report_version (coin_type_id);
alter table report
  add constraint report_current_version_exists foreign key (id, current_version)
    references report_version (report_id, version) deferrable initially deferred,
  add constraint report_published_version_exists foreign key (id, published_version)
    references report_version (report_id, version) deferrable initially deferred;

create table component (
  report_id uuid not null,
  version integer not null,
  kind text not null,
  judgement text not null,
  note text not null default '',
  primary key (report_id, version, kind),
  foreign key (report_id, version) references report_version (report_id, version),
  constraint component_kind_known check (kind in ('piece', 'holder', 'label', 'packaging')),
  constraint component_judgement_known
    check (judgement in ('false', 'altered', 'genuine', 'cannot_tell', 'not_present'))
);

create table report_photo (
  report_id uuid not null,
  version integer not null,
  photo_id uuid not null references photo (id),
  position integer not null,
  side text not null,
  circle jsonb,
  upright_degrees numeric(6, 2) not null default 0,
  caption text not null default '',
  primary key (report_id, version, photo_id),
  foreign key (report_id, version) references report_version (report_id, version),
  constraint report_photo_position_unique unique (report_id, version, position),
  constraint report_photo_side_known check (side in ('obverse', 'reverse', 'edge', 'detail')),
  constraint report_photo_upright_range check (upright_degrees >= 0 and upright_degrees < 360)
);
create index report_photo_photo_index on report_photo (photo_id);

-- A tell named in a report; its pins, where it has any, hang on it.
create table report_tell (
  report_id uuid not null,
  version integer not null,
  position integer not null,
  tell_id text not null references tell (id),
  note text not null default '',
  disclosure text not null,
  primary key (report_id, version, position),
  foreign key (report_id, version) references report_version (report_id, version),
  constraint report_tell_disclosure_known
    check (disclosure in ('public', 'clubs', 'moderators'))
);
create index report_tell_tell_index on report_tell (tell_id);

create table pin (
  pin_id uuid not null,
  report_id uuid not null,
  version integer not null,
  tell_position integer not null,
  photo_id uuid not null,
  layer text not null default 'reporter',
  side text not null,
  clock_hours numeric(6, 4),
  radius_fraction numeric(6, 5),
  edge_angle_degrees numeric(6, 2),
  edge_height_fraction numeric(6, 5),
  note text not null default '',
  disclosure text not null,
  placed_by uuid references person (id),
  primary key (report_id, version, pin_id),
  foreign key (report_id, version, tell_position)
    references report_tell (report_id, version, position),
  foreign key (report_id, version, photo_id)
    references report_photo (report_id, version, photo_id),
  constraint pin_layer_known check (layer in ('reporter', 'moderator')),
  constraint pin_side_known check (side in ('obverse', 'reverse', 'edge')),
  constraint pin_clock_range check (clock_hours >= 0 and clock_hours < 12),
  constraint pin_radius_range check (radius_fraction >= 0 and radius_fraction <= 1.2),
  constraint pin_edge_angle_range check (edge_angle_degrees >= 0 and edge_angle_degrees < 360),
  constraint pin_edge_height_range check (edge_height_fraction between 0 and 1),
  constraint pin_place_of_its_side check (case when side = 'edge'
    then edge_angle_degrees is not null and edge_height_fraction is not null
      and clock_hours is null and radius_fraction is null
    else clock_hours is not null and radius_fraction is not null
      and edge_angle_degrees is null and edge_height_fraction is null end),
  constraint pin_disclosure_known check (disclosure in ('public', 'clubs', 'moderators'))
);

create table measurement (
  report_id uuid not null,
  version integer not null,
  position integer not null,
  quantity text not null,
  value numeric not null,
  unit text not null,
  resolution numeric,
  accuracy numeric,
  repeats integer not null default 1,
  spread numeric,
  primary key (report_id, version, position),
  foreign key (report_id, version) references report_version (report_id, version),
  constraint measurement_quantity_known check (quantity in ('weight', 'diameter', 'thickness',
    'weight_in_water', 'water_temperature', 'die_axis', 'magnetic', 'lowest_tone')),
  constraint measurement_value_range check (value >= 0 and value < 1e7),
  constraint measurement_repeats_range check (repeats between 1 and 1000)
);

-- The surfacing is held in three rows by who may see them: the coarse one goes with the report,
-- the detail stays in the reporter's club and with moderators, the venue with moderators.
create table surfacing (
  report_id uuid not null,
  version integer not null,
  channel text not null,
  surfaced_month date not null,
  country text not null,
  region text not null default '',
  price_band_low numeric,
  price_band_high numeric,
  currency text,
  primary key (report_id, version),
  foreign key (report_id, version) references report_version (report_id, version),
  constraint surfacing_channel_known check (channel in ('online_marketplace', 'auction',
    'coin_show', 'shop', 'flea_market', 'private_sale', 'inherited_lot', 'change', 'other')),
  constraint surfacing_month_first_day check (extract(day from surfaced_month) = 1),
  constraint surfacing_country_form check (country ~ '^[A-Z]{2}$'),
  constraint surfacing_currency_form check (currency is null or currency ~ '^[A-Z]{3}$'),
  constraint surfacing_price_band_order check (price_band_low is null
    or (price_band_low >= 0 and price_band_high > price_band_low and currency is not null))
);
create table surfacing_detail (
  report_id uuid not null,
  version integer not null,
  surfaced_on date,
  town text not null default '',
  price numeric,
  primary key (report_id, version),
  foreign key (report_id, version) references surfacing (report_id, version),
  constraint surfacing_detail_price_range check (price is null or price between 0 and 1e12)
);
create table surfacing_venue (
  report_id uuid not null,
  version integer not null,
  venue text not null,
  receipt_note text not null default '',
  primary key (report_id, version),
  foreign key (report_id, version) references surfacing (report_id, version)
);

create table review_lease (
  report_id uuid primary key references report (id),
  moderator_id uuid not null references person (id),
  token bigint not null,
  version_seen integer not null,
  expires_at timestamptz not null
);
create sequence review_lease_token;

create table conflict_of_interest (
  person_id uuid not null references person (id),
  report_id uuid not null references report (id),
  source text not null,
  note text not null default '',
  declared_at timestamptz not null default now(),
  primary key (person_id, report_id),
  constraint conflict_of_interest_source_known check (source in ('declared', 'data'))
);

create table decision (
  id uuid primary key default gen_random_uuid(),
  report_id uuid not null,
  version integer not null,
  row_version_seen integer not null,
  kind text not null,
  moderator_id uuid not null references person (id),
  club_id uuid not null references club (id),
  lease_token bigint not null,
  confidence text,
  basis text[] not null default '{}',
  reason text not null,
  made_at timestamptz not null default now(),
  effective_at timestamptz not null default now(),
  undone_at timestamptz,
  foreign key (report_id, version) references report_version (report_id, version),
  constraint decision_kind_known check (kind in ('publish', 'return', 'decline', 'unresolved',
    'agree_public', 'refuse_public', 'retract', 'agree_retract')),
  constraint decision_confidence_known
    check (confidence is null or confidence in ('suspected', 'probable', 'confirmed')),
  constraint decision_confidence_when_publishing check
    ((kind in ('publish', 'agree_public')) = (confidence is not null)),
  constraint decision_confirmed_needs_piece check (confidence is distinct from 'confirmed'
    or (basis @> array['piece_in_hand'] and basis && array['weight_outside', 'size_outside',
        'density_outside', 'date_never_struck', 'composition_wrong'])),
  constraint decision_basis_known check (basis <@ array['photographs', 'piece_in_hand',
    'weight_outside', 'size_outside', 'density_outside', 'date_never_struck',
    'composition_wrong', 'shared_marks', 'tells_named']),
  constraint decision_reason_length check (length(btrim(reason)) between 1 and 4000)
);
create unique index decision_once on decision (report_id, version, kind, moderator_id)
  where undone_at is null;
create index decision_report_index on decision (report_id, made_at);

create table publication (
  id uuid primary key default gen_random_uuid(),
  report_id uuid not null,
  version integer not null,
  audience text not null,
  confidence text not null,
  basis text[] not null,
  during tstzrange not null default tstzrange(now(), null, '[)'),
  ended_as text,
  provisional boolean not null default false,
  foreign key (report_id, version) references report_version (report_id, version),
  constraint publication_audience_known
    check (audience in ('club', 'named_clubs', 'clubs', 'public')),
  constraint publication_confidence_known
    check (confidence in ('suspected', 'probable', 'confirmed')),
  constraint publication_ended_as_known check (ended_as is null or ended_as in
    ('widened', 'corrected', 'retracted', 'merged', 'withheld', 'confidence_changed')),
  constraint publication_ended_iff_closed check (upper_inf(during) = (ended_as is null)),
  constraint publication_one_at_a_time exclude using gist (report_id with =, during with &&)
);

-- Public audience stands on two voices of two clubs, whatever the code says.
create function publication_needs_two_voices() returns trigger language plpgsql
  security definer set search_path = public, pg_temp as $$
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
create constraint trigger publication_two_voices after insert or update on publication
  deferrable initially deferred for each row execute function publication_needs_two_voices();

create function decision_not_on_own_report() returns trigger language plpgsql
  security definer set search_path = public, pg_temp as $$
begin
  if exists (select from report r where r.id = new.report_id and r.author_id = new.moderator_id)
     or exists (select from conflict_of_interest c
                 where c.report_id = new.report_id and c.person_id = new.moderator_id) then
    raise exception 'nobody decides on their own report or in a conflict of interest'
      using errcode = 'check_violation', constraint = 'decision_without_conflict';
  end if;
  return new;
end $$;
create trigger decision_without_conflict before insert on decision
  for each row execute function decision_not_on_own_report();

create table registry_event (
  id bigint generated always as identity primary key,
  xid xid8 not null default pg_current_xact_id(),
  kind text not null,
  report_id uuid references report (id),
  publication_id uuid references publication (id),
  at timestamptz not null default now()
);
create index registry_event_order_index on registry_event (xid, id);

create table notice (
  id uuid primary key default gen_random_uuid(),
  person_id uuid not null references person (id),
  kind text not null,
  report_id uuid references report (id),
  parameters jsonb not null default '{}',
  created_at timestamptz not null default now(),
  read_at timestamptz,
  constraint notice_kind_known check (kind in ('report_filed', 'report_published',
    'report_returned', 'report_declined', 'report_unresolved', 'report_made_public',
    'report_retracted'))
);
create index notice_person_index on notice (person_id, created_at desc, id);

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

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
alter table report drop constraint report_current_version_exists,
  drop constraint report_published_version_exists;
drop table notice, registry_event, publication, decision, conflict_of_interest, review_lease,
  surfacing_venue, surfacing_detail, surfacing, measurement, pin, report_tell, report_photo,
  component, report_version, report_reader_club, report, report_sequence, draft,
  photo_rendition, photo cascade;
drop sequence review_lease_token;
drop function holds_back_tells(uuid, integer), retraction_reason(uuid),
  unused_photos(timestamptz, integer);
drop function publication_needs_two_voices(), decision_not_on_own_report(), reporter_name(uuid),
  sees_disclosure(text, uuid), sees_version(uuid, integer), in_reporters_club(uuid),
  sees_evidence(uuid), reviews_report(text, uuid, uuid, text, uuid[]),
  sees_as_published(text, uuid, uuid, timestamptz, uuid[]), reader_clubs_of(uuid);
`);
}
