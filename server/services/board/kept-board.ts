import type { AppContext } from '../../context.ts'
import { readInGroup, type Question } from '../../group-read.ts'
import { boardHead, type BoardHead } from './board-head.ts'
import { decodeKey, encodeKey, filterValues, isFiltered, type BoardQuery } from './board-query.ts'
import { KEPT_PAGE, KEPT_PAGE_FILTERED, KEPT_TOTAL, REVISION, type KeptBoardRow } from './board-statements.ts'

/** The board of now as bytes, from the kept rows; null when one of them is past its own end. */
export async function readKeptBoard(
  ctx: AppContext,
  groupId: string,
  query: BoardQuery,
): Promise<{ bytes: Buffer; revision: number } | null> {
  const now = ctx.clock.now()
  const filtered = isFiltered(query)
  const [[state], rows, counted] = (await readInGroup(ctx, groupId, [
    { statement: REVISION, values: [groupId, now] },
    pageQuestion(groupId, query, filtered),
    ...(filtered ? [{ statement: KEPT_TOTAL, values: [groupId, ...filterValues(query)] }] : []),
  ])) as unknown as [[{ revision: number; is_past: boolean }], KeptBoardRow[], [{ n: number }] | undefined]
  if (state.is_past) return null
  const head = await boardHead(ctx, groupId, state.revision)
  const bytes = answerBytes({ head, rows, query, total: counted?.[0].n ?? head.total, now })
  return { bytes, revision: state.revision }
}

/** The revision that the board of now stands at, or null when a kept row is past its own end. */
export async function keptRevision(ctx: AppContext, groupId: string): Promise<number | null> {
  const values = [groupId, ctx.clock.now()]
  const [[state]] = (await readInGroup(ctx, groupId, [{ statement: REVISION, values }])) as unknown as [
    [{ revision: number; is_past: boolean }],
  ]
  return state.is_past ? null : state.revision
}

function pageQuestion(groupId: string, query: BoardQuery, filtered: boolean): Question {
  const key = query.after === undefined ? undefined : decodeKey(query.after, 'number')
  const from = key ? [key.rank, timeOf(key.sort as number), key.kitId] : [-1, '-infinity', NO_KIT]
  // One row more than the page shows whether there is another page.
  const page = [...from, query.size + 1]
  return filtered
    ? { statement: KEPT_PAGE_FILTERED, values: [groupId, ...filterValues(query), ...page] }
    : { statement: KEPT_PAGE, values: [groupId, ...page] }
}

const NO_KIT = '00000000-0000-0000-0000-000000000000'
const timeOf = (ms: number) => (ms === Infinity ? 'infinity' : new Date(ms))

interface Answer {
  readonly head: BoardHead
  readonly rows: readonly KeptBoardRow[]
  readonly query: BoardQuery
  readonly total: number
  readonly now: Date
}

/** Written by hand: the horizon of each row is JSON already, and parsing it to write it again would cost the most. */
function answerBytes({ head, rows, query, total, now }: Answer): Buffer {
  const page = rows.slice(0, query.size)
  const last = rows.length > query.size ? page.at(-1) : undefined
  const next = last
    ? encodeKey({ rank: last.verdict_rank, sort: last.holds_until, kitId: last.kit_id })
    : null
  const rest = JSON.stringify({ total, next, ...head.answer, asOf: now.toISOString(), computedFor: 'now' })
  return Buffer.from(`{"rows":[${page.map(rowJson).join(',')}],${rest.slice(1)}`)
}

function rowJson(row: KeptBoardRow): string {
  const fields = JSON.stringify({
    kitId: row.kit_id,
    designation: row.designation,
    kindCode: row.code,
    kindName: row.kind,
    station: row.station,
    verdict: row.verdict,
    availability: row.availability,
    availabilityReason: row.availability_reason,
    expectedReturnOn: row.expected_return_on,
    reasonTop: row.reason_top,
    reasonCount: row.reason_n,
    holdsUntil: row.holds_until === Infinity ? null : new Date(row.holds_until).toISOString(),
    homePlace: row.home,
    place: row.place,
    bandCodes: row.band_codes,
    watts: row.watts,
    hours: row.hours,
  })
  return `${fields.slice(0, -1)},"horizon":${row.horizon}}`
}
