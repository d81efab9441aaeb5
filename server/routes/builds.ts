import {
  compareBuildSheets as compareContract,
  readBatchRecalls as recallsContract,
  readBuildFigures as figuresContract,
} from '#shared/contracts/build-figures.ts'
import type { AppContext } from '../context.ts'
import { inGroup } from '../group-transaction.ts'
import { compareBuildSheets } from '../services/builds/compare-build-sheets.ts'
import { readBatchRecalls } from '../services/builds/read-batch-recalls.ts'
import { readBuildFigures } from '../services/builds/read-build-figures.ts'
import type { EndpointRouter } from './endpoint.ts'

/** What the tests of like units say together. */
export function buildRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(figuresContract, ({ params, by }) =>
    inGroup(ctx, by, (tx) => readBuildFigures(tx, params.buildSheetId)),
  )
  endpoints.add(compareContract, ({ params, query, by }) =>
    inGroup(ctx, by, (tx) => compareBuildSheets(tx, [...new Set([params.buildSheetId, ...query.with])])),
  )
  endpoints.add(recallsContract, ({ params, by }) =>
    inGroup(ctx, by, (tx) => readBatchRecalls(tx, params.batchId)),
  )
}
