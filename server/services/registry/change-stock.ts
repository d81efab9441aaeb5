import type { z } from 'zod'
import type { changeStock as contract } from '#shared/contracts/stock.ts'
import type { AppContext } from '../../context.ts'
import type { Consumable } from '../../entities/Consumable.ts'
import { StockChange } from '../../entities/StockChange.ts'
import { AppError, notFound } from '../../errors.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { idTaken, namingDuplicates } from './duplicates.ts'
import { lockConsumable, lockLot, lotWords } from './lots.ts'
import { readStockChange } from './read-stock-changes.ts'
import type { By } from './thing.ts'

type Answer = z.input<typeof contract.response>
type Request = z.output<typeof contract.body> & {
  readonly consumableId: string
  readonly lotId: string
  readonly changeId: string
}

/** PostgreSQL adds, exactly. No row: less would be left than nothing. */
const APPLY: Statement = {
  name: 'apply-stock-change',
  text: `UPDATE consumable_lot SET quantity = quantity + $3::numeric
    WHERE group_id = $1 AND id = $2 AND quantity + $3::numeric >= 0 RETURNING id`,
}

/**
 * Adds a difference to a lot. Two people who each take one have taken two; nobody takes what is not there:
 * `state-conflict`. The same change sent again is the same success.
 */
export function changeStock(ctx: AppContext, by: By, request: Request): Promise<Answer> {
  return inGroup(ctx, by, async (tx) => {
    const consumable = await lockConsumable(tx, request.consumableId)
    const lot = await lockLot(tx, request.consumableId, request.lotId)
    if (!lot) throw notFound('lot')
    const known = await readStockChange(tx, request.changeId)
    if (known) requireSameChange(known, request)
    else await apply(tx, { consumable, lot, request })
    return {
      change: (await readStockChange(tx, request.changeId))!,
      lot: (await lockLot(tx, request.consumableId, request.lotId))!,
    }
  })
}

function requireSameChange(known: Answer['change'], { lotId, difference, reason }: Request): void {
  if (known.lotId !== lotId || known.difference !== difference || known.reason !== reason) throw idTaken()
}

async function apply(
  tx: GroupTx,
  { consumable, lot, request }: { consumable: Consumable; lot: Answer['lot']; request: Request },
): Promise<void> {
  const { changeId, lotId, difference, reason } = request
  const words = lotWords(consumable, lot.name)
  if ((await tx.sql(APPLY, [tx.groupId, lotId, difference])).length === 0) {
    throw new AppError('state-conflict', `Only ${lot.quantity} ${consumable.unit} of ${words} are left.`)
  }
  const row = { id: changeId, lotId, difference, reason, changedAt: tx.now, changedBy: tx.actor.memberId }
  await namingDuplicates(() => tx.repository(StockChange).insert(row))
  const [verb, amount] = difference.startsWith('-') ? ['took', difference.slice(1)] : ['added', difference]
  await record(tx, {
    action: 'stock-changed',
    subjectType: 'consumable',
    subjectId: consumable.id,
    summary: `${verb} ${amount} ${consumable.unit} of ${words}: ${reason}`,
    after: { lot: lot.name, difference, reason },
  })
}
