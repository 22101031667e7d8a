insert into review_lease (report_id, moderator_id, token, version_seen, expires_at) values
  ('00000000-0000-4000-8000-0000000000e1', '00000000-0000-4000-8000-000000000002', 1, 1,
   '2027-01-01 00:00+00');
insert into conflict_of_interest (person_id, report_id, source) values
  ('00000000-0000-4000-8000-000000000003', '00000000-0000-4000-8000-0000000000e1', 'declared');
insert into decision (report_id, version, row_version_seen, kind, moderator_id, club_id,
  lease_token, confidence, basis, reason) values
  ('00000000-0000-4000-8000-0000000000e1', 1, 1, 'publish',
   '00000000-0000-4000-8000-000000000002', '00000000-0000-4000-8000-0000000000c1', 1, 'probable',
   '{photographs}', 'Plain to see.');
insert into publication (id, report_id, version, audience, confidence, basis) values
  ('00000000-0000-4000-8000-0000000000aa', '00000000-0000-4000-8000-0000000000e1', 1,
   'named_clubs', 'probable', '{photographs}');
insert into registry_event (kind, report_id) values
  ('published', '00000000-0000-4000-8000-0000000000e1');
insert into notice (person_id, kind, report_id) values
  ('00000000-0000-4000-8000-000000000001', 'report_published',
   '00000000-0000-4000-8000-0000000000e1');
