import type { z } from 'zod'
import type { listTests } from '#shared/contracts/read-tests.ts'
import type { TestSummary } from '#shared/contracts/test-shapes.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { summaryOf, SUMMARY_COLUMNS, SUMMARY_JOINS, type SummaryRow } from './test-rows.ts'

type Query = z.output<typeof listTests.query>

// One statement for every filter: an absent one is null and matches all.
const MATCH = `FROM test t ${SUMMARY_JOINS}
  WHERE t.group_id = $1
    AND ($2::uuid IS NULL OR t.item_id = $2)
    AND ($3::uuid IS NULL OR t.kit_id = $3 OR i.kit_id = $3)
    AND ($4::uuid IS NULL OR t.instrument_id = $4)
    AND ($5::text[] IS NULL OR t.procedure = ANY($5))
    AND ($6::text[] IS NULL OR t.finding = ANY($6))
    AND ($7 OR s.id IS NULL)
    AND ($8 = '' OR concat_ws(' ', i.designation, k.designation, t.method, o.name, t.notes) ILIKE $8)`

const page = (direction: 'ASC' | 'DESC'): Statement => ({
  name: `list-tests-${direction.toLowerCase()}`,
  text: `SELECT ${SUMMARY_COLUMNS} ${MATCH} ORDER BY t.performed_at ${direction}, t.id ${direction} LIMIT $9 OFFSET $10`,
})
const NEWEST_FIRST = page('DESC')
const OLDEST_FIRST = page('ASC')
const COUNT: Statement = { name: 'count-tests', text: `SELECT count(*)::int AS n ${MATCH}` }

export async function listTestsOf(
  tx: GroupTx,
  query: Query,
): Promise<{ rows: TestSummary[]; total: number }> {
  const filters = [
    tx.groupId,
    query.itemId ?? null,
    query.kitId ?? null,
    query.instrumentId ?? null,
    query.procedure ?? null,
    query.finding ?? null,
    query.superseded,
    searchPattern(query.search),
  ]
  const paging = [query.size, (query.page - 1) * query.size]
  const [rows, [counted]] = await Promise.all([
    tx.sql<SummaryRow>(query.descending ? NEWEST_FIRST : OLDEST_FIRST, [...filters, ...paging]),
    tx.sql<{ n: number }>(COUNT, filters),
  ])
  return { rows: rows.map(summaryOf), total: counted?.n ?? 0 }
}

/** A pattern for ILIKE that finds the words as they are; empty finds all. */
export function searchPattern(search: string): string {
  return search === '' ? '' : `%${search.replace(/[\\%_]/g, '\\$&')}%`
}
