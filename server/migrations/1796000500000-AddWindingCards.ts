import type { MigrationInterface, QueryRunner } from 'typeorm'

/** How a build sheet is wound: wire, lengths, tap, cost and cautions, as its card prints them. */
export class AddWindingCards1796000500000 implements MigrationInterface {
  name = 'AddWindingCards1796000500000'

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE build_sheet ADD COLUMN winding jsonb NOT NULL DEFAULT '{}'`)
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query('ALTER TABLE build_sheet DROP COLUMN winding')
  }
}
