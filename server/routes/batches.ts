import {
  bringBackBatch,
  createBatch,
  getBatch,
  listBatches,
  retireBatch,
  updateBatch,
} from '#shared/contracts/batches.ts'
import type { AppContext } from '../context.ts'
import { listBatches as list } from '../services/registry/batch.ts'
import { batches } from '../services/registry/use-cases.ts'
import type { EndpointRouter } from './endpoint.ts'

export function batchRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(listBatches, ({ query, by }) => list(ctx, by, query))
  endpoints.add(getBatch, ({ params, by }) => batches.get(ctx, by, params.batchId))
  endpoints.add(createBatch, ({ params, body, by }) => batches.create(ctx, by, { id: params.batchId, body }))
  endpoints.add(updateBatch, ({ params, version, body, by }) =>
    batches.update(ctx, by, { id: params.batchId, version, body }),
  )
  endpoints.add(retireBatch, ({ params, version, body, by }) =>
    batches.retire(ctx, by, { id: params.batchId, version, reason: body.reason }),
  )
  endpoints.add(bringBackBatch, ({ params, version, by }) =>
    batches.bringBack(ctx, by, { id: params.batchId, version }),
  )
}
