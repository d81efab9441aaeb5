import { listItemMoves, moveItem } from '#shared/contracts/movements.ts'
import type { AppContext } from '../context.ts'
import { moveItem as move } from '../services/registry/move-item.ts'
import { listItemMoves as listMoves } from '../services/registry/read-movements.ts'
import type { EndpointRouter } from './endpoint.ts'

export function moveRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(moveItem, ({ params, body, by }) => move(ctx, by, { ...params, ...body }))
  endpoints.add(listItemMoves, ({ params, query, by }) => listMoves(ctx, by, { ...params, ...query }))
}
