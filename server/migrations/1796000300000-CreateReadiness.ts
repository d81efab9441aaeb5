import type { MigrationInterface, QueryRunner } from 'typeorm'
import { GROUP_COLUMNS, grant, sameGroup, separateByGroup } from './sql.ts'

const VERDICTS = `verdict IN ('proven', 'proven-with-limits', 'not-proven', 'not-fit')`
const AVAILABILITIES = `availability IN ('available', 'assigned', 'out-of-service')`

/** Stored periods, what the board reads of them, and everything that leaves by mail. */
export class CreateReadiness1796000300000 implements MigrationInterface {
  name = 'CreateReadiness1796000300000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
    CREATE TABLE readiness_period (
      ${GROUP_COLUMNS},
      kit_id uuid NOT NULL,
      during tstzrange NOT NULL CHECK (NOT isempty(during) AND lower_inc(during)),
      verdict text NOT NULL CHECK (${VERDICTS}),
      availability text NOT NULL CHECK (${AVAILABILITIES}),
      availability_reason text NOT NULL DEFAULT '',
      place_id uuid,
      reasons jsonb NOT NULL,
      capability jsonb NOT NULL,
      oldest_vital_on date,
      digest text NOT NULL,
      known_since timestamptz NOT NULL,
      ${sameGroup('kit_id', 'kit')}, ${sameGroup('place_id', 'place')},
      EXCLUDE USING gist (kit_id WITH =, during WITH &&)
    );
    CREATE INDEX readiness_period_from ON readiness_period (group_id, kit_id, lower(during));
    ${separateByGroup('readiness_period')}
    ${grant('readiness_period', 'SELECT, INSERT, UPDATE, DELETE')}

    -- Derived from the periods. valid_until is the row's own end: a reader past it asks the periods instead.
    CREATE TABLE board_row (
      kit_id uuid PRIMARY KEY,
      group_id uuid NOT NULL REFERENCES groups (id),
      designation text NOT NULL,
      -- What the board shows of the kit and readiness does not depend on, as a digest: whether the row is stale.
      face text NOT NULL DEFAULT '',
      station boolean NOT NULL,
      verdict text NOT NULL CHECK (${VERDICTS}),
      verdict_rank smallint NOT NULL,
      availability text NOT NULL CHECK (${AVAILABILITIES}),
      reason_top text NOT NULL,
      reason_n int NOT NULL,
      holds_until timestamptz NOT NULL,
      valid_until timestamptz NOT NULL,
      band_codes text NOT NULL DEFAULT '',
      watts numeric(7,1),
      hours numeric(7,1),
      horizon text NOT NULL,
      oldest_vital_on date,
      ${sameGroup('kit_id', 'kit')}
    ) WITH (fillfactor = 80);
    CREATE INDEX board_row_order ON board_row (group_id, verdict_rank, holds_until, kit_id);
    CREATE INDEX board_row_valid ON board_row (group_id, valid_until);
    ${separateByGroup('board_row')}
    ${grant('board_row', 'SELECT, INSERT, UPDATE, DELETE')}

    CREATE TABLE board_count (
      group_id uuid NOT NULL REFERENCES groups (id),
      station boolean NOT NULL,
      availability text NOT NULL,
      verdict text NOT NULL,
      n int NOT NULL,
      PRIMARY KEY (group_id, station, availability, verdict)
    ) WITH (fillfactor = 80);
    ${separateByGroup('board_count')}
    ${grant('board_count', 'SELECT, INSERT, UPDATE, DELETE')}

    CREATE TABLE board_revision (
      group_id uuid PRIMARY KEY REFERENCES groups (id),
      revision bigint NOT NULL DEFAULT 0
    ) WITH (fillfactor = 80);
    ${separateByGroup('board_revision')}
    ${grant('board_revision', 'SELECT, INSERT, UPDATE')}

    CREATE TABLE mail (
      ${GROUP_COLUMNS},
      member_id uuid,
      recipient text NOT NULL,
      subject text NOT NULL,
      text_body text NOT NULL,
      html_body text NOT NULL,
      headers jsonb NOT NULL DEFAULT '{}',
      message_id text NOT NULL UNIQUE,
      queued_at timestamptz NOT NULL,
      next_try_at timestamptz NOT NULL,
      tries int NOT NULL DEFAULT 0,
      last_error text,
      sent_at timestamptz,
      given_up_at timestamptz,
      ${sameGroup('member_id', 'member')}
    );
    CREATE INDEX mail_waiting ON mail (group_id, next_try_at) WHERE sent_at IS NULL AND given_up_at IS NULL;
    ${separateByGroup('mail')}
    ${grant('mail', 'SELECT, INSERT, UPDATE')}

    CREATE TABLE reminder (
      member_id uuid NOT NULL,
      group_id uuid NOT NULL REFERENCES groups (id),
      on_day date NOT NULL,
      made_at timestamptz NOT NULL,
      mail_id uuid,
      PRIMARY KEY (member_id, on_day),
      ${sameGroup('member_id', 'member')}
    );
    ${separateByGroup('reminder')}
    ${grant('reminder', 'SELECT, INSERT')}

    -- One row a group and local day: the morning's reminders are made once, by whichever process comes first.
    CREATE TABLE reminder_run (
      group_id uuid NOT NULL REFERENCES groups (id),
      on_day date NOT NULL,
      made_at timestamptz NOT NULL,
      PRIMARY KEY (group_id, on_day)
    );
    ${separateByGroup('reminder_run')}
    ${grant('reminder_run', 'SELECT, INSERT')}

    CREATE FUNCTION groups_with_board_rows_past(instant timestamptz)
      RETURNS TABLE (group_id uuid)
      LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
        SELECT DISTINCT group_id FROM board_row WHERE valid_until <= instant $$;
    CREATE FUNCTION groups_with_mail_waiting(instant timestamptz)
      RETURNS TABLE (group_id uuid)
      LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
        SELECT DISTINCT group_id FROM mail
        WHERE sent_at IS NULL AND given_up_at IS NULL AND next_try_at <= instant $$;
    REVOKE ALL ON FUNCTION groups_with_board_rows_past(timestamptz), groups_with_mail_waiting(timestamptz) FROM PUBLIC;
    GRANT EXECUTE ON FUNCTION groups_with_board_rows_past(timestamptz), groups_with_mail_waiting(timestamptz)
      TO halyard_app;
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`
    DROP FUNCTION groups_with_board_rows_past(timestamptz), groups_with_mail_waiting(timestamptz);
    DROP TABLE reminder_run, reminder, mail, board_revision, board_count, board_row, readiness_period;
    `)
  }
}
