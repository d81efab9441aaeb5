import type { NeedAnswer } from '#shared/contracts/board-need.ts'
import type { Caller } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { inGroup } from '../../group-transaction.ts'
import { needAnswerAt, type NeedQuery } from './answer-need.ts'
import { keptRevision } from './kept-board.ts'

export type NeedReply =
  | { readonly kind: 'unchanged'; readonly etag: string }
  | { readonly kind: 'answer'; readonly answer: NeedAnswer; readonly etag: string | null }

interface Asked {
  readonly query: NeedQuery
  /** The ETag that the caller has. */
  readonly known: string | undefined
}

/** The answer to a need. That of now holds for as long as the board's revision does. */
export async function readNeed(
  ctx: AppContext,
  by: Pick<Caller, 'groupId' | 'actor'>,
  { query, known }: Asked,
): Promise<NeedReply> {
  const now = ctx.clock.now()
  const at = query.asOf === undefined ? now : new Date(query.asOf)
  if (at.getTime() !== now.getTime()) {
    const computedFor = at < now ? 'past' : 'future'
    const answer = await inGroup(ctx, by, (tx) => needAnswerAt(tx, query, { at, computedFor }))
    return { kind: 'answer', answer, etag: null }
  }
  // Read first: where the board changes in between, the answer is newer than its tag and is asked for once more.
  const revision = await keptRevision(ctx, by.groupId)
  const etag = revision === null ? null : `"need-${by.groupId}-${revision}"`
  if (etag !== null && known === etag) return { kind: 'unchanged', etag }
  const answer = await inGroup(ctx, by, (tx) => needAnswerAt(tx, query, { at, computedFor: 'now' }))
  return { kind: 'answer', answer, etag }
}
