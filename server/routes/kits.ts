import {
  bringBackKit,
  createKit,
  getKit,
  listKits,
  retireKit,
  setKitAvailability,
  updateKit,
} from '#shared/contracts/kits.ts'
import type { AppContext } from '../context.ts'
import { listKits as list } from '../services/registry/list-kits.ts'
import { setKitAvailability as setAvailability } from '../services/registry/set-kit-availability.ts'
import { kits } from '../services/registry/use-cases.ts'
import type { EndpointRouter } from './endpoint.ts'

export function kitRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(listKits, ({ query, by }) => list(ctx, by, query))
  endpoints.add(getKit, ({ params, by }) => kits.get(ctx, by, params.kitId))
  endpoints.add(createKit, ({ params, body, by }) => kits.create(ctx, by, { id: params.kitId, body }))
  endpoints.add(updateKit, ({ params, version, body, by }) =>
    kits.update(ctx, by, { id: params.kitId, version, body }),
  )
  endpoints.add(retireKit, ({ params, version, body, by }) =>
    kits.retire(ctx, by, { id: params.kitId, version, reason: body.reason }),
  )
  endpoints.add(bringBackKit, ({ params, version, by }) =>
    kits.bringBack(ctx, by, { id: params.kitId, version }),
  )
  endpoints.add(setKitAvailability, ({ params, version, body, by }) =>
    setAvailability(ctx, by, { kitId: params.kitId, version, body }),
  )
}
