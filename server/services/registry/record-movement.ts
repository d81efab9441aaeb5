import { v7 as uuidv7 } from 'uuid'
import type { Item } from '../../entities/Item.ts'
import { Movement } from '../../entities/Movement.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { namingDuplicates } from './duplicates.ts'
import { NOWHERE, type Location } from './location.ts'

interface Move {
  readonly id: string
  readonly item: Item
  readonly to: Location
  readonly reason: string
}

/** Adds the row that says where an item went. `id-taken` when another movement has that id. */
export async function recordMovement(tx: GroupTx, { id, item, to, reason }: Move): Promise<void> {
  const row = {
    id,
    itemId: item.id,
    fromKitId: item.kitId,
    fromPositionId: item.positionId,
    fromPlaceId: item.placeId,
    toKitId: to.kitId,
    toPositionId: to.positionId,
    toPlaceId: to.placeId,
    movedAt: tx.now,
    reason,
    movedBy: tx.actor.memberId,
  }
  await namingDuplicates(() => tx.repository(Movement).insert(row))
}

/** An item that is retired leaves where it was. */
export async function recordLeaving(tx: GroupTx, item: Item): Promise<void> {
  if (item.kitId === null && item.placeId === null) return
  await recordMovement(tx, { id: uuidv7(), item, to: NOWHERE, reason: 'Retired' })
}
