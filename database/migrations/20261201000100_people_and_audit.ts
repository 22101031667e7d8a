import type { Knex } from 'knex';

/** People, clubs, memberships, sessions, one-time links, and the append-only audit chain. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
create extension if not exists citext;
create extension if not exists pg_trgm;
create extension if not exists unaccent;
create extension if not exists btree_gist;
create extension if not exists pgcrypto;

-- The application signs in as a role that owns nothing, so that row-level security binds it.
do $$ begin
  if not exists (select from pg_roles where rolname = 'touchneedle_app') then
    create role touchneedle_app nologin;
  end if;
end $$;
grant usage on schema public to touchneedle_app;

create function current_actor() returns uuid language sql stable parallel safe as $$
  select case when nullif(current_setting('touchneedle.actor', true), '') is null
                or current_setting('touchneedle.actor', true) = 'system' then null
              else current_setting('touchneedle.actor', true)::uuid end
$$;
create function is_system_actor() returns boolean language sql stable parallel safe as $$
  select coalesce(current_setting('touchneedle.actor', true), '') = 'system'
$$;

create table person (
  id uuid primary key default gen_random_uuid(),
  email citext not null,
  display_name text not null,
  password_hash text,
  locale text not null default 'en',
  time_zone text not null default 'UTC',
  is_registrar boolean not null default false,
  session_epoch integer not null default 0,
  created_at timestamptz not null default now(),
  closed_at timestamptz,
  constraint person_email_unique unique (email),
  constraint person_email_form check (email ~ '^[^@[:space:]]+@[^@[:space:]]+$'
    and length(email::text) <= 254),
  constraint person_display_name_length check (length(btrim(display_name)) between 1 and 120)
);

create table club (
  id uuid primary key default gen_random_uuid(),
  slug text not null,
  name text not null,
  postal_address text not null default '',
  time_zone text not null default 'UTC',
  default_audience text not null default 'clubs',
  default_place_precision text not null default 'region',
  created_at timestamptz not null default now(),
  closed_at timestamptz,
  constraint club_slug_unique unique (slug),
  constraint club_slug_form check (slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$' and length(slug) <= 60),
  constraint club_name_length check (length(btrim(name)) between 1 and 120),
  constraint club_default_audience_known
    check (default_audience in ('club', 'named_clubs', 'clubs', 'public')),
  constraint club_default_place_precision_known
    check (default_place_precision in ('country', 'region', 'town'))
);

create table membership (
  id uuid primary key default gen_random_uuid(),
  person_id uuid not null references person (id),
  club_id uuid references club (id),
  role text not null,
  during tstzrange not null default tstzrange(now(), null, '[)'),
  granted_by uuid references person (id),
  constraint membership_role_known
    check (role in ('subscriber', 'member', 'moderator', 'secretary')),
  constraint membership_club_unless_subscriber check (club_id is not null or role = 'subscriber'),
  constraint membership_during_not_empty check (not isempty(during)),
  constraint membership_once_at_a_time exclude using gist (
    person_id with =,
    (coalesce(club_id, '00000000-0000-0000-0000-000000000000'::uuid)) with =,
    role with =, during with &&)
);
create index membership_club_index on membership (club_id);

-- What the actor's memberships amount to. Security definer, since the answer decides what
-- row-level security lets the actor see and must not itself be cut by it. In plpgsql, like every
-- function that a policy asks row by row: the connection keeps its plan, where an SQL function
-- with rights of its own is planned anew in each statement (half a millisecond each time).
create function actor_clubs() returns uuid[] language plpgsql stable security definer
  set search_path = public, pg_temp as $$
begin
  if current_actor() is null then return '{}'; end if;
  return (select coalesce(array_agg(distinct m.club_id order by m.club_id), '{}')
    from membership m join club c on c.id = m.club_id and c.closed_at is null
   where m.person_id = current_actor() and m.club_id is not null and m.during @> now());
end $$;
create function actor_clubs_as(wanted_role text) returns uuid[] language plpgsql stable
  security definer set search_path = public, pg_temp as $$
begin
  if current_actor() is null then return '{}'; end if;
  return (select coalesce(array_agg(distinct m.club_id order by m.club_id), '{}')
    from membership m join club c on c.id = m.club_id and c.closed_at is null
   where m.person_id = current_actor() and m.role = wanted_role and m.during @> now());
end $$;
create function actor_is_registrar() returns boolean language plpgsql stable security definer
  set search_path = public, pg_temp as $$
begin
  if current_actor() is null then return false; end if;
  return coalesce((select p.is_registrar from person p
                    where p.id = current_actor() and p.closed_at is null), false);
end $$;

create table session (
  sid text primary key,
  sess jsonb not null,
  expire timestamptz not null,
  person_id uuid generated always as ((sess ->> 'personId')::uuid) stored
);
create index session_expire_index on session (expire);
create index session_person_index on session (person_id);

-- Links that are good once: password resets, invitations, registrations, the first registrar.
create table account_link (
  id uuid primary key default gen_random_uuid(),
  kind text not null,
  token_hash bytea not null,
  email citext,
  display_name text,
  person_id uuid references person (id),
  club_id uuid references club (id),
  roles text[] not null default '{}',
  invited_by uuid references person (id),
  created_at timestamptz not null default now(),
  expires_at timestamptz not null,
  used_at timestamptz,
  withdrawn_at timestamptz,
  constraint account_link_token_unique unique (token_hash),
  constraint account_link_kind_known
    check (kind in ('reset', 'invitation', 'registration', 'first_registrar')),
  constraint account_link_roles_known
    check (roles <@ array['subscriber', 'member', 'moderator', 'secretary'])
);
create index account_link_email_index on account_link (email);
create index account_link_club_index on account_link (club_id);

create table audit_entry (
  seq bigint generated always as identity primary key,
  act text not null,
  actor_id uuid,
  club_id uuid,
  subject_kind text not null,
  subject_id text not null,
  details jsonb not null default '{}',
  at timestamptz not null default clock_timestamp(),
  chain_position bigint,
  previous_hash bytea,
  hash bytea,
  constraint audit_entry_chain_unique unique (chain_position)
);
create index audit_entry_subject_index on audit_entry (subject_kind, subject_id);

create table audit_chain_head (
  only_row boolean primary key default true check (only_row),
  position bigint not null default 0,
  hash bytea not null default decode(repeat('00', 32), 'hex')
);
insert into audit_chain_head default values;

-- The link is made at commit, under the head's row lock, so that the order of the chain is the
-- order of commits and no transaction waits for another's work.
create function audit_entry_join_chain() returns trigger language plpgsql security definer
  set search_path = public, pg_temp as $$
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
create constraint trigger audit_entry_joins_chain after insert on audit_entry
  deferrable initially deferred for each row execute function audit_entry_join_chain();

create function refuse_change() returns trigger language plpgsql as $$
begin
  if tg_table_name = 'audit_entry' and tg_op = 'UPDATE'
     and coalesce(current_setting('touchneedle.joining_chain', true), '') = 'on' then
    return new;
  end if;
  raise exception '% is append-only', tg_table_name using errcode = 'restrict_violation';
end $$;
create trigger audit_entry_append_only before update or delete on audit_entry
  for each row execute function refuse_change();
create trigger audit_entry_no_truncate before truncate on audit_entry
  for each statement execute function refuse_change();

-- Sight of people: oneself, those of the clubs one runs, and everyone for the registrar.
alter table person enable row level security;
create policy person_seen on person for select to touchneedle_app using (
  id = (select current_actor()) or (select is_system_actor()) or (select actor_is_registrar())
  or id in (select m.person_id from membership m
             where m.club_id = any ((select actor_clubs_as('secretary'))::uuid[])));
create policy person_added on person for insert to touchneedle_app
  with check ((select is_system_actor()));
create policy person_changed on person for update to touchneedle_app
  using (id = (select current_actor()) or (select is_system_actor())) with check (true);

alter table membership enable row level security;
create policy membership_seen on membership for select to touchneedle_app using (
  person_id = (select current_actor()) or (select is_system_actor())
  or (select actor_is_registrar())
  or club_id = any ((select actor_clubs_as('secretary'))::uuid[]));
create policy membership_added on membership for insert to touchneedle_app with check (
  (select is_system_actor()) or (select actor_is_registrar())
  or club_id = any ((select actor_clubs_as('secretary'))::uuid[])
  or (person_id = (select current_actor()) and role = 'subscriber' and club_id is null));
create policy membership_changed on membership for update to touchneedle_app using (
  (select is_system_actor()) or (select actor_is_registrar())
  or club_id = any ((select actor_clubs_as('secretary'))::uuid[])) with check (true);

alter table account_link enable row level security;
create policy account_link_seen on account_link for select to touchneedle_app using (
  (select is_system_actor()) or (select actor_is_registrar())
  or club_id = any ((select actor_clubs_as('secretary'))::uuid[]));
create policy account_link_added on account_link for insert to touchneedle_app with check (
  (select is_system_actor()) or (select actor_is_registrar())
  or club_id = any ((select actor_clubs_as('secretary'))::uuid[]));
create policy account_link_changed on account_link for update to touchneedle_app using (
  (select is_system_actor()) or (select actor_is_registrar())
  or club_id = any ((select actor_clubs_as('secretary'))::uuid[])) with check (true);

alter table audit_entry enable row level security;
create policy audit_entry_seen on audit_entry for select to touchneedle_app
  using ((select is_system_actor()) or (select actor_is_registrar()));
create policy audit_entry_added on audit_entry for insert to touchneedle_app with check (
  (select is_system_actor()) or actor_id is not distinct from (select current_actor()));

grant select, insert, update on person, club, membership, account_link to touchneedle_app;
grant select, insert on audit_entry to touchneedle_app;
grant select, insert, update, delete on session to touchneedle_app;
grant execute on function current_actor(), is_system_actor(), actor_clubs(),
  actor_clubs_as(text), actor_is_registrar() to touchneedle_app;
`);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
drop table audit_entry, audit_chain_head, account_link, session, membership cascade;
drop table club, person cascade;
drop function audit_entry_join_chain(), refuse_change(), actor_clubs(), actor_clubs_as(text),
  actor_is_registrar(), current_actor(), is_system_actor();
revoke usage on schema public from touchneedle_app;
`);
}
