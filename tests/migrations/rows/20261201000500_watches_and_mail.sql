insert into watch (id, person_id, name, filter, cadence) values
  ('00000000-0000-4000-8000-000000000071', '00000000-0000-4000-8000-000000000002', 'All', '{}',
   'weekly');
insert into mail (id, cause, kind, person_id, address) values
  ('00000000-0000-4000-8000-000000000072', 'digest:x', 'digest',
   '00000000-0000-4000-8000-000000000002', 'moderator@example.org');
insert into alert (watch_id, person_id, report_id, publication_id, reasons, mail_id) values
  ('00000000-0000-4000-8000-000000000071', '00000000-0000-4000-8000-000000000002',
   '00000000-0000-4000-8000-0000000000e1', '00000000-0000-4000-8000-0000000000aa', '[]',
   '00000000-0000-4000-8000-000000000072');
insert into mail_item (mail_id, report_id, publication_id, position, reasons) values
  ('00000000-0000-4000-8000-000000000072', '00000000-0000-4000-8000-0000000000e1',
   '00000000-0000-4000-8000-0000000000aa', 1, '[]');
