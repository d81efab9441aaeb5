import {
  bringBackPlace,
  createPlace,
  getPlace,
  listPlaces,
  retirePlace,
  updatePlace,
} from '#shared/contracts/places.ts'
import type { AppContext } from '../context.ts'
import { listPlaces as list } from '../services/registry/place.ts'
import { places } from '../services/registry/use-cases.ts'
import type { EndpointRouter } from './endpoint.ts'

export function placeRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(listPlaces, ({ query, by }) => list(ctx, by, query))
  endpoints.add(getPlace, ({ params, by }) => places.get(ctx, by, params.placeId))
  endpoints.add(createPlace, ({ params, body, by }) => places.create(ctx, by, { id: params.placeId, body }))
  endpoints.add(updatePlace, ({ params, version, body, by }) =>
    places.update(ctx, by, { id: params.placeId, version, body }),
  )
  endpoints.add(retirePlace, ({ params, version, body, by }) =>
    places.retire(ctx, by, { id: params.placeId, version, reason: body.reason }),
  )
  endpoints.add(bringBackPlace, ({ params, version, by }) =>
    places.bringBack(ctx, by, { id: params.placeId, version }),
  )
}
