import type { MigrationInterface, QueryRunner } from 'typeorm'
import { GROUP_COLUMNS, grant, sameGroup, separateByGroup } from './sql.ts'

/** RF exposure evaluations of kits as somebody put them on record: added, never changed. */
export class AddExposureRecords1796000610000 implements MigrationInterface {
  name = 'AddExposureRecords1796000610000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`
    CREATE TABLE exposure_record (${GROUP_COLUMNS},
      kit_id uuid NOT NULL,
      recorded_on date NOT NULL,
      recorded_at timestamptz NOT NULL,
      recorded_by uuid NOT NULL,
      -- The antenna and the powers that it is about: what it is compared with later.
      configuration jsonb NOT NULL,
      evaluation jsonb NOT NULL,
      UNIQUE (group_id, id),
      ${sameGroup('kit_id', 'kit')}, ${sameGroup('recorded_by', 'member')}
    );
    CREATE INDEX exposure_record_kit ON exposure_record (kit_id, recorded_at DESC);
    ${separateByGroup('exposure_record')}
    ${grant('exposure_record', 'SELECT, INSERT')}`)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('DROP TABLE exposure_record')
  }
}
