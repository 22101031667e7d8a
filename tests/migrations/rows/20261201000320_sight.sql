-- It makes functions and policies only.
select sees_evidence('00000000-0000-4000-8000-0000000000e1');
