import { consumableBody } from '#shared/contracts/consumables.ts'
import { changeStock as stockContract, createLot as lotContract } from '#shared/contracts/stock.ts'
import { changeStock as change } from '#server/services/registry/change-stock.ts'
import { createLot } from '#server/services/registry/create-lot.ts'
import { setLotCondition } from '#server/services/registry/set-lot-condition.ts'
import { consumables } from '#server/services/registry/use-cases.ts'
import { CONSUMABLES, type DemoLot } from '../consumables.ts'
import { named } from './registry.ts'
import type { Stage } from './stage.ts'

const lotName = (consumable: string, lot: string) => `lot ${consumable} ${lot}`

/** The line with its lots and what lay on the shelf when the record began. */
export async function addConsumable(
  stage: Stage,
  { consumable: name }: { consumable: string },
): Promise<void> {
  const { ctx, by, ids, now } = stage
  const line = CONSUMABLES.find((one) => one.name === name)
  if (!line) throw new Error(`The demo has no consumable ${name}`)
  const { lots, ...rest } = line
  const body = consumableBody.parse({ ...rest, placeId: ids.of(named.place('P1')) })
  await consumables.create(ctx, by, { id: ids.make(name, now), body })
  for (const lot of lots) await addLot(stage, name, lot)
}

async function addLot(stage: Stage, consumable: string, lot: DemoLot): Promise<void> {
  const { ctx, by, ids, now, calendar } = stage
  const useByOn = lot.useByOn === undefined ? null : calendar.day(lot.useByOn)
  const body = lotContract.body.parse({ name: lot.name, useByOn })
  const lotId = ids.make(lotName(consumable, lot.name), now)
  await createLot(ctx, by, { consumableId: ids.of(consumable), lotId, ...body })
  const reason = 'on the shelf when the record began'
  await changeStock(stage, { consumable, lot: lot.name, difference: lot.quantity, reason })
}

interface Change {
  readonly consumable: string
  readonly lot: string
  readonly difference: string
  readonly reason: string
}

export async function changeStock({ ctx, by, ids, now }: Stage, deed: Change): Promise<void> {
  const { consumable, lot, difference, reason } = deed
  const lotId = ids.of(lotName(consumable, lot))
  const changeId = ids.make(`change ${lotId} ${now.toISOString()}`, now)
  const body = stockContract.body.parse({ difference, reason })
  await change(ctx, by, { consumableId: ids.of(consumable), lotId, changeId, ...body })
}

export async function noteLot(
  { ctx, by, ids }: Stage,
  { consumable, lot, condition }: { consumable: string; lot: string; condition: string },
): Promise<void> {
  const consumableId = ids.of(consumable)
  const { version } = await consumables.get(ctx, by, consumableId)
  await setLotCondition(ctx, by, {
    consumableId,
    lotId: ids.of(lotName(consumable, lot)),
    version,
    condition,
  })
}
