import type { BoardAnswer } from '#shared/contracts/board.ts'
import { sayTally, tallyOf } from '#shared/engine/readiness/board-sentence.ts'
import type { Caller } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { readInGroup } from '../../group-read.ts'
import { inGroup, type Statement } from '../../group-transaction.ts'
import { boardHead } from './board-head.ts'
import { COUNTS_AT, REVISION } from './board-statements.ts'

const IS_DEMO: Statement = { name: 'group-is-demo', text: 'SELECT demo FROM groups WHERE id = $1' }

export interface FirstSentence {
  readonly sentence: BoardAnswer['sentence']
  /** Whether the group holds demonstration data, which every page says. */
  readonly demo: boolean
}

/** What the board of now says of the whole group, without its rows. */
export async function readSentence(
  ctx: AppContext,
  by: Pick<Caller, 'groupId' | 'actor'>,
): Promise<FirstSentence> {
  const { groupId } = by
  const now = ctx.clock.now()
  const [[state], [group]] = (await readInGroup(ctx, groupId, [
    { statement: REVISION, values: [groupId, now] },
    { statement: IS_DEMO, values: [groupId] },
  ])) as unknown as [[{ revision: number; is_past: boolean }], [{ demo: boolean }]]
  if (!state.is_past) {
    const { answer } = await boardHead(ctx, groupId, state.revision)
    return { sentence: answer.sentence, demo: group.demo }
  }
  const counts = await inGroup(ctx, by, (tx) =>
    tx.sql<BoardAnswer['counts'][number]>(COUNTS_AT, [groupId, now]),
  )
  return { sentence: sayTally(tallyOf(counts), 'now'), demo: group.demo }
}
