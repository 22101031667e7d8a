import type { Knex } from 'knex';

/** Review: leases, conflicts, decisions; publications, what they announce, and notices of it. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
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
`);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
drop table notice, registry_event, publication, decision, conflict_of_interest, review_lease;
drop sequence review_lease_token;
drop function publication_needs_two_voices(), decision_not_on_own_report();
`);
}
