#!/usr/bin/env bash
# Makes the three roles and the database on the first start of a new PostgreSQL; its image runs it once.
set -euo pipefail

# The passwords travel as variables, so that none stands on a command line.
psql --set ON_ERROR_STOP=1 --no-psqlrc --quiet --username postgres --dbname postgres <<'SQL'
\getenv owner_password OWNER_PASSWORD
\getenv app_password APP_PASSWORD
\getenv backup_password BACKUP_PASSWORD
-- The owner makes the schema; the application is neither owner nor superuser, so that row-level security binds it;
-- the backup role reads every group's rows and writes nothing.
CREATE ROLE halyard_owner LOGIN CREATEROLE PASSWORD :'owner_password';
CREATE ROLE halyard_app LOGIN PASSWORD :'app_password';
CREATE ROLE halyard_backup LOGIN BYPASSRLS PASSWORD :'backup_password';
GRANT pg_read_all_data TO halyard_backup;
GRANT halyard_app TO halyard_owner;
CREATE DATABASE halyard OWNER halyard_owner;
SQL
