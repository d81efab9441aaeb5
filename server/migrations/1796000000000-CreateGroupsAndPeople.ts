import type { MigrationInterface, QueryRunner } from 'typeorm'
import { GROUP_COLUMNS, grant, sameGroup, separateByGroup } from './sql.ts'

const ROLES = `ARRAY['administrator','net-coordinator','quartermaster','volunteer','observer']`

const LOOK_UPS =
  'find_sign_in(text), find_one_time_link(bytea), find_session(text, timestamptz), list_groups()'

/** Groups, members, credentials, sessions, one-time links, rate limits and the audit log. */
export class CreateGroupsAndPeople1796000000000 implements MigrationInterface {
  name = 'CreateGroupsAndPeople1796000000000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
    DO $$ BEGIN
      IF NOT EXISTS (SELECT FROM pg_roles WHERE rolname = 'halyard_app') THEN
        CREATE ROLE halyard_app NOLOGIN;
        -- Where one address does both, the connection drops its rights to this role.
        EXECUTE format('GRANT halyard_app TO %I', current_user);
      END IF;
    END $$;
    GRANT USAGE ON SCHEMA public TO halyard_app;
    CREATE EXTENSION IF NOT EXISTS btree_gist;

    CREATE TABLE groups (
      id uuid PRIMARY KEY,
      name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
      short_name text NOT NULL CHECK (length(short_name) BETWEEN 1 AND 40),
      time_zone text NOT NULL,
      return_address text NOT NULL DEFAULT '' CHECK (length(return_address) <= 200),
      demo boolean NOT NULL DEFAULT false,
      archived_at timestamptz,
      created_at timestamptz NOT NULL
    );
    ${separateByGroup('groups', 'id')}
    ${grant('groups', 'SELECT, INSERT, UPDATE')}

    CREATE TABLE member (
      ${GROUP_COLUMNS},
      name text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
      email text CHECK (length(email) BETWEEN 3 AND 254),
      phone text CHECK (length(phone) <= 40),
      call_sign text CHECK (length(call_sign) <= 20),
      licence_class text CHECK (length(licence_class) <= 40),
      licence_expires_on date,
      roles text[] NOT NULL CHECK (roles <@ ${ROLES} AND cardinality(roles) > 0),
      temperature_unit text NOT NULL DEFAULT 'C' CHECK (temperature_unit IN ('C', 'F')),
      length_unit text NOT NULL DEFAULT 'm' CHECK (length_unit IN ('m', 'ft')),
      wants_reminders boolean NOT NULL DEFAULT true,
      notes text NOT NULL DEFAULT '' CHECK (length(notes) <= 2000),
      version int NOT NULL DEFAULT 1,
      created_at timestamptz NOT NULL,
      removed_at timestamptz,
      UNIQUE (group_id, id)
    );
    -- Unique in a group only: a group must not learn from a refusal that another knows an address.
    CREATE UNIQUE INDEX member_email ON member (group_id, lower(email)) WHERE removed_at IS NULL;
    CREATE INDEX member_sign_in ON member (lower(email)) WHERE removed_at IS NULL;
    ${separateByGroup('member')}
    ${grant('member', 'SELECT, INSERT, UPDATE')}

    CREATE TABLE credential (
      member_id uuid PRIMARY KEY,
      group_id uuid NOT NULL REFERENCES groups (id),
      password_hash text NOT NULL,
      changed_at timestamptz NOT NULL,
      ${sameGroup('member_id', 'member')}
    );
    ${separateByGroup('credential')}
    ${grant('credential', 'SELECT, INSERT, UPDATE, DELETE')}

    CREATE TABLE session (
      sid text PRIMARY KEY,
      sess jsonb NOT NULL,
      expire timestamptz NOT NULL,
      member_id uuid GENERATED ALWAYS AS ((sess ->> 'memberId')::uuid) STORED
    );
    CREATE INDEX session_expire ON session (expire);
    CREATE INDEX session_member ON session (member_id);
    ${grant('session', 'SELECT, INSERT, UPDATE, DELETE')}

    CREATE TABLE one_time_link (
      ${GROUP_COLUMNS},
      member_id uuid NOT NULL,
      purpose text NOT NULL CHECK (purpose IN ('invitation', 'password-reset', 'reminders')),
      token_hash bytea NOT NULL UNIQUE,
      created_at timestamptz NOT NULL,
      expires_at timestamptz NOT NULL,
      used_at timestamptz,
      ${sameGroup('member_id', 'member')}
    );
    CREATE INDEX one_time_link_member ON one_time_link (group_id, member_id);
    ${separateByGroup('one_time_link')}
    ${grant('one_time_link', 'SELECT, INSERT, UPDATE')}

    CREATE TABLE rate_limit (
      key varchar(255) PRIMARY KEY,
      points integer NOT NULL DEFAULT 0,
      expire bigint
    );
    ${grant('rate_limit', 'SELECT, INSERT, UPDATE, DELETE')}

    CREATE TABLE audit_event (
      id bigint GENERATED ALWAYS AS IDENTITY PRIMARY KEY,
      group_id uuid REFERENCES groups (id),
      at timestamptz NOT NULL,
      member_id uuid,
      actor text NOT NULL,
      address text NOT NULL,
      request_id text NOT NULL,
      action text NOT NULL,
      subject_type text,
      subject_id uuid,
      kit_id uuid,
      summary text NOT NULL,
      before jsonb,
      after jsonb
    );
    CREATE INDEX audit_event_subject ON audit_event (group_id, subject_id, id DESC);
    CREATE INDEX audit_event_kit ON audit_event (group_id, kit_id, id DESC) WHERE kit_id IS NOT NULL;
    CREATE INDEX audit_event_group ON audit_event (group_id, id DESC);
    ALTER TABLE audit_event ENABLE ROW LEVEL SECURITY;
    ALTER TABLE audit_event FORCE ROW LEVEL SECURITY;
    CREATE POLICY own_group_read ON audit_event FOR SELECT TO halyard_app
      USING (group_id = (select nullif(current_setting('halyard.group_id', true), '')::uuid));
    CREATE POLICY add_only ON audit_event FOR INSERT TO halyard_app WITH CHECK (
      group_id IS NULL OR group_id = (select nullif(current_setting('halyard.group_id', true), '')::uuid));
    CREATE POLICY owner_all ON audit_event TO CURRENT_USER USING (true) WITH CHECK (true);
    ${grant('audit_event', 'SELECT, INSERT')}

    -- Look-ups made before a group is known. They return identifiers and the hash, nothing else.
    CREATE FUNCTION find_sign_in(address text)
      RETURNS TABLE (member_id uuid, group_id uuid, password_hash text)
      LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
        SELECT m.id, m.group_id, c.password_hash FROM member m LEFT JOIN credential c ON c.member_id = m.id
        JOIN groups g ON g.id = m.group_id
        WHERE lower(m.email) = lower(address) AND m.removed_at IS NULL AND g.archived_at IS NULL
        ORDER BY m.created_at, m.id $$;
    CREATE FUNCTION find_one_time_link(hash bytea)
      RETURNS TABLE (id uuid, group_id uuid, member_id uuid, purpose text, expires_at timestamptz, used_at timestamptz)
      LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
        SELECT id, group_id, member_id, purpose, expires_at, used_at FROM one_time_link WHERE token_hash = hash $$;
    -- plpgsql keeps the plan of its query for the whole connection; a function in SQL plans anew at each call.
    CREATE FUNCTION find_session(wanted text, at timestamptz)
      RETURNS TABLE (sess jsonb, member_id uuid, group_id uuid, name text, roles text[])
      LANGUAGE plpgsql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
      BEGIN
        RETURN QUERY SELECT s.sess, m.id, m.group_id, m.name, m.roles FROM session s
          JOIN member m ON m.id = s.member_id JOIN groups g ON g.id = m.group_id
          WHERE s.sid = wanted AND s.expire > at AND m.removed_at IS NULL AND g.archived_at IS NULL;
      END $$;
    CREATE FUNCTION list_groups()
      RETURNS TABLE (id uuid, time_zone text)
      LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
        SELECT id, time_zone FROM groups WHERE archived_at IS NULL ORDER BY id $$;
    REVOKE ALL ON FUNCTION ${LOOK_UPS} FROM PUBLIC;
    GRANT EXECUTE ON FUNCTION ${LOOK_UPS} TO halyard_app;
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`
    DROP FUNCTION ${LOOK_UPS};
    DROP TABLE audit_event, rate_limit, one_time_link, session, credential, member, groups;
    DROP EXTENSION btree_gist;
    REVOKE USAGE ON SCHEMA public FROM halyard_app;
    `)
  }
}
