import type { MigrationInterface, QueryRunner } from 'typeorm'

const TABLES = ['rule', 'test', 'raised_check'] as const
const BEFORE = [
  'heat-test',
  'pair-loss',
  'open-short-load',
  'antenna-sweep',
  'feedline-loss',
  'battery-capacity',
  'radio-check',
  'inspection',
  'count',
  'calibration',
  'boot-and-update',
  'on-air-check',
]

/** Session checks of an instrument against a reference part are a procedure like the others. */
export class AddSessionChecks1796000600000 implements MigrationInterface {
  name = 'AddSessionChecks1796000600000'

  async up(runner: QueryRunner): Promise<void> {
    await allow(runner, [...BEFORE, 'session-check'], '')
  }

  /** Tests are never taken back: those that are there stay, and no more can be added. */
  async down(runner: QueryRunner): Promise<void> {
    await allow(runner, BEFORE, 'NOT VALID')
  }
}

async function allow(runner: QueryRunner, procedures: readonly string[], validity: string): Promise<void> {
  const list = procedures.map((procedure) => `'${procedure}'`).join(', ')
  for (const table of TABLES)
    await runner.query(`ALTER TABLE ${table} DROP CONSTRAINT ${table}_procedure_check,
      ADD CONSTRAINT ${table}_procedure_check CHECK (procedure IN (${list})) ${validity}`)
}
