import type { z } from 'zod'
import type { readItemChecks as contract } from '#shared/contracts/item-checks.ts'
import { checksAt, checksOfItem } from '#shared/engine/readiness/checks.ts'
import { dossierOf, momentOf } from '#shared/engine/readiness/moment.ts'
import type { CheckState } from '#shared/engine/readiness/period-types.ts'
import { AppError } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { loadKitStates } from '../load-kit-states.ts'
import { loadSpares } from './spare-states.ts'

const WHERE_IS: Statement = {
  name: 'item-for-checks',
  text: 'SELECT kit_id, retired_at IS NOT NULL AS retired FROM item WHERE group_id = $1 AND id = $2',
}

/** How each check of one item stands: judged as part of its kit, or as a spare that promises nothing. */
export async function readItemChecks(
  tx: GroupTx,
  itemId: string,
): Promise<z.input<typeof contract.response>> {
  const [item] = await tx.sql<{ kit_id: string | null; retired: boolean }>(WHERE_IS, [tx.groupId, itemId])
  if (!item) throw new AppError('not-found', 'There is no such item in your group.')
  if (item.retired) return { checks: [] }
  return { checks: await (item.kit_id === null ? ofSpare(tx, itemId) : inKit(tx, item.kit_id, itemId)) }
}

async function inKit(tx: GroupTx, kitId: string, itemId: string): Promise<CheckState[]> {
  const [kit] = await loadKitStates(tx, [kitId])
  return kit ? checksAt(kit.state, tx.now.getTime()).filter(({ subjectId }) => subjectId === itemId) : []
}

async function ofSpare(tx: GroupTx, itemId: string): Promise<CheckState[]> {
  const [spare] = await loadSpares(tx, itemId)
  if (!spare) return []
  const moment = momentOf(dossierOf(spare.state), tx.now.getTime())
  return spare.state.items.flatMap((item) => checksOfItem(moment, item, { vital: false, bands: [] }))
}
