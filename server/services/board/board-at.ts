import type { BoardAnswer, BoardRow, HorizonStep } from '#shared/contracts/board.ts'
import { sayTally, tallyOf } from '#shared/engine/readiness/board-sentence.ts'
import type { Period } from '#shared/engine/readiness/period-types.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { boardRowOf } from '../board-rows.ts'
import { periodsFrom, type StoredPeriod } from '../period-rows.ts'
import { oldestOf, type OldestRow } from './board-head.ts'
import { decodeKey, encodeKey, filterValues, type BoardQuery } from './board-query.ts'
import { COUNTS_AT, NEXT_AT, OLDEST_AT, PAGE_AT, REVISION, TOTAL_AT } from './board-statements.ts'

interface RowAt {
  [column: string]: unknown
  kit_id: string
  designation: string
  code: string
  kind: string
  station: boolean
  verdict_rank: number
  availability_reason: string
  expected_return_on: string | null
  home: string | null
  place: string | null
}

interface Asked {
  readonly at: Date
  readonly computedFor: BoardAnswer['computedFor']
}

/**
 * The board as the stored periods say it for an instant: what was known then for the past, what holds if nobody does
 * anything for the future. Slower than the kept board, and always right.
 */
export async function boardAt(tx: GroupTx, query: BoardQuery, asked: Asked): Promise<BoardAnswer> {
  const filters = [tx.groupId, ...filterValues(query), asked.at]
  const here = [tx.groupId, asked.at]
  const [rows, [counted], counts, [oldest], [state], nextChange] = await Promise.all([
    tx.sql<RowAt>(PAGE_AT, [...filters, ...pageStart(query), query.size + 1]),
    tx.sql<{ n: number }>(TOTAL_AT, filters),
    tx.sql<BoardAnswer['counts'][number]>(COUNTS_AT, here),
    tx.sql<OldestRow & Record<string, unknown>>(OLDEST_AT, here),
    tx.sql<{ revision: number }>(REVISION, here),
    nextChangeAt(tx, asked.at),
  ])
  const page = rows.slice(0, query.size)
  const periods = await periodsFrom(
    tx,
    page.map((row) => row.kit_id),
    asked.at,
  )
  return {
    rows: page.flatMap((row) => rowAt(row, periods.get(row.kit_id) ?? [], asked)),
    total: counted?.n ?? 0,
    next: rows.length > query.size ? keyOf(page.at(-1)) : null,
    counts,
    sentence: sayTally(tallyOf(counts), asked.computedFor),
    revision: state?.revision ?? 0,
    asOf: asked.at.toISOString(),
    computedFor: asked.computedFor,
    oldestVital: oldestOf(oldest),
    nextChange,
  }
}

function pageStart({ after }: BoardQuery): unknown[] {
  if (after === undefined) return [-1, '', '00000000-0000-0000-0000-000000000000']
  const { rank, sort, kitId } = decodeKey(after, 'string')
  return [rank, sort, kitId]
}

function keyOf(row: RowAt | undefined): string | null {
  if (!row) return null
  return encodeKey({ rank: row.verdict_rank, sort: row.designation.toLowerCase(), kitId: row.kit_id })
}

function rowAt(row: RowAt, [first, ...rest]: readonly StoredPeriod[], { computedFor }: Asked): BoardRow[] {
  if (!first) return []
  const { kit_id: kitId, designation, station } = row
  const computed = boardRowOf({ kitId, designation, station, face: '' }, [first, ...rest])
  return [
    {
      kitId,
      designation,
      kindCode: row.code,
      kindName: row.kind,
      station,
      verdict: computed.verdict,
      availability: computed.availability,
      availabilityReason: row.availability_reason,
      // Not kept with the periods: today's day of return says nothing about the past.
      expectedReturnOn: computedFor === 'past' ? null : row.expected_return_on,
      reasonTop: computed.reasonTop,
      reasonCount: computed.reasonCount,
      holdsUntil: computed.holdsUntil === null ? null : new Date(computed.holdsUntil).toISOString(),
      homePlace: row.home,
      place: row.place,
      bandCodes: computed.bandCodes,
      watts: computed.watts,
      hours: computed.hours,
      horizon: JSON.parse(computed.horizon) as HorizonStep[],
    },
  ]
}

async function nextChangeAt(tx: GroupTx, at: Date): Promise<BoardAnswer['nextChange']> {
  const [found] = await tx.sql<{ kit_id: string; designation: string }>(NEXT_AT, [tx.groupId, at])
  if (!found) return null
  const periods: readonly Period[] = (await periodsFrom(tx, [found.kit_id], at)).get(found.kit_id) ?? []
  const [first, ...rest] = periods
  if (!first) return null
  const row = boardRowOf({ kitId: found.kit_id, designation: found.designation, station: false, face: '' }, [
    first,
    ...rest,
  ])
  const [now, then] = JSON.parse(row.horizon) as HorizonStep[]
  if (!now?.until || !then) return null
  return {
    kitId: found.kit_id,
    designation: found.designation,
    at: now.until,
    verdict: then.verdict,
    cause: now.cause,
  }
}
