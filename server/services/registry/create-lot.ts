import type { z } from 'zod'
import type { createLot as contract } from '#shared/contracts/stock.ts'
import type { AppContext } from '../../context.ts'
import { ConsumableLot } from '../../entities/ConsumableLot.ts'
import { inGroup } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { idTaken, namingDuplicates } from './duplicates.ts'
import { lockConsumable, lockLot, lotWords } from './lots.ts'
import type { By } from './thing.ts'

type Request = z.output<typeof contract.body> & { readonly consumableId: string; readonly lotId: string }

/** Adds an empty lot. The same id with the same name and use-by day again is the same success. */
export function createLot(
  ctx: AppContext,
  by: By,
  request: Request,
): Promise<z.input<typeof contract.response>> {
  return inGroup(ctx, by, async (tx) => {
    const { consumableId, lotId, name, useByOn, condition } = request
    const consumable = await lockConsumable(tx, consumableId)
    const known = await lockLot(tx, consumableId, lotId)
    if (known) {
      if (known.name !== name || known.useByOn !== useByOn) throw idTaken()
      return known
    }
    const row = { id: lotId, consumableId, name, useByOn, condition, createdAt: tx.now }
    await namingDuplicates(() => tx.repository(ConsumableLot).insert(row))
    await record(tx, {
      action: 'lot-created',
      subjectType: 'consumable',
      subjectId: consumableId,
      summary: `added a lot of ${lotWords(consumable, name)}`,
      after: { lot: name, useByOn, condition },
    })
    return (await lockLot(tx, consumableId, lotId))!
  })
}
