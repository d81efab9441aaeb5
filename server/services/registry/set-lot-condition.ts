import type { z } from 'zod'
import type { consumableRecord } from '#shared/contracts/consumables.ts'
import type { AppContext } from '../../context.ts'
import { ConsumableLot } from '../../entities/ConsumableLot.ts'
import { notFound } from '../../errors.ts'
import { inGroup } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { consumable } from './consumable.ts'
import { lockAt, refuseRetired } from './locks.ts'
import { lockLot, lotWords } from './lots.ts'
import type { By } from './thing.ts'
import { save } from './update-thing.ts'

interface Request {
  readonly consumableId: string
  readonly lotId: string
  /** The version of the consumable that the caller read. */
  readonly version: number
  readonly condition: string
}

/** Says what state a lot is in; empty when nothing is wrong with it. */
export function setLotCondition(
  ctx: AppContext,
  by: By,
  { consumableId, lotId, version, condition }: Request,
): Promise<z.input<typeof consumableRecord>> {
  return inGroup(ctx, by, async (tx) => {
    const row = await lockAt(tx, consumable, { id: consumableId, version })
    refuseRetired(row, row.name)
    const lot = await lockLot(tx, consumableId, lotId)
    if (!lot) throw notFound('lot')
    if (lot.condition !== condition) {
      await tx.repository(ConsumableLot).update({ id: lotId }, { condition })
      await save(tx, consumable, row, {})
      await record(tx, {
        action: 'lot-condition-set',
        subjectType: 'consumable',
        subjectId: consumableId,
        summary: `noted ${lotWords(row, lot.name)}: ${condition || 'nothing wrong'}`,
        before: { lot: lot.name, condition: lot.condition },
        after: { lot: lot.name, condition },
      })
    }
    return (await consumable.read(tx, consumableId))!
  })
}
