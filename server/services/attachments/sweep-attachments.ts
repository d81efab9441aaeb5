import { systemActor } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { inGroup, type Statement } from '../../group-transaction.ts'
import { listGroups } from '../list-groups.ts'

const KEPT_MS = 24 * 60 * 60_000

const UNUSED: Statement = {
  name: 'sweep-attachments',
  text: `DELETE FROM attachment a WHERE a.group_id = $1 AND a.uploaded_at < $2
    AND NOT EXISTS (SELECT FROM test_attachment t WHERE t.attachment_id = a.id)`,
}

/** Removes files that no test has named within a day. Safe at any time and twice at once. */
export async function sweepAttachments(ctx: AppContext): Promise<void> {
  const before = new Date(ctx.clock.now().getTime() - KEPT_MS)
  for (const { id: groupId } of await listGroups(ctx))
    await inGroup(ctx, { groupId, actor: systemActor('sweep-attachments') }, (tx) =>
      tx.sql(UNUSED, [groupId, before]),
    )
}
