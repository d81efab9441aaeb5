import {
  bringBackKitKind,
  createKitKind,
  getKitKind,
  listKitKinds,
  retireKitKind,
  updateKitKind,
} from '#shared/contracts/kit-kinds.ts'
import type { AppContext } from '../context.ts'
import { listKitKinds as list } from '../services/registry/kit-kind.ts'
import { kitKinds } from '../services/registry/use-cases.ts'
import type { EndpointRouter } from './endpoint.ts'

export function kitKindRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(listKitKinds, ({ query, by }) => list(ctx, by, query))
  endpoints.add(getKitKind, ({ params, by }) => kitKinds.get(ctx, by, params.kitKindId))
  endpoints.add(createKitKind, ({ params, body, by }) =>
    kitKinds.create(ctx, by, { id: params.kitKindId, body }),
  )
  endpoints.add(updateKitKind, ({ params, version, body, by }) =>
    kitKinds.update(ctx, by, { id: params.kitKindId, version, body }),
  )
  endpoints.add(retireKitKind, ({ params, version, body, by }) =>
    kitKinds.retire(ctx, by, { id: params.kitKindId, version, reason: body.reason }),
  )
  endpoints.add(bringBackKitKind, ({ params, version, by }) =>
    kitKinds.bringBack(ctx, by, { id: params.kitKindId, version }),
  )
}
