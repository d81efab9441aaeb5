import type { BoardAnswer, HorizonStep } from '#shared/contracts/board.ts'
import { sayTally, tallyOf } from '#shared/engine/readiness/board-sentence.ts'
import type { AppContext } from '../../context.ts'
import { readInGroup } from '../../group-read.ts'
import { KEPT_COUNTS, KEPT_NEXT, KEPT_OLDEST, REVISION } from './board-statements.ts'

/** What the board says of the whole group. True for as long as its revision is. */
export interface BoardHead {
  readonly revision: number
  readonly total: number
  readonly answer: Pick<BoardAnswer, 'counts' | 'sentence' | 'revision' | 'oldestVital' | 'nextChange'>
}

const kept = new Map<string, BoardHead>()
const KEPT_GROUPS = 500

/** Read once for each revision of a group: it changes only when the revision does. */
export async function boardHead(ctx: AppContext, groupId: string, revision: number): Promise<BoardHead> {
  const known = kept.get(groupId)
  if (known?.revision === revision) return known
  const head = await readHead(ctx, groupId)
  const [oldest] = kept.keys()
  if (kept.size >= KEPT_GROUPS && oldest !== undefined) kept.delete(oldest)
  kept.set(groupId, head)
  return head
}

async function readHead(ctx: AppContext, groupId: string): Promise<BoardHead> {
  const [[{ revision }], counts, [oldest], [next]] = (await readInGroup(ctx, groupId, [
    { statement: REVISION, values: [groupId, ctx.clock.now()] },
    { statement: KEPT_COUNTS, values: [groupId] },
    { statement: KEPT_OLDEST, values: [groupId] },
    { statement: KEPT_NEXT, values: [groupId] },
  ])) as unknown as [[{ revision: number }], BoardAnswer['counts'], OldestRow[], NextRow[]]
  return {
    revision,
    total: counts.reduce((sum, { n }) => sum + n, 0),
    answer: {
      counts,
      sentence: sayTally(tallyOf(counts), 'now'),
      revision,
      oldestVital: oldestOf(oldest),
      nextChange: nextOf(next),
    },
  }
}

export interface OldestRow {
  kit_id: string
  designation: string
  on: string
}

export function oldestOf(row: OldestRow | undefined): BoardAnswer['oldestVital'] {
  return row ? { kitId: row.kit_id, designation: row.designation, on: row.on } : null
}

interface NextRow {
  kit_id: string
  designation: string
  at: number
  horizon: string
}

function nextOf(row: NextRow | undefined): BoardAnswer['nextChange'] {
  if (!row) return null
  const [first, second] = JSON.parse(row.horizon) as HorizonStep[]
  if (!first || !second) return null
  return {
    kitId: row.kit_id,
    designation: row.designation,
    at: new Date(row.at).toISOString(),
    verdict: second.verdict,
    cause: first.cause,
  }
}
