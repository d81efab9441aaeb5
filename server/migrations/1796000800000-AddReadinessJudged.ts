import type { MigrationInterface, QueryRunner } from 'typeorm'
import { grant, separateByGroup } from './sql.ts'

/** By which rules the stored periods of a group were last worked out as a whole. */
export class AddReadinessJudged1796000800000 implements MigrationInterface {
  name = 'AddReadinessJudged1796000800000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
    CREATE TABLE readiness_judged (
      group_id uuid PRIMARY KEY REFERENCES groups (id),
      version int NOT NULL
    );
    ${separateByGroup('readiness_judged')}
    ${grant('readiness_judged', 'SELECT, INSERT, UPDATE')}

    CREATE FUNCTION groups_judged_before(rules_version int)
      RETURNS TABLE (group_id uuid)
      LANGUAGE sql STABLE SECURITY DEFINER SET search_path = public, pg_temp AS $$
        SELECT g.id FROM groups g LEFT JOIN readiness_judged j ON j.group_id = g.id
        WHERE g.archived_at IS NULL AND (j.version IS NULL OR j.version < rules_version) ORDER BY g.id $$;
    REVOKE ALL ON FUNCTION groups_judged_before(int) FROM PUBLIC;
    GRANT EXECUTE ON FUNCTION groups_judged_before(int) TO halyard_app;`)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP FUNCTION groups_judged_before(int); DROP TABLE readiness_judged')
  }
}
