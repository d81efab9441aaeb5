import type { RadioCheckInputs } from '#shared/engine/procedures/radio-check.ts'
import type { KitPromise, TestFinding } from '#shared/engine/readiness/types.ts'
import type {
  Availability,
  Band,
  Category,
  Condition,
  FindingWord,
  Procedure,
  Verdict,
} from '#shared/engine/vocabulary.ts'
import type { Statement } from '../group-transaction.ts'

/** The statements that read what readiness depends on, for many kits at once ($1), with their rows. */

export interface KitRow {
  [column: string]: unknown
  id: string
  designation: string
  availability: Availability
  availability_reason: string
  seal_matches: boolean
  place_id: string | null
  kit_kind_id: string
  retired: boolean
  promise: KitPromise
  station: boolean
  /** Changes with what the board shows of the kit besides its readiness. */
  face: string
}

export const KITS: Statement = {
  name: 'state-kits',
  text: `SELECT k.id, k.designation, k.availability, k.availability_reason, k.seal_matches, k.place_id, k.kit_kind_id,
      k.retired_at IS NOT NULL AS retired, kk.promise, kk.station,
      md5(jsonb_build_array(k.designation, kk.station, kk.code, kk.name, home.name, place.name, k.availability_reason,
        k.expected_return_on)::text) AS face
    FROM kit k JOIN kit_kind kk ON kk.id = k.kit_kind_id
    LEFT JOIN place home ON home.id = k.home_place_id LEFT JOIN place ON place.id = k.place_id
    WHERE k.id = ANY($1::uuid[]) ORDER BY k.id`,
}

export interface PositionRow {
  [column: string]: unknown
  id: string
  kit_kind_id: string
  name: string
  category: Category
  quantity: number
  vital: boolean
}

export const POSITIONS: Statement = {
  name: 'state-positions',
  text: `SELECT id, kit_kind_id, name, category, quantity, vital FROM position
    WHERE kit_kind_id IN (SELECT kit_kind_id FROM kit WHERE id = ANY($1::uuid[])) AND removed_at IS NULL
    ORDER BY ordinal, id`,
}

export interface ItemRow {
  [column: string]: unknown
  id: string
  designation: string
  category: Category
  kit_id: string | null
  position_id: string | null
  condition: Condition
  condition_reason: string
  details: Record<string, unknown>
  acquired_on: string | null
}

export const ITEM_COLUMNS = `id, designation, category, kit_id, position_id, condition, condition_reason, details,
  acquired_on::text`

export const ITEMS: Statement = {
  name: 'state-items',
  text: `SELECT ${ITEM_COLUMNS} FROM item WHERE kit_id = ANY($1::uuid[]) ORDER BY designation, id`,
}

export interface EvidenceRow {
  [column: string]: unknown
  for_kit: string
  id: string
  procedure: Procedure
  subject_id: string
  performed_at: Date
  performed_on: string
  recorded_at: Date
  instrument_id: string | null
  finding: FindingWord
  findings: readonly TestFinding[]
  /** Of a radio check: the currents it read stand in them. */
  radio_inputs: RadioCheckInputs | null
}

export const EVIDENCE_COLUMNS = `t.id, t.procedure, coalesce(t.item_id, t.kit_id) AS subject_id, t.performed_at,
  t.performed_on::text, t.recorded_at, t.instrument_id, t.finding, t.findings,
  CASE WHEN t.procedure = 'radio-check' THEN t.inputs END AS radio_inputs`

/**
 * Tests that were not corrected since: of the kits, of their items, and the calibrations and session checks of the
 * instruments used.
 */
export const EVIDENCE: Statement = {
  name: 'state-evidence',
  text: `WITH own AS (
      SELECT i.kit_id AS for_kit, t.id FROM item i JOIN test t ON t.item_id = i.id WHERE i.kit_id = ANY($1::uuid[])
      UNION ALL SELECT t.kit_id, t.id FROM test t WHERE t.kit_id = ANY($1::uuid[])
    ), calibrations AS (
      SELECT DISTINCT own.for_kit, c.id FROM own JOIN test t ON t.id = own.id
      JOIN test c ON c.item_id = t.instrument_id AND c.procedure IN ('calibration', 'session-check')
    )
    SELECT e.for_kit, ${EVIDENCE_COLUMNS}
    FROM (SELECT for_kit, id FROM own UNION SELECT for_kit, id FROM calibrations) e JOIN test t ON t.id = e.id
    WHERE NOT EXISTS (SELECT FROM test s WHERE s.supersedes_id = t.id)
    ORDER BY t.performed_at, t.id`,
}

export interface InstrumentRow {
  [column: string]: unknown
  for_kit: string
  id: string
  designation: string
  category: Category
}

// Materialized: before a fresh database has statistics, the planner would begin with every item of the group.
export const INSTRUMENTS: Statement = {
  name: 'state-instruments',
  text: `WITH items AS MATERIALIZED (SELECT id, kit_id FROM item WHERE kit_id = ANY($1::uuid[])),
    used AS MATERIALIZED (
      SELECT i.kit_id AS for_kit, t.instrument_id FROM items i JOIN test t ON t.item_id = i.id
        WHERE t.instrument_id IS NOT NULL
      UNION SELECT t.kit_id, t.instrument_id FROM test t
        WHERE t.kit_id = ANY($1::uuid[]) AND t.instrument_id IS NOT NULL
    )
    SELECT u.for_kit, n.id, n.designation, n.category FROM used u JOIN item n ON n.id = u.instrument_id
    ORDER BY n.designation, n.id`,
}

export interface RaisedCheckRow {
  [column: string]: unknown
  for_kit: string
  id: string
  subject_id: string
  procedure: Procedure
  band: Band | null
  reason: string
  doubts_earlier: boolean
  raised_at: Date
  due_on: string
}

export const RAISED_COLUMNS = `r.id, coalesce(r.item_id, r.kit_id) AS subject_id, r.procedure, r.band, r.reason,
  r.doubts_earlier, r.raised_at, r.due_on::text`

export const RAISED_CHECKS: Statement = {
  name: 'state-raised-checks',
  text: `SELECT i.kit_id AS for_kit, ${RAISED_COLUMNS} FROM item i JOIN raised_check r ON r.item_id = i.id
      WHERE i.kit_id = ANY($1::uuid[]) AND r.withdrawn_at IS NULL
    UNION ALL SELECT r.kit_id, ${RAISED_COLUMNS} FROM raised_check r
      WHERE r.kit_id = ANY($1::uuid[]) AND r.withdrawn_at IS NULL
    ORDER BY raised_at, id`,
}

export interface DecisionRow {
  [column: string]: unknown
  id: string
  kit_id: string
  kind: 'lowered' | 'risk-accepted'
  to_verdict: Verdict | null
  reason: string
  by: string
  from_at: Date
  until_at: Date | null
}

export const DECISIONS: Statement = {
  name: 'state-decisions',
  text: `SELECT d.id, d.kit_id, d.kind, d.to_verdict, d.reason, m.name AS by, d.from_at, d.until_at
    FROM verdict_decision d JOIN member m ON m.id = d.decided_by
    WHERE d.kit_id = ANY($1::uuid[]) AND d.withdrawn_at IS NULL ORDER BY d.from_at, d.id`,
}
