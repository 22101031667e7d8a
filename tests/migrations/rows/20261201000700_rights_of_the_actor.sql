-- Functions alone: the rights of a member, asked with the rows of the migrations before.
do $$
declare someone uuid := (select id from person order by id limit 1);
begin
  perform become_actor(someone::text);
  assert actor_clubs() = find_clubs_of(someone, null);
  assert actor_is_registrar() = find_is_registrar(someone);
end $$;
