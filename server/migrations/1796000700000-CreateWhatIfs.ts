import type { MigrationInterface, QueryRunner } from 'typeorm'
import { GROUP_COLUMNS, grant, sameGroup, separateByGroup } from './sql.ts'

/** What-ifs that were done: what was meant, what it did, and what it left as notes. Only ever added. */
export class CreateWhatIfs1796000700000 implements MigrationInterface {
  name = 'CreateWhatIfs1796000700000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
    CREATE TABLE what_if (
      ${GROUP_COLUMNS},
      steps jsonb NOT NULL,
      reason text NOT NULL CHECK (length(reason) BETWEEN 1 AND 300),
      place_id uuid,
      done jsonb NOT NULL,
      notes jsonb NOT NULL,
      kits jsonb NOT NULL,
      done_at timestamptz NOT NULL,
      done_by uuid,
      ${sameGroup('place_id', 'place')}, ${sameGroup('done_by', 'member')}
    );
    CREATE INDEX what_if_latest ON what_if (group_id, done_at DESC, id DESC);
    ${separateByGroup('what_if')}
    ${grant('what_if', 'SELECT, INSERT')}
    `)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE what_if')
  }
}
