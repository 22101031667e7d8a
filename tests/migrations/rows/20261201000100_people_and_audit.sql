-- Rows by hand for the tables that this migration made; later migrations must leave them be.
insert into person (id, email, display_name, is_registrar) values
  ('00000000-0000-4000-8000-000000000001', 'author@example.org', 'Author', false),
  ('00000000-0000-4000-8000-000000000002', 'moderator@example.org', 'Moderator', false),
  ('00000000-0000-4000-8000-000000000003', 'second@example.org', 'Second', true);
insert into club (id, slug, name) values
  ('00000000-0000-4000-8000-0000000000c1', 'first', 'First'),
  ('00000000-0000-4000-8000-0000000000c2', 'second', 'Second');
insert into membership (person_id, club_id, role, during) values
  ('00000000-0000-4000-8000-000000000001', '00000000-0000-4000-8000-0000000000c1', 'member',
   '[2026-01-01 00:00+00,)'),
  ('00000000-0000-4000-8000-000000000002', '00000000-0000-4000-8000-0000000000c1', 'moderator',
   '[2026-01-01 00:00+00,)');
insert into session (sid, sess, expire) values
  ('s1', '{"personId": "00000000-0000-4000-8000-000000000001"}', '2027-01-01 00:00+00');
insert into account_link (id, kind, token_hash, email, expires_at) values
  ('00000000-0000-4000-8000-0000000000a1', 'reset', '\x01', 'author@example.org',
   '2027-01-01 00:00+00');
insert into audit_entry (act, actor_id, subject_kind, subject_id) values
  ('person_added', '00000000-0000-4000-8000-000000000001', 'person', 'x');
