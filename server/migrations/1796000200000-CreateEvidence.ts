import type { MigrationInterface, QueryRunner } from 'typeorm'
import { GROUP_COLUMNS, grant, sameGroup, separateByGroup } from './sql.ts'

const table = (name: string, columns: string, rights: string) => `
    CREATE TABLE ${name} (${GROUP_COLUMNS}, ${columns});
    ${separateByGroup(name)}
    ${grant(name, rights)}`

const PROCEDURES = `procedure IN ('heat-test', 'pair-loss', 'open-short-load', 'antenna-sweep', 'feedline-loss',
        'battery-capacity', 'radio-check', 'inspection', 'count', 'calibration', 'boot-and-update', 'on-air-check')`

/** Policies with their rules, tests, raised checks and the decisions that lower a verdict or accept a risk. */
export class CreateEvidence1796000200000 implements MigrationInterface {
  name = 'CreateEvidence1796000200000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
    ${table(
      'policy',
      `
      number int NOT NULL CHECK (number > 0),
      name text NOT NULL CHECK (length(name) BETWEEN 1 AND 60),
      effective_on date NOT NULL,
      reason text NOT NULL CHECK (length(reason) BETWEEN 1 AND 1000),
      settings jsonb NOT NULL DEFAULT '{}',
      created_by uuid,
      created_at timestamptz NOT NULL,
      UNIQUE (group_id, id),
      UNIQUE (group_id, number),
      ${sameGroup('created_by', 'member')}`,
      'SELECT, INSERT',
    )}

    ${table(
      'rule',
      `
      policy_id uuid NOT NULL,
      category text NOT NULL CHECK (category ~ '^[a-z][a-z-]{1,39}$'),
      procedure text NOT NULL CHECK (${PROCEDURES}),
      applies jsonb NOT NULL DEFAULT '{}',
      interval_months int CHECK (interval_months BETWEEN 1 AND 120),
      warning_days int NOT NULL DEFAULT 30 CHECK (warning_days BETWEEN 0 AND 365),
      vital boolean NOT NULL,
      limits jsonb NOT NULL DEFAULT '{}',
      reason text NOT NULL CHECK (length(reason) BETWEEN 1 AND 1000),
      source text NOT NULL CHECK (length(source) BETWEEN 1 AND 300),
      UNIQUE (group_id, id),
      ${sameGroup('policy_id', 'policy')}`,
      'SELECT, INSERT',
    )}
    CREATE INDEX rule_policy ON rule (group_id, policy_id);

    ${table(
      'test',
      `
      procedure text NOT NULL CHECK (${PROCEDURES}),
      item_id uuid, kit_id uuid,
      CHECK ((item_id IS NULL) <> (kit_id IS NULL)),
      performed_at timestamptz NOT NULL,
      performed_on date NOT NULL,
      recorded_at timestamptz NOT NULL,
      claimed_at timestamptz CHECK (claimed_at > recorded_at),
      operator_id uuid NOT NULL,
      recorded_by uuid NOT NULL,
      method text NOT NULL CHECK (length(method) BETWEEN 1 AND 120),
      instrument_id uuid,
      instrument_note text NOT NULL DEFAULT '' CHECK (length(instrument_note) <= 200),
      inputs jsonb NOT NULL,
      results jsonb NOT NULL,
      findings jsonb NOT NULL,
      finding text NOT NULL CHECK (finding IN ('pass', 'marginal', 'fail')),
      policy_id uuid NOT NULL,
      rule_id uuid,
      engine_version text NOT NULL,
      notes text NOT NULL DEFAULT '' CHECK (length(notes) <= 2000),
      supersedes_id uuid UNIQUE,
      supersedes_reason text CHECK (length(supersedes_reason) BETWEEN 1 AND 500),
      CHECK ((supersedes_id IS NULL) = (supersedes_reason IS NULL)),
      content_hash bytea NOT NULL,
      UNIQUE (group_id, id),
      ${sameGroup('item_id', 'item')}, ${sameGroup('kit_id', 'kit')},
      ${sameGroup('operator_id', 'member')}, ${sameGroup('recorded_by', 'member')},
      ${sameGroup('instrument_id', 'item')}, ${sameGroup('policy_id', 'policy')}, ${sameGroup('rule_id', 'rule')},
      ${sameGroup('supersedes_id', 'test')}`,
      'SELECT, INSERT',
    )}
    CREATE INDEX test_item ON test (item_id, procedure, performed_at DESC) WHERE item_id IS NOT NULL;
    CREATE INDEX test_kit ON test (kit_id, procedure, performed_at DESC) WHERE kit_id IS NOT NULL;
    CREATE INDEX test_instrument ON test (instrument_id, performed_at) WHERE instrument_id IS NOT NULL;
    CREATE INDEX test_group ON test (group_id, performed_at DESC, id);

    -- What a test did to a kit when it was recorded, so that a resend gets the first answer again.
    CREATE TABLE test_effect (
      test_id uuid NOT NULL,
      kit_id uuid NOT NULL,
      group_id uuid NOT NULL REFERENCES groups (id),
      verdict_before text,
      verdict_after text NOT NULL,
      sentences jsonb NOT NULL,
      PRIMARY KEY (test_id, kit_id),
      ${sameGroup('test_id', 'test')}, ${sameGroup('kit_id', 'kit')}
    );
    ${separateByGroup('test_effect')}
    ${grant('test_effect', 'SELECT, INSERT')}

    -- A check asked for by an event (a drop, a storm, a recall, an opening) rather than by an interval.
    ${table(
      'raised_check',
      `
      procedure text NOT NULL CHECK (${PROCEDURES}),
      item_id uuid, kit_id uuid,
      CHECK ((item_id IS NULL) <> (kit_id IS NULL)),
      band text,
      cause text NOT NULL CHECK (cause IN ('drop', 'storm', 'recall', 'opening', 'rewind', 'other')),
      reason text NOT NULL CHECK (length(reason) BETWEEN 1 AND 300),
      doubts_earlier boolean NOT NULL DEFAULT false,
      raised_at timestamptz NOT NULL,
      due_on date NOT NULL,
      raised_by uuid,
      withdrawn_at timestamptz,
      UNIQUE (group_id, id),
      ${sameGroup('item_id', 'item')}, ${sameGroup('kit_id', 'kit')}, ${sameGroup('raised_by', 'member')}`,
      'SELECT, INSERT, UPDATE',
    )}
    CREATE INDEX raised_check_item ON raised_check (item_id) WHERE item_id IS NOT NULL;
    CREATE INDEX raised_check_kit ON raised_check (kit_id) WHERE kit_id IS NOT NULL;

    -- A person may lower a verdict, or accept a named risk until a date; nobody can raise one.
    ${table(
      'verdict_decision',
      `
      kit_id uuid NOT NULL,
      kind text NOT NULL CHECK (kind IN ('lowered', 'risk-accepted')),
      to_verdict text CHECK (to_verdict IN ('proven-with-limits', 'not-proven', 'not-fit')),
      CHECK ((kind = 'lowered') = (to_verdict IS NOT NULL)),
      reason text NOT NULL CHECK (length(reason) BETWEEN 1 AND 300),
      from_at timestamptz NOT NULL,
      until_at timestamptz,
      CHECK (kind = 'lowered' OR until_at IS NOT NULL),
      CHECK (until_at > from_at),
      decided_by uuid NOT NULL,
      withdrawn_at timestamptz,
      UNIQUE (group_id, id),
      ${sameGroup('kit_id', 'kit')}, ${sameGroup('decided_by', 'member')}`,
      'SELECT, INSERT, UPDATE',
    )}
    CREATE INDEX verdict_decision_kit ON verdict_decision (kit_id);
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE verdict_decision, raised_check, test_effect, test, rule, policy;`)
  }
}
