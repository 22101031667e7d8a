insert into photo (id, owner_id, master_key, sha256, bytes_received, width, height) values
  ('00000000-0000-4000-8000-0000000000f1', '00000000-0000-4000-8000-000000000001', 'key',
   decode(repeat('ab', 32), 'hex'), 1000, 800, 600);
insert into photo_rendition (photo_id, size, format, object_key, width, height, bytes) values
  ('00000000-0000-4000-8000-0000000000f1', 'small', 'webp', 'small-key', 320, 240, 900);
insert into draft (id, author_id, content) values
  ('00000000-0000-4000-8000-0000000000e9', '00000000-0000-4000-8000-000000000001', '{}');
insert into report_sequence (year, last) values (26, 1);
insert into report (id, number, author_id, club_id, state, audience, published_audience,
  published_version) values
  ('00000000-0000-4000-8000-0000000000e1', 'TN-26-00042-3',
   '00000000-0000-4000-8000-000000000001', '00000000-0000-4000-8000-0000000000c1', 'published',
   'named_clubs', 'named_clubs', 1);
insert into report_reader_club values
  ('00000000-0000-4000-8000-0000000000e1', '00000000-0000-4000-8000-0000000000c2');
insert into report_version (report_id, version, cause, coin_type_id, coin_type_revision, piece,
  condition, whereabouts, method_id, photo_licence) values
  ('00000000-0000-4000-8000-0000000000e1', 1, 'filed', '00000000-0000-4000-8000-0000000000d1', 1,
   '{"title": "Test crown 1887", "year": 1887}', 'worn', 'with_owner', 'cast', 'registry_only');
insert into component (report_id, version, kind, judgement) values
  ('00000000-0000-4000-8000-0000000000e1', 1, 'piece', 'false');
insert into report_photo (report_id, version, photo_id, position, side) values
  ('00000000-0000-4000-8000-0000000000e1', 1, '00000000-0000-4000-8000-0000000000f1', 1,
   'obverse');
insert into report_tell (report_id, version, position, tell_id, disclosure) values
  ('00000000-0000-4000-8000-0000000000e1', 1, 1, 'pits', 'public');
insert into pin (pin_id, report_id, version, tell_position, photo_id, side, clock_hours,
  radius_fraction, disclosure) values
  ('00000000-0000-4000-8000-0000000000b1', '00000000-0000-4000-8000-0000000000e1', 1, 1,
   '00000000-0000-4000-8000-0000000000f1', 'obverse', 3.5, 0.5, 'public');
insert into measurement (report_id, version, position, quantity, value, unit) values
  ('00000000-0000-4000-8000-0000000000e1', 1, 1, 'weight', 24.1, 'g');
insert into surfacing (report_id, version, channel, surfaced_month, country) values
  ('00000000-0000-4000-8000-0000000000e1', 1, 'shop', '2026-03-01', 'GB');
insert into surfacing_detail (report_id, version, town) values
  ('00000000-0000-4000-8000-0000000000e1', 1, 'Brampton');
insert into surfacing_venue (report_id, version, venue) values
  ('00000000-0000-4000-8000-0000000000e1', 1, 'Stall 12');
