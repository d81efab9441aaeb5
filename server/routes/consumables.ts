import {
  bringBackConsumable,
  createConsumable,
  getConsumable,
  listConsumables,
  retireConsumable,
  setLotCondition,
  updateConsumable,
} from '#shared/contracts/consumables.ts'
import { changeStock, createLot, listStockChanges } from '#shared/contracts/stock.ts'
import type { AppContext } from '../context.ts'
import { changeStock as change } from '../services/registry/change-stock.ts'
import { listConsumables as list } from '../services/registry/consumable.ts'
import { createLot as addLot } from '../services/registry/create-lot.ts'
import { listStockChanges as listChanges } from '../services/registry/read-stock-changes.ts'
import { setLotCondition as setCondition } from '../services/registry/set-lot-condition.ts'
import { consumables } from '../services/registry/use-cases.ts'
import type { EndpointRouter } from './endpoint.ts'

export function consumableRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(listConsumables, ({ query, by }) => list(ctx, by, query))
  endpoints.add(getConsumable, ({ params, by }) => consumables.get(ctx, by, params.consumableId))
  endpoints.add(createConsumable, ({ params, body, by }) =>
    consumables.create(ctx, by, { id: params.consumableId, body }),
  )
  endpoints.add(updateConsumable, ({ params, version, body, by }) =>
    consumables.update(ctx, by, { id: params.consumableId, version, body }),
  )
  endpoints.add(retireConsumable, ({ params, version, body, by }) =>
    consumables.retire(ctx, by, { id: params.consumableId, version, reason: body.reason }),
  )
  endpoints.add(bringBackConsumable, ({ params, version, by }) =>
    consumables.bringBack(ctx, by, { id: params.consumableId, version }),
  )
}

/** Lots, and what comes and goes. */
export function stockRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(createLot, ({ params, body, by }) => addLot(ctx, by, { ...params, ...body }))
  endpoints.add(setLotCondition, ({ params, version, body, by }) =>
    setCondition(ctx, by, { ...params, ...body, version }),
  )
  endpoints.add(changeStock, ({ params, body, by }) => change(ctx, by, { ...params, ...body }))
  endpoints.add(listStockChanges, ({ params, query, by }) => listChanges(ctx, by, { ...params, ...query }))
}
