import type { Knex } from 'knex';

/** Drafts, photos, and reports with their versions and evidence. */
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
`);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
alter table report drop constraint report_current_version_exists,
  drop constraint report_published_version_exists;
drop table surfacing_venue, surfacing_detail, surfacing, measurement, pin, report_tell,
  report_photo, component, report_version, report_reader_club, report, report_sequence, draft,
  photo_rendition, photo;
`);
}
