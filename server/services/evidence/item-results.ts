import type { z } from 'zod'
import {
  MOST_RESULTS,
  type ItemResult,
  type readItemResults as contract,
} from '#shared/contracts/item-results.ts'
import { sideFigures } from '#shared/engine/procedures/figures.ts'
import { notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { instrumentOf, SUMMARY_COLUMNS, SUMMARY_JOINS, type SummaryRow } from './test-rows.ts'

interface ResultRow extends SummaryRow {
  inputs: unknown
  results: unknown
  limits: Record<string, unknown> | null
  interval_months: number | null
  superseded_reason: string | null
  found: number
}

const RESULTS: Statement = {
  name: 'item-results',
  text: `SELECT ${SUMMARY_COLUMNS}, t.inputs, t.results, r.limits, r.interval_months,
      s.supersedes_reason AS superseded_reason, count(*) OVER ()::int AS found
    FROM test t ${SUMMARY_JOINS} LEFT JOIN rule r ON r.id = t.rule_id
    WHERE t.group_id = $1 AND t.item_id = $2 AND ($3::text[] IS NULL OR t.procedure = ANY($3))
    ORDER BY t.performed_at DESC, t.id DESC LIMIT $4`,
}
const ITEM: Statement = { name: 'item-for-results', text: 'SELECT FROM item WHERE group_id = $1 AND id = $2' }

interface Asked {
  readonly itemId: string
  readonly procedures: readonly string[] | undefined
}

/** The newest tests of an item, oldest of them first, with what makes sense of their trend. */
export async function readItemResults(
  tx: GroupTx,
  { itemId, procedures }: Asked,
): Promise<z.input<typeof contract.response>> {
  const [items, rows] = await Promise.all([
    tx.sql(ITEM, [tx.groupId, itemId]),
    tx.sql<ResultRow>(RESULTS, [tx.groupId, itemId, procedures ?? null, MOST_RESULTS]),
  ])
  if (items.length === 0) throw notFound('item')
  return { results: rows.map(resultOf).reverse(), older: (rows[0]?.found ?? 0) - rows.length }
}

function resultOf(row: ResultRow): ItemResult {
  const { superseded_by_id: supersededById, superseded_reason: reason } = row
  return {
    testId: row.id,
    procedure: row.procedure,
    performedAt: row.performed_at.toISOString(),
    performedOn: row.performed_on,
    finding: row.finding,
    findings: row.findings,
    figures: sideFigures(row),
    setsBaseline: (row.inputs as { setsBaseline?: boolean }).setsBaseline === true,
    instrument: instrumentOf(row),
    limits: row.limits,
    intervalMonths: row.interval_months,
    supersededBy: supersededById === null ? null : { testId: supersededById, reason: reason ?? '' },
  }
}
