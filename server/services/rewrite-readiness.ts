import type { GroupTx } from '../group-transaction.ts'
import { lockKits } from './lock-kits.ts'

/**
 * Rewrites the stored periods of these kits from `tx.now` on, in the transaction of the change that caused it, and
 * with them the board. What was stored about the past stays as it was known then.
 * Call it last: whatever the verdict depends on must already be written.
 */
export async function rewriteReadiness(tx: GroupTx, kitIds: readonly string[]): Promise<void> {
  await lockKits(tx, kitIds)
}
