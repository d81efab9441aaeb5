import type { TestSummary } from '#shared/contracts/test-shapes.ts'
import type { TestFinding } from '#shared/engine/readiness/types.ts'
import type { Category, FindingWord, Procedure } from '#shared/engine/vocabulary.ts'

/** The columns and joins that a test is shown with, for statements that add their own conditions. */

export const SUMMARY_COLUMNS = `t.id, t.procedure, t.item_id, t.kit_id, i.designation AS item_designation, i.category,
  k.designation AS kit_designation, t.performed_at, t.performed_on::text, t.recorded_at, t.method,
  n.id AS instrument_id, n.designation AS instrument_designation, n.category AS instrument_category,
  o.name AS operator_name, t.finding, t.findings, s.id AS superseded_by_id`

export const SUMMARY_JOINS = `LEFT JOIN item i ON i.id = t.item_id
  LEFT JOIN kit k ON k.id = t.kit_id
  LEFT JOIN item n ON n.id = t.instrument_id
  LEFT JOIN member o ON o.id = t.operator_id
  LEFT JOIN test s ON s.supersedes_id = t.id`

export interface SummaryRow {
  [column: string]: unknown
  id: string
  procedure: Procedure
  item_id: string | null
  kit_id: string | null
  item_designation: string | null
  category: Category | null
  kit_designation: string | null
  performed_at: Date
  performed_on: string
  recorded_at: Date
  method: string
  instrument_id: string | null
  instrument_designation: string | null
  instrument_category: Category | null
  operator_name: string
  finding: FindingWord
  findings: TestFinding[]
  superseded_by_id: string | null
}

export function summaryOf(row: SummaryRow): TestSummary {
  return {
    id: row.id,
    procedure: row.procedure,
    subject: {
      type: row.item_id === null ? 'kit' : 'item',
      id: row.item_id ?? row.kit_id ?? '',
      designation: row.item_designation ?? row.kit_designation ?? '',
      category: row.category,
    },
    performedAt: row.performed_at.toISOString(),
    performedOn: row.performed_on,
    recordedAt: row.recorded_at.toISOString(),
    method: row.method,
    instrument: instrumentOf(row),
    operatorName: row.operator_name,
    finding: row.finding,
    findings: row.findings,
    supersededById: row.superseded_by_id,
  }
}

export function instrumentOf(row: SummaryRow): TestSummary['instrument'] {
  const { instrument_id: id, instrument_designation: designation, instrument_category: category } = row
  return id === null || designation === null || category === null ? null : { id, designation, category }
}
