insert into coin_type (id, slug, kind, name, issuer) values
  ('00000000-0000-4000-8000-0000000000d1', 'test-crown', 'coin', 'Test crown', 'Nowhere');
insert into coin_type_revision (coin_type_id, revision, standard, content_hash) values
  ('00000000-0000-4000-8000-0000000000d1', 1, '{"notes": []}', 'hash');
insert into coin_type_issue (coin_type_id, year, mint_mark, state) values
  ('00000000-0000-4000-8000-0000000000d1', 1887, '', 'struck');
insert into coin_type_legal_status (coin_type_id, country, status, source, source_kind) values
  ('00000000-0000-4000-8000-0000000000d1', 'GB', 'obsolete', 'test', 'memory');
insert into production_method (id, name, position) values ('cast', 'Cast', 1);
insert into tell (id, name, seen, place, methods, disclosure, position) values
  ('pits', 'Pits', 'round pits', 'any', '{cast}', 'public', 1);
insert into genuine_feature (id, seen, position) values ('wear', 'wear', 1);
insert into search_word (word) values ('crown');
