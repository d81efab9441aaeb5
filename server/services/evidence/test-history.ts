import type { FeedlineReading } from '#shared/engine/procedures/line-history.ts'
import type { WorstSwr } from '#shared/engine/procedures/sweep-baseline.ts'
import type { ReferencePart } from '#shared/engine/procedures/session-check.ts'
import type { Position } from '#shared/engine/readiness/types.ts'
import type { Band, Procedure } from '#shared/engine/vocabulary.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

/** Earlier records of a subject that a test is judged with; only what its procedure asks for is read. */
export interface TestHistory {
  readonly feedline: readonly FeedlineRow[]
  readonly efficiency: readonly EfficiencyRow[]
  readonly baseline: BaselineRow | null
  readonly references: readonly ReferencePart[]
  readonly plan: { readonly positions: readonly Position[]; readonly sealNumber: string | null }
}

export interface Asked {
  readonly procedure: Procedure
  readonly subjectId: string
  readonly performedAt: Date
  /** The test that this one corrects counts no more. */
  readonly corrects: string | null
}

export interface FeedlineRow {
  [column: string]: unknown
  readings: FeedlineReading[]
  sets_baseline: boolean
}

export interface EfficiencyRow {
  [column: string]: unknown
  id: string
  band: Band
  efficiency: number
}

export interface BaselineRow {
  [column: string]: unknown
  id: string
  performed_on: string
  file: string | null
  worst: WorstSwr[]
}

type ReferenceRow = ReferencePart & Record<string, unknown>

// Corrected tests count no more, and a test that this one corrects is among them.
const EARLIER = `t.item_id = $1 AND t.performed_at < $2 AND t.id IS DISTINCT FROM $3
      AND NOT EXISTS (SELECT FROM test s WHERE s.supersedes_id = t.id)`
const SETS_BASELINE = `coalesce((t.inputs ->> 'setsBaseline')::boolean, false)`

const FEEDLINE: Statement = {
  name: 'feedline-history',
  text: `SELECT t.results -> 'readings' AS readings, ${SETS_BASELINE} AS sets_baseline FROM test t
    WHERE t.procedure = 'feedline-loss' AND ${EARLIER} ORDER BY t.performed_at, t.id`,
}

const EFFICIENCY: Statement = {
  name: 'efficiency-in-force',
  text: `SELECT DISTINCT ON (f ->> 'band') t.id, f ->> 'band' AS band, (f ->> 'value')::float8 AS efficiency
    FROM test t CROSS JOIN jsonb_array_elements(t.findings) f
    WHERE t.procedure IN ('pair-loss', 'open-short-load') AND f ->> 'measure' = 'efficiency'
      AND f ->> 'band' IS NOT NULL AND f ->> 'value' IS NOT NULL AND ${EARLIER}
    ORDER BY f ->> 'band', t.performed_at DESC, t.id DESC`,
}

/** The newest sweep that set a baseline, else the first of all. */
const BASELINE: Statement = {
  name: 'sweep-baseline',
  text: `SELECT t.id, t.performed_on::text, t.inputs ->> 'file' AS file, t.results -> 'worst' AS worst FROM test t
    WHERE t.procedure = 'antenna-sweep' AND ${EARLIER}
    ORDER BY ${SETS_BASELINE} DESC, CASE WHEN ${SETS_BASELINE} THEN t.performed_at END DESC, t.performed_at, t.id
    LIMIT 1`,
}

const PLAN: Statement = {
  name: 'count-plan',
  text: `SELECT p.id, p.name, p.category, p.quantity, p.vital FROM position p JOIN kit k ON k.kit_kind_id = p.kit_kind_id
    WHERE k.id = $1 AND p.removed_at IS NULL ORDER BY p.ordinal, p.id`,
}
const SEAL: Statement = { name: 'count-seal', text: 'SELECT seal_number FROM kit WHERE id = $1' }

/** A part is one as soon as its agreed value and its tolerance are on record; what is retired is none. */
const REFERENCES: Statement = {
  name: 'reference-parts',
  text: `SELECT id, designation, details ->> 'referenceFor' AS for, coalesce(details ->> 'referenceReads', '') AS reads,
      (details ->> 'referenceValue')::float8 AS agreed, (details ->> 'referenceTolerance')::float8 AS tolerance,
      coalesce(details ->> 'referenceUnit', '') AS unit
    FROM item WHERE group_id = $1 AND id <> $2 AND retired_at IS NULL AND condition = 'serviceable'
      AND details ? 'referenceValue' AND details ? 'referenceTolerance'
    ORDER BY designation, id LIMIT 100`,
}

const NOTHING: TestHistory = {
  feedline: [],
  efficiency: [],
  baseline: null,
  references: [],
  plan: { positions: [], sealNumber: null },
}

export async function testHistory(tx: GroupTx, asked: Asked): Promise<TestHistory> {
  const values = [asked.subjectId, asked.performedAt, asked.corrects]
  switch (asked.procedure) {
    case 'feedline-loss':
      return { ...NOTHING, feedline: await tx.sql<FeedlineRow>(FEEDLINE, values) }
    case 'heat-test':
      return { ...NOTHING, efficiency: await tx.sql<EfficiencyRow>(EFFICIENCY, values) }
    case 'antenna-sweep':
      return { ...NOTHING, baseline: (await tx.sql<BaselineRow>(BASELINE, values))[0] ?? null }
    case 'session-check':
      return { ...NOTHING, references: await tx.sql<ReferenceRow>(REFERENCES, [tx.groupId, asked.subjectId]) }
    case 'count':
      return { ...NOTHING, plan: await loadPlan(tx, asked.subjectId) }
    default:
      return NOTHING
  }
}

async function loadPlan(tx: GroupTx, kitId: string): Promise<TestHistory['plan']> {
  const [positions, [kit]] = await Promise.all([
    tx.sql<Position & Record<string, unknown>>(PLAN, [kitId]),
    tx.sql<{ seal_number: string | null }>(SEAL, [kitId]),
  ])
  return { positions, sealNumber: kit?.seal_number ?? null }
}
