import { READINESS_VERSION } from '#shared/engine/readiness/timeline.ts'
import { systemActor } from '../../caller.ts'
import type { AppContext } from '../../context.ts'
import { inGroup, type Statement } from '../../group-transaction.ts'
import { kitsInUse } from '../kits-in-use.ts'
import { rewriteReadiness } from '../rewrite-readiness.ts'

const JUDGED: Statement = {
  name: 'readiness-judged',
  text: `INSERT INTO readiness_judged (group_id, version) VALUES ($1, $2)
    ON CONFLICT (group_id) DO UPDATE SET version = greatest(readiness_judged.version, excluded.version)`,
}

/** Kits a transaction: nobody who records a test waits longer for one of them. */
const STEP = 25

/**
 * After an upgrade that judges otherwise, the stored periods of every kit are worked out anew from now on; what was
 * known in the past stays. Where it was cut short, the next run begins again and finds less to do.
 */
export async function rejudgeGroups(ctx: AppContext): Promise<void> {
  const rows: { group_id: string }[] = await ctx.db.query('SELECT group_id FROM groups_judged_before($1)', [
    READINESS_VERSION,
  ])
  for (const { group_id: groupId } of rows) await rejudge(ctx, groupId)
}

async function rejudge(ctx: AppContext, groupId: string): Promise<void> {
  const scope = { groupId, actor: systemActor('rejudge-groups') }
  const kitIds = await inGroup(ctx, scope, (tx) => kitsInUse(tx))
  for (let at = 0; at < kitIds.length; at += STEP)
    await inGroup(ctx, scope, (tx) => rewriteReadiness(tx, kitIds.slice(at, at + STEP)))
  await inGroup(ctx, scope, (tx) => tx.sql(JUDGED, [groupId, READINESS_VERSION]))
}
