import type { TestMaking } from '#shared/contracts/test-making.ts'
import { ENGINE_VERSION } from '#shared/engine/procedures/judge-test.ts'
import { calibrationStanding, type CalibrationStanding } from '#shared/engine/readiness/calibration-state.ts'
import { policyAt, ruleFor } from '#shared/engine/readiness/rules-in-force.ts'
import type { Evidence } from '#shared/engine/readiness/types.ts'
import type { Category } from '#shared/engine/vocabulary.ts'
import { notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { policiesOrFirst } from '../first-policy.ts'
import { EVIDENCE_COLUMNS, type EvidenceRow } from '../kit-state-statements.ts'
import { evidenceOf } from '../load-kit-states.ts'
import { accuracyOf } from './known-for-test.ts'

interface TestRow {
  [column: string]: unknown
  performed_at: Date
  performed_on: string
  id: string | null
  designation: string
  category: Category
  details: Record<string, unknown>
}

const TEST: Statement = {
  name: 'test-with-instrument',
  text: `SELECT t.performed_at, t.performed_on::text, n.id, n.designation, n.category, n.details
    FROM test t LEFT JOIN item n ON n.id = t.instrument_id WHERE t.group_id = $1 AND t.id = $2`,
}
const CALIBRATIONS: Statement = {
  name: 'calibrations-of-instrument',
  text: `SELECT ${EVIDENCE_COLUMNS} FROM test t WHERE t.item_id = $1 AND t.procedure IN ('calibration', 'session-check')
      AND NOT EXISTS (SELECT FROM test s WHERE s.supersedes_id = t.id)
    ORDER BY t.performed_at DESC, t.recorded_at DESC, t.id DESC`,
}

/** What a test was measured with, and whether that could be trusted on its day, as known now. */
export async function readTestMaking(tx: GroupTx, testId: string): Promise<TestMaking> {
  const [row] = await tx.sql<TestRow>(TEST, [tx.groupId, testId])
  if (!row) throw notFound('test')
  if (row.id === null) return { engineVersion: ENGINE_VERSION, instrument: null }
  const [calibrations, policies] = await Promise.all([
    tx.sql<EvidenceRow>(CALIBRATIONS, [row.id]),
    policiesOrFirst(tx),
  ])
  const { id, designation, category, details } = row
  const performedAt = row.performed_at.getTime()
  const policy = policyAt({ policies }, performedAt)
  const rule = ruleFor(policy, { category, facts: {} }, 'calibration', row.performed_on)
  const evidence = calibrations.map(evidenceOf)
  const standing = calibrationStanding({
    calibrations: evidence.filter(({ procedure }) => procedure === 'calibration'),
    sessionChecks: evidence.filter(({ procedure }) => procedure === 'session-check'),
    performedAt,
    performedOn: row.performed_on,
    months: rule?.intervalMonths ?? null,
  })
  return {
    engineVersion: ENGINE_VERSION,
    instrument: {
      item: { id, designation, category },
      accuracy: accuracyOf({ details }) ?? {},
      unit: typeof details.unit === 'string' ? details.unit : null,
      calibration: answered(standing),
    },
  }
}

function answered({ state, before, after, untilOn, check }: CalibrationStanding) {
  return {
    state,
    before: before && named(before),
    after: after && named(after),
    untilOn,
    check: check && named(check),
  }
}

const named = ({ id, performedOn, finding }: Evidence) => ({ testId: id, performedOn, finding })
