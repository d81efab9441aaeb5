import type { GroupTx, Statement } from '../group-transaction.ts'
import { boardRowOf, keptRows, writeBoard, type KeptRow } from './board-rows.ts'
import { lockKits } from './lock-kits.ts'
import { periodsFrom, type StoredPeriod } from './period-rows.ts'

const PAST: Statement = {
  name: 'board-rows-past',
  text: 'SELECT kit_id FROM board_row WHERE group_id = $1 AND valid_until <= $2 ORDER BY kit_id LIMIT $3',
}

/** Kits a step: the locks of one step are held together. */
const STEP = 200

/**
 * Brings the kept rows whose own end has passed up to the period that holds now. Two servers at once do no harm:
 * the second waits for the kits and finds nothing left to do. Computes nothing: the periods are there already.
 */
export async function refreshBoard(tx: GroupTx): Promise<void> {
  for (;;) {
    const past = await tx.sql<{ kit_id: string }>(PAST, [tx.groupId, tx.now, STEP])
    if (past.length === 0) return
    await refresh(
      tx,
      past.map((row) => row.kit_id),
    )
    if (past.length < STEP) return
  }
}

async function refresh(tx: GroupTx, kitIds: readonly string[]): Promise<void> {
  const [, kept, periods] = await Promise.all([
    lockKits(tx, kitIds),
    keptRows(tx, kitIds),
    periodsFrom(tx, kitIds, tx.now),
  ])
  const before = kept.filter((row) => row.validUntil <= tx.now.getTime())
  const rows = before.flatMap((kit) => rowOf(kit, periods.get(kit.kitId) ?? []))
  const removed = before.map((row) => row.kitId).filter((id) => !periods.has(id))
  if (before.length > 0) await writeBoard(tx, { rows, removed, before })
}

function rowOf(kit: KeptRow, [first, ...rest]: readonly StoredPeriod[]) {
  return first ? [boardRowOf(kit, [first, ...rest])] : []
}
