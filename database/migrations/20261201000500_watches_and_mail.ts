import type { Knex } from 'knex';

/** Watches, alerts and the mail ledger: nothing lost, nothing twice. */
export async function up(knex: Knex): Promise<void> {
  await knex.raw(`
create table watch (
  id uuid primary key,
  person_id uuid not null references person (id),
  name text not null,
  filter jsonb not null,
  filter_format integer not null default 1,
  cadence text not null,
  created_at timestamptz not null default now(),
  paused_until timestamptz,
  deleted_at timestamptz,
  constraint watch_cadence_known check (cadence in ('at_once', 'daily', 'weekly')),
  constraint watch_name_length check (length(btrim(name)) between 1 and 200)
);
create index watch_person_index on watch (person_id, created_at desc, id)
  where deleted_at is null;

create table mail (
  id uuid primary key default gen_random_uuid(),
  cause text not null,
  kind text not null,
  person_id uuid references person (id),
  address citext not null,
  state text not null default 'reserved',
  message_id text,
  parameters jsonb not null default '{}',
  not_before timestamptz not null default now(),
  attempts integer not null default 0,
  claim_token uuid,
  claimed_until timestamptz,
  answer text,
  created_at timestamptz not null default now(),
  frozen_at timestamptz,
  settled_at timestamptz,
  settled_by uuid references person (id),
  constraint mail_cause_unique unique (cause),
  constraint mail_message_id_unique unique (message_id),
  constraint mail_kind_known check (kind in
    ('reset', 'invitation', 'registration', 'notice', 'digest', 'erratum')),
  constraint mail_state_known check (state in ('reserved', 'ready', 'sending', 'sent', 'refused',
    'uncertain', 'dropped', 'settled_sent', 'settled_lost')),
  constraint mail_sending_iff_claimed check ((state = 'sending') = (claim_token is not null)
    and (state = 'sending') = (claimed_until is not null)),
  constraint mail_frozen_before_ready
    check (state = 'reserved' or (message_id is not null and frozen_at is not null))
);
create index mail_due_index on mail (not_before, id) where state in ('reserved', 'ready');
create index mail_claimed_index on mail (claimed_until) where state = 'sending';
create index mail_person_index on mail (person_id, created_at desc, id);

create table alert (
  id uuid primary key default gen_random_uuid(),
  watch_id uuid not null references watch (id),
  person_id uuid not null references person (id),
  report_id uuid not null references report (id),
  publication_id uuid not null references publication (id),
  reasons jsonb not null,
  made_at timestamptz not null default now(),
  mail_id uuid references mail (id),
  constraint alert_once unique (watch_id, report_id)
);
create index alert_waiting_index on alert (person_id, made_at) where mail_id is null;
create index alert_report_index on alert (report_id);

create table mail_item (
  mail_id uuid not null references mail (id),
  report_id uuid not null references report (id),
  publication_id uuid not null references publication (id),
  position integer not null,
  reasons jsonb not null,
  shown boolean,
  primary key (mail_id, report_id),
  constraint mail_item_position_unique unique (mail_id, position)
);

alter table watch enable row level security;
create policy watch_own on watch to touchneedle_app
  using (person_id = (select current_actor()) or (select is_system_actor()))
  with check (person_id = (select current_actor()) or (select is_system_actor()));
alter table alert enable row level security;
create policy alert_own on alert for select to touchneedle_app
  using (person_id = (select current_actor()) or (select is_system_actor()));
create policy alert_written on alert to touchneedle_app
  using ((select is_system_actor())) with check ((select is_system_actor()));
alter table mail enable row level security;
create policy mail_seen on mail for select to touchneedle_app using (
  (select is_system_actor()) or person_id = (select current_actor())
  or (select actor_is_registrar())
  or (kind = 'invitation'
    and (parameters ->> 'clubId')::uuid = any ((select actor_clubs_as('secretary'))::uuid[])));
create policy mail_reserved on mail for insert to touchneedle_app
  with check ((select is_system_actor()));
create policy mail_changed on mail for update to touchneedle_app
  using ((select is_system_actor()) or (select actor_is_registrar())) with check (true);
alter table mail_item enable row level security;
create policy mail_item_system on mail_item to touchneedle_app
  using ((select is_system_actor())) with check ((select is_system_actor()));

-- Whoever causes a mail reserves it, though they may not read the ledger.
create function reserve_mail(wanted_cause text, mail_kind text, recipient uuid, to_address text,
  mail_parameters jsonb) returns void language sql security definer
  set search_path = public, pg_temp as $$
  insert into mail (cause, kind, person_id, address, parameters)
  values (wanted_cause, mail_kind, recipient, to_address, mail_parameters)
  on conflict (cause) do nothing
$$;
revoke execute on function reserve_mail(text, text, uuid, text, jsonb) from public;
grant execute on function reserve_mail(text, text, uuid, text, jsonb) to touchneedle_app;

-- Mails the reporter of a report, whose address the moderator who decides may not read.
create function reserve_notice_mail(wanted_cause text, reporter uuid, about_report uuid,
  mail_parameters jsonb) returns void language sql security definer
  set search_path = public, pg_temp as $$
  insert into mail (cause, kind, person_id, address, parameters)
  select wanted_cause, 'notice', p.id, p.email, mail_parameters
    from person p join report r on r.author_id = p.id
   where p.id = reporter and r.id = about_report and p.closed_at is null
     and (sees_evidence(r.id) or is_system_actor())
  on conflict (cause) do nothing
$$;
revoke execute on function reserve_notice_mail(text, uuid, uuid, jsonb) from public;
grant execute on function reserve_notice_mail(text, uuid, uuid, jsonb) to touchneedle_app;

-- A new mail in the place of one that the registrar settled as lost: same words, new cause.
create function send_mail_anew(lost uuid) returns void language plpgsql security definer
  set search_path = public, pg_temp as $$
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
revoke execute on function send_mail_anew(uuid) from public;
grant execute on function send_mail_anew(uuid) to touchneedle_app;

grant select, insert, update on watch, alert, mail, mail_item to touchneedle_app;
`);
}

export async function down(knex: Knex): Promise<void> {
  await knex.raw(`
drop function reserve_mail(text, text, uuid, text, jsonb),
  reserve_notice_mail(text, uuid, uuid, jsonb), send_mail_anew(uuid);
drop table mail_item, alert, mail, watch cascade;
`);
}
