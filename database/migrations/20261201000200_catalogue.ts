import type { Knex } from 'knex';

/** Coin types with their standards, dates and mints, legal status; the taxonomy of tells. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
create table coin_type (
  id uuid primary key default gen_random_uuid(),
  slug text not null,
  kind text not null,
  name text not null,
  issuer text not null,
  issuer_country text,
  metal text,
  is_demonstration boolean not null default false,
  current_revision integer not null default 1,
  position integer not null default 0,
  constraint coin_type_slug_unique unique (slug),
  constraint coin_type_slug_form check (slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$'),
  constraint coin_type_kind_known
    check (kind in ('coin', 'ancient', 'hammered', 'token', 'medal', 'bar')),
  constraint coin_type_metal_known check (metal is null or metal in
    ('gold', 'silver', 'copper', 'bronze', 'brass', 'nickel', 'cupro_nickel', 'steel',
     'zinc', 'platinum', 'bimetal', 'other')),
  constraint coin_type_issuer_country_form
    check (issuer_country is null or issuer_country ~ '^[A-Z]{2}$')
);

create table coin_type_revision (
  coin_type_id uuid not null references coin_type (id),
  revision integer not null,
  standard jsonb not null,
  content_hash text not null,
  approved_by uuid references person (id),
  approved_at timestamptz,
  created_at timestamptz not null default now(),
  primary key (coin_type_id, revision),
  constraint coin_type_revision_positive check (revision >= 1)
);
create trigger coin_type_revision_append_only before update or delete on coin_type_revision
  for each row execute function refuse_change();
alter table coin_type add constraint coin_type_current_revision_exists
  foreign key (id, current_revision) references coin_type_revision (coin_type_id, revision)
  deferrable initially deferred;

create table coin_type_issue (
  coin_type_id uuid not null references coin_type (id),
  year integer not null,
  mint_mark text not null default '',
  state text not null,
  known_count integer,
  note text not null default '',
  source text not null default '',
  primary key (coin_type_id, year, mint_mark, state),
  constraint coin_type_issue_state_known
    check (state in ('struck', 'never_struck', 'none_released', 'few_known', 'proof_only'))
);

create table coin_type_legal_status (
  coin_type_id uuid not null references coin_type (id),
  country text not null,
  status text not null,
  source text not null,
  source_kind text not null,
  primary key (coin_type_id, country),
  constraint coin_type_legal_status_country_form check (country ~ '^[A-Z]{2}$'),
  constraint coin_type_legal_status_known
    check (status in ('current', 'redeemable', 'obsolete', 'protected', 'not_money')),
  constraint coin_type_legal_status_source_kind_known
    check (source_kind in ('statute', 'secondary', 'memory'))
);

create table production_method (
  id text primary key,
  name text not null,
  position integer not null,
  constraint production_method_id_form check (id ~ '^[a-z0-9]+(-[a-z0-9]+)*$')
);

create table tell (
  id text primary key,
  name text not null,
  seen text not null,
  place text not null,
  form text,
  methods text[] not null,
  confused_with text[] not null default '{}',
  disclosure text not null,
  position integer not null,
  constraint tell_id_form check (id ~ '^[a-z0-9]+(-[a-z0-9]+)*$'),
  constraint tell_place_known check (place in ('any', 'edge', 'border', 'whole')),
  constraint tell_form_known check (form is null or form in ('raised', 'sunk')),
  constraint tell_disclosure_known check (disclosure in ('public', 'clubs', 'moderators'))
);

create table genuine_feature (
  id text primary key,
  seen text not null,
  position integer not null
);

-- Words that a slip of spelling is mended to: names in the public catalogue only, never the
-- words of reports, so that a suggestion can't tell of a report the reader may not see.
create table search_word (
  word text primary key,
  weight integer not null default 1
);
create index search_word_trigram_index on search_word using gin (word gin_trgm_ops);

alter table tell enable row level security;
create policy tell_seen on tell for select to touchneedle_app using (
  disclosure = 'public' or (select is_system_actor())
  or (disclosure = 'clubs' and cardinality((select actor_clubs())::uuid[]) > 0)
  or cardinality((select actor_clubs_as('moderator'))::uuid[]) > 0);

grant select on coin_type, coin_type_revision, coin_type_issue, coin_type_legal_status,
  production_method, tell, genuine_feature, search_word to touchneedle_app;

create text search configuration touchneedle (copy = simple);
alter text search configuration touchneedle
  alter mapping for hword, hword_part, word, asciiword, asciihword, hword_asciipart
  with unaccent, simple;
`);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
drop text search configuration touchneedle;
drop table search_word, genuine_feature, tell, production_method, coin_type_legal_status,
  coin_type_issue cascade;
alter table coin_type drop constraint coin_type_current_revision_exists;
drop table coin_type_revision, coin_type;
`);
}
