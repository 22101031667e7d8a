insert into pgboss.job (name, data) values ('match-watches', '{}');
