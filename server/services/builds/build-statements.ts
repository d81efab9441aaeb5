/** The statements that read all units of some build sheets ($2) of a group ($1), with their rows. */
import type { Category, Condition } from '#shared/engine/vocabulary.ts'
import type { Statement } from '../../group-transaction.ts'
import {
  EVIDENCE_COLUMNS,
  RAISED_COLUMNS,
  type EvidenceRow,
  type RaisedCheckRow,
} from '../kit-state-statements.ts'

/** A batch names its sheet; a unit without a batch names its own. */
const OF_SHEETS = `item i LEFT JOIN batch b ON b.id = i.batch_id
  WHERE i.group_id = $1 AND coalesce(b.build_sheet_id, i.build_sheet_id) = ANY($2::uuid[])`

export interface UnitRow {
  [column: string]: unknown
  id: string
  sheet_id: string
  designation: string
  category: Category
  condition: Condition
  is_retired: boolean
  bands: unknown
  batch_id: string | null
  batch_name: string | null
  kit_id: string | null
  kit_designation: string | null
  place_name: string | null
}

export const UNITS: Statement = {
  name: 'units-of-build-sheets',
  text: `SELECT i.id, coalesce(b.build_sheet_id, i.build_sheet_id) AS sheet_id, i.designation, i.category, i.condition,
      i.retired_at IS NOT NULL AS is_retired, i.details -> 'bands' AS bands, b.id AS batch_id, b.name AS batch_name,
      i.kit_id, (SELECT k.designation FROM kit k WHERE k.id = i.kit_id) AS kit_designation,
      (SELECT p.name FROM place p LEFT JOIN kit k ON k.id = i.kit_id WHERE p.id = coalesce(i.place_id, k.place_id))
        AS place_name
    FROM ${OF_SHEETS} ORDER BY i.designation, i.id`,
}

export interface TestRow extends EvidenceRow {
  instrument_designation: string | null
  instrument_category: Category | null
  rise_k: number | null
  keyed_minutes: number | null
}

/** What was measured of the units and not corrected since, and the calibrations of the instruments that did it. */
export const TESTS: Statement = {
  name: 'tests-of-build-sheets',
  text: `WITH own AS MATERIALIZED (
      SELECT t.id, t.instrument_id FROM test t WHERE t.item_id IN (SELECT i.id FROM ${OF_SHEETS})
        AND t.procedure IN ('heat-test', 'pair-loss', 'open-short-load', 'antenna-sweep')
    ), wanted AS (
      SELECT id FROM own UNION
      SELECT c.id FROM test c WHERE c.procedure IN ('calibration', 'session-check') AND c.item_id IN (SELECT instrument_id FROM own)
    )
    SELECT NULL AS for_kit, ${EVIDENCE_COLUMNS}, n.designation AS instrument_designation,
      n.category AS instrument_category, (t.results ->> 'riseK')::float8 AS rise_k,
      (t.results ->> 'keyedMinutes')::float8 AS keyed_minutes
    FROM wanted w JOIN test t ON t.id = w.id LEFT JOIN item n ON n.id = t.instrument_id
    WHERE NOT EXISTS (SELECT FROM test s WHERE s.supersedes_id = t.id) ORDER BY t.performed_at, t.id`,
}

export interface CheckRow extends RaisedCheckRow {
  cause: string
  raised_by: string | null
  withdrawn_at: Date | null
}

export const CHECKS: Statement = {
  name: 'checks-of-build-sheets',
  text: `SELECT NULL AS for_kit, ${RAISED_COLUMNS}, r.cause, m.name AS raised_by, r.withdrawn_at
    FROM raised_check r LEFT JOIN member m ON m.id = r.raised_by
    WHERE r.item_id IN (SELECT i.id FROM ${OF_SHEETS}) ORDER BY r.raised_at, r.item_id, r.id`,
}
