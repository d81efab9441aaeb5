import type { z } from 'zod'
import type { moveItem as contract } from '#shared/contracts/movements.ts'
import type { AppContext } from '../../context.ts'
import { Item } from '../../entities/Item.ts'
import { Movement } from '../../entities/Movement.ts'
import { AppError, notFound } from '../../errors.ts'
import { inGroup, type GroupTx } from '../../group-transaction.ts'
import { lockKits } from '../lock-kits.ts'
import { rewriteReadiness } from '../rewrite-readiness.ts'
import { auditMove } from './audit-move.ts'
import { checkDestination } from './check-destination.ts'
import { idTaken } from './duplicates.ts'
import { locationOf, sameLocation, type Location } from './location.ts'
import { lockRow, refuseRetired } from './locks.ts'
import { readItem } from './read-item.ts'
import { readMovement } from './read-movements.ts'
import { recordMovement } from './record-movement.ts'
import type { By } from './thing.ts'

type Request = z.output<typeof contract.body> & { readonly itemId: string }
type Answer = z.input<typeof contract.response>

/**
 * Moves an item into a position of a kit or to a place. Both kits are locked in the order of their ids, so that of two
 * people who fill the same position, or move the same item, one is told. The same move sent again is the same success.
 */
export function moveItem(ctx: AppContext, by: By, request: Request): Promise<Answer> {
  return inGroup(ctx, by, async (tx) => {
    const [from, to] = [locationOf(request.from), locationOf(request.to)]
    const kitIds = [from.kitId, to.kitId].filter((id) => id !== null)
    await lockKits(tx, kitIds)
    const item = await lockRow(tx, Item, request.itemId)
    if (!item) throw notFound('item')
    const known = await tx.repository(Movement).findOneBy({ id: request.moveId })
    if (known) requireSameMove(known, item, { to, reason: request.reason })
    else {
      await move(tx, item, { id: request.moveId, from, to, reason: request.reason })
      await rewriteReadiness(tx, kitIds)
    }
    return { movement: (await readMovement(tx, request.moveId))!, item: (await readItem(tx, item.id))! }
  })
}

interface Move {
  readonly id: string
  readonly from: Location
  readonly to: Location
  readonly reason: string
}

async function move(tx: GroupTx, item: Item, { id, from, to, reason }: Move): Promise<void> {
  refuseRetired(item, item.designation)
  if (!sameLocation(item, from)) {
    throw new AppError(
      'state-conflict',
      `${item.designation} is not there any more: somebody moved it. Look again.`,
    )
  }
  if (sameLocation(item, to)) throw new AppError('state-conflict', `${item.designation} is there already.`)
  await checkDestination(tx, item, to)
  await recordMovement(tx, { id, item, to, reason })
  await tx.repository(Item).update({ id: item.id }, { ...to, version: item.version + 1 })
  await auditMove(tx, item, { from, to, reason })
}

function requireSameMove(
  known: Movement,
  item: Item,
  { to, reason }: { to: Location; reason: string },
): void {
  const went = { kitId: known.toKitId, positionId: known.toPositionId, placeId: known.toPlaceId }
  if (known.itemId !== item.id || !sameLocation(went, to) || known.reason !== reason) throw idTaken()
}
