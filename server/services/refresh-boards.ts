import { systemActor } from '../caller.ts'
import type { AppContext } from '../context.ts'
import { inGroup } from '../group-transaction.ts'
import { refreshBoard } from './refresh-board.ts'

/** Brings the kept board rows whose own end has passed up to the period that holds now, group by group. */
export async function refreshAllBoards(ctx: AppContext): Promise<void> {
  const rows: { group_id: string }[] = await ctx.db.query(
    'SELECT group_id FROM groups_with_board_rows_past($1)',
    [ctx.clock.now()],
  )
  for (const { group_id: groupId } of rows) {
    await inGroup(ctx, { groupId, actor: systemActor('refresh-boards') }, refreshBoard)
  }
}
