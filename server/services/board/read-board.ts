import type { Caller } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { inGroup } from '../../group-transaction.ts'
import { boardAt } from './board-at.ts'
import type { BoardQuery } from './board-query.ts'
import { keptRevision, readKeptBoard } from './kept-board.ts'

type By = Pick<Caller, 'groupId' | 'actor'>

export type BoardBytes =
  | { readonly kind: 'unchanged'; readonly etag: string }
  | { readonly kind: 'board'; readonly bytes: Buffer; readonly etag: string | null }

/**
 * The board of now, or as of another instant. The kept rows answer for now; where one of them is past its own end, the
 * stored periods do until the rows are refreshed. `known` is the ETag that the caller has.
 */
export async function readBoard(
  ctx: AppContext,
  by: By,
  { query, known }: { query: BoardQuery; known: string | undefined },
): Promise<BoardBytes> {
  const now = ctx.clock.now()
  const at = query.asOf === undefined ? now : new Date(query.asOf)
  if (query.asOf !== undefined && at.getTime() !== now.getTime()) {
    return periodsBoard(ctx, by, query, { at, computedFor: at < now ? 'past' : 'future' })
  }
  if (known !== undefined) {
    const revision = await keptRevision(ctx, by.groupId)
    if (revision !== null && known === etagOf(by, revision)) return { kind: 'unchanged', etag: known }
  }
  const kept = await readKeptBoard(ctx, by.groupId, query)
  if (kept) return { kind: 'board', bytes: kept.bytes, etag: etagOf(by, kept.revision) }
  return periodsBoard(ctx, by, query, { at, computedFor: 'now' })
}

// The group is part of it: two members who share a browser must not see each other's board.
const etagOf = (by: By, revision: number) => `"${by.groupId}-${revision}"`

async function periodsBoard(
  ctx: AppContext,
  by: By,
  query: BoardQuery,
  asked: Parameters<typeof boardAt>[2],
): Promise<BoardBytes> {
  const answer = await inGroup(ctx, by, (tx) => boardAt(tx, query, asked))
  return { kind: 'board', bytes: Buffer.from(JSON.stringify(answer)), etag: null }
}
