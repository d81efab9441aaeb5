import type { TestForm } from '#shared/contracts/test-form.ts'
import { addMonths } from '#shared/engine/plain-date.ts'
import { ruleFor } from '#shared/engine/readiness/rules-in-force.ts'
import type { Policy } from '#shared/engine/readiness/types.ts'
import type { Category, Procedure } from '#shared/engine/vocabulary.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { accuracyOf } from './known-for-test.ts'

interface InstrumentRow {
  [column: string]: unknown
  id: string
  designation: string
  category: Category
  details: Record<string, unknown>
  calibrated_on: string | null
}

const FITTING: Statement = {
  name: 'fitting-instruments',
  text: `SELECT i.id, i.designation, i.category, i.details, (
      SELECT max(t.performed_on)::text FROM test t WHERE t.item_id = i.id AND t.procedure = 'calibration'
        AND t.finding <> 'fail' AND NOT EXISTS (SELECT FROM test s WHERE s.supersedes_id = t.id)
    ) AS calibrated_on
    FROM item i
    WHERE i.group_id = $1 AND i.category = ANY($2) AND i.condition = 'serviceable' AND i.retired_at IS NULL
    ORDER BY array_position($2, i.category), i.designation, i.id LIMIT 100`,
}

/** Serviceable instruments of these categories, in their order, with the last day of their calibration. */
export async function fittingInstruments(
  tx: GroupTx,
  categories: readonly Category[],
  policy: Policy,
): Promise<TestForm['instruments']> {
  const [rows, today] = await Promise.all([
    tx.sql<InstrumentRow>(FITTING, [tx.groupId, categories]),
    tx.today(),
  ])
  return rows.map(({ id, designation, category, details, calibrated_on: calibratedOn }) => {
    const months = ruleFor(policy, { category, facts: {} }, 'calibration', today)?.intervalMonths
    const until = calibratedOn !== null && months ? addMonths(calibratedOn, months) : null
    const accuracy = accuracyOf({ details }) ?? {}
    return { id, designation, category, calibratedUntilOn: until, accuracy }
  })
}

interface LastRow {
  [column: string]: unknown
  method: string
  instrument_id: string | null
}

const LAST: Statement = {
  name: 'last-method',
  text: `SELECT method, instrument_id FROM test WHERE group_id = $1 AND recorded_by = $2 AND procedure = $3
    ORDER BY performed_at DESC, id LIMIT 1`,
}

/** What the member at hand used last for the procedure. */
export async function lastUsed(
  tx: GroupTx,
  procedure: Procedure,
): Promise<{ method: string; instrumentId: string | null } | null> {
  const [row] = await tx.sql<LastRow>(LAST, [tx.groupId, tx.actor.memberId, procedure])
  return row ? { method: row.method, instrumentId: row.instrument_id } : null
}
