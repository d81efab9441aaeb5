import { listDueChecks as dueContract } from '#shared/contracts/due-checks.ts'
import { readForecast as forecastContract } from '#shared/contracts/forecast.ts'
import { readItemChecks as itemContract } from '#shared/contracts/item-checks.ts'
import {
  listExposureRecords as exposureRecordsContract,
  readKitExposure as exposureContract,
  recordExposure as recordExposureContract,
} from '#shared/contracts/kit-exposure.ts'
import { readKitReadiness as readContract } from '#shared/contracts/kit-readiness.ts'
import type { AppContext } from '../context.ts'
import { inGroup } from '../group-transaction.ts'
import { listDueChecks } from '../services/readiness/due-checks.ts'
import { exposureRecords, recordExposure } from '../services/readiness/exposure-records.ts'
import { readKitFace } from '../services/readiness/kit-face.ts'
import { readForecast } from '../services/readiness/read-forecast.ts'
import { readItemChecks } from '../services/readiness/read-item-checks.ts'
import { readKitExposure } from '../services/readiness/read-kit-exposure.ts'
import { readKitReadiness } from '../services/readiness/read-kit-readiness.ts'
import type { EndpointRouter } from './endpoint.ts'

export function readinessRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(readContract, ({ params, query, by }) =>
    inGroup(ctx, by, (tx) => readKitReadiness(tx, { kitId: params.kitId, asOf: query.asOf })),
  )
  endpoints.add(exposureContract, ({ params, query, by }) =>
    inGroup(ctx, by, (tx) => readKitExposure(tx, { kitId: params.kitId, use: query })),
  )
  endpoints.add(recordExposureContract, ({ params, body, by }) =>
    inGroup(ctx, by, (tx) => recordExposure(tx, { ...params, ...body })),
  )
  endpoints.add(exposureRecordsContract, ({ params, by }) =>
    inGroup(ctx, by, async (tx) => {
      const { kitId } = await readKitFace(tx, params.kitId)
      return { records: await exposureRecords(tx, kitId) }
    }),
  )
  endpoints.add(itemContract, ({ params, by }) => inGroup(ctx, by, (tx) => readItemChecks(tx, params.itemId)))
  endpoints.add(forecastContract, ({ by }) => inGroup(ctx, by, readForecast))
  endpoints.add(dueContract, ({ query, by }) => inGroup(ctx, by, (tx) => listDueChecks(tx, query)))
}
