-- The four database roles and the database itself. Run it once as a superuser of the server, again whenever it changes:
--   psql -d postgres -v database=loamline -f db/roles.sql
-- then give the three roles that log in a password of their own (\password loamline_owner, and so on).
-- Running it twice changes nothing.
\set ON_ERROR_STOP on
\if :{?database}
\else
  \set database loamline
\endif

select format('create role %I', name)
from unnest(array['loamline_owner', 'loamline_app', 'loamline_lookup', 'loamline_backup']) as name
where not exists (select from pg_roles where rolname = name)
\gexec

-- owner: owns and migrates; the running program never signs in as it.
alter role loamline_owner login nosuperuser nocreatedb nocreaterole nobypassrls noreplication;
-- app: web and worker; row-level security always holds for it.
alter role loamline_app login nosuperuser nocreatedb nocreaterole nobypassrls noreplication;
-- lookup: nobody signs in as it; it owns the few functions that look across sites.
alter role loamline_lookup nologin nosuperuser nocreatedb nocreaterole bypassrls noreplication;
-- backup: reads everything, writes nothing.
alter role loamline_backup login nosuperuser nocreatedb nocreaterole bypassrls noreplication;

-- A migration hands a function over to lookup, which takes membership in it.
grant loamline_lookup to loamline_owner;
grant pg_read_all_data to loamline_backup;
alter role loamline_backup set default_transaction_read_only = on;

select format('create database %I owner loamline_owner encoding %L template template0', :'database', 'UTF8')
where not exists (select from pg_database where datname = :'database')
\gexec

revoke all on database :"database" from public;
grant connect, temporary on database :"database" to loamline_app;
grant connect on database :"database" to loamline_backup;
