import {
  bringBackItem,
  createItem,
  getItem,
  listItems,
  retireItem,
  updateItem,
} from '#shared/contracts/items.ts'
import type { AppContext } from '../context.ts'
import { listItems as list } from '../services/registry/list-items.ts'
import { items } from '../services/registry/use-cases.ts'
import type { EndpointRouter } from './endpoint.ts'

export function itemRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(listItems, ({ query, by }) => list(ctx, by, query))
  endpoints.add(getItem, ({ params, by }) => items.get(ctx, by, params.itemId))
  endpoints.add(createItem, ({ params, body, by }) => items.create(ctx, by, { id: params.itemId, body }))
  endpoints.add(updateItem, ({ params, version, body, by }) =>
    items.update(ctx, by, { id: params.itemId, version, body }),
  )
  endpoints.add(retireItem, ({ params, version, body, by }) =>
    items.retire(ctx, by, { id: params.itemId, version, reason: body.reason }),
  )
  endpoints.add(bringBackItem, ({ params, version, by }) =>
    items.bringBack(ctx, by, { id: params.itemId, version }),
  )
}
