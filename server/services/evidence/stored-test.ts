import type { StoredTest, TestEffect } from '#shared/contracts/test-shapes.ts'
import type { BandRegion } from '#shared/engine/band-edges.ts'
import { DEFAULT_REGION } from '#shared/engine/procedures/judged-bands.ts'
import { notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { filesOfTest } from './named-files.ts'
import { proposedRecalls } from './proposed-recalls.ts'
import { summaryOf, SUMMARY_COLUMNS, SUMMARY_JOINS, type SummaryRow } from './test-rows.ts'

interface TestRow extends SummaryRow {
  instrument_note: string
  operator_id: string
  recorded_by: string
  recorder_name: string
  claimed_at: Date | null
  inputs: Record<string, unknown>
  results: Record<string, unknown>
  policy_id: string
  policy_number: number
  policy_name: string
  band_region: BandRegion | null
  rule_id: string | null
  rule_limits: Record<string, unknown>
  rule_interval_months: number | null
  rule_vital: boolean
  rule_reason: string
  rule_source: string
  engine_version: string
  notes: string
  supersedes_id: string | null
  supersedes_reason: string | null
  superseded_reason: string | null
}

const TEST: Statement = {
  name: 'stored-test',
  text: `SELECT ${SUMMARY_COLUMNS}, t.instrument_note, t.operator_id, t.recorded_by, m.name AS recorder_name,
      t.claimed_at, t.inputs, t.results, t.policy_id, p.number AS policy_number, p.name AS policy_name,
      p.settings ->> 'bandRegion' AS band_region, t.rule_id,
      r.limits AS rule_limits, r.interval_months AS rule_interval_months, r.vital AS rule_vital,
      r.reason AS rule_reason, r.source AS rule_source, t.engine_version, t.notes, t.supersedes_id,
      t.supersedes_reason, s.supersedes_reason AS superseded_reason
    FROM test t ${SUMMARY_JOINS}
    JOIN member m ON m.id = t.recorded_by JOIN policy p ON p.id = t.policy_id LEFT JOIN rule r ON r.id = t.rule_id
    WHERE t.group_id = $1 AND t.id = $2`,
}
const EFFECTS: Statement = {
  name: 'stored-test-effects',
  text: `SELECT e.kit_id AS "kitId", k.designation, e.verdict_before AS before, e.verdict_after AS after, e.sentences
    FROM test_effect e JOIN kit k ON k.id = e.kit_id WHERE e.group_id = $1 AND e.test_id = $2
    ORDER BY k.designation`,
}
const HASH: Statement = {
  name: 'stored-test-hash',
  text: 'SELECT content_hash FROM test WHERE group_id = $1 AND id = $2',
}

/** The hash of what was sent under this id, or null when the id is free in the group. */
export async function storedHash(tx: GroupTx, testId: string): Promise<Buffer | null> {
  const [row] = await tx.sql<{ content_hash: Buffer }>(HASH, [tx.groupId, testId])
  return row?.content_hash ?? null
}

/** A test as it is answered; 404 when it is not in the group. */
export async function readStoredTest(tx: GroupTx, testId: string): Promise<StoredTest> {
  const [[row], effects, attachments, recalls] = await Promise.all([
    tx.sql<TestRow>(TEST, [tx.groupId, testId]),
    tx.sql<TestEffect & Record<string, unknown>>(EFFECTS, [tx.groupId, testId]),
    filesOfTest(tx, testId),
    proposedRecalls(tx, testId),
  ])
  if (!row) throw notFound('test')
  return {
    ...summaryOf(row),
    instrumentNote: row.instrument_note,
    operator: { id: row.operator_id, name: row.operator_name },
    recordedBy: { id: row.recorded_by, name: row.recorder_name },
    claimedAt: row.claimed_at?.toISOString() ?? null,
    claimedAhead: isFarAhead(row),
    inputs: row.inputs,
    results: row.results,
    judgedBy: judgedByOf(row),
    engineVersion: row.engine_version,
    notes: row.notes,
    supersedes: linkOf(row.supersedes_id, row.supersedes_reason),
    supersededBy: linkOf(row.superseded_by_id, row.superseded_reason),
    attachments,
    effects,
    proposedRecalls: recalls,
  }
}

function judgedByOf(row: TestRow): StoredTest['judgedBy'] {
  return {
    policyId: row.policy_id,
    policyNumber: row.policy_number,
    policyName: row.policy_name,
    bandRegion: row.band_region ?? DEFAULT_REGION,
    rule:
      row.rule_id === null
        ? null
        : {
            id: row.rule_id,
            limits: row.rule_limits,
            intervalMonths: row.rule_interval_months,
            vital: row.rule_vital,
            reason: row.rule_reason,
            source: row.rule_source,
          },
  }
}

/** A device's clock may run ahead by this much before its claim is marked (promise P7). */
const AHEAD_MS = 5 * 60_000

const isFarAhead = ({ claimed_at: claimedAt, recorded_at: recordedAt }: TestRow) =>
  claimedAt !== null && claimedAt.getTime() > recordedAt.getTime() + AHEAD_MS

const linkOf = (testId: string | null, reason: string | null) =>
  testId === null ? null : { testId, reason: reason ?? '' }
