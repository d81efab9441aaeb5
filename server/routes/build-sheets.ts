import {
  bringBackBuildSheet,
  createBuildSheet,
  getBuildSheet,
  listBuildSheets,
  retireBuildSheet,
  updateBuildSheet,
} from '#shared/contracts/build-sheets.ts'
import type { AppContext } from '../context.ts'
import { listBuildSheets as list } from '../services/registry/build-sheet.ts'
import { buildSheets } from '../services/registry/use-cases.ts'
import type { EndpointRouter } from './endpoint.ts'

export function buildSheetRoutes(endpoints: EndpointRouter, ctx: AppContext): void {
  endpoints.add(listBuildSheets, ({ query, by }) => list(ctx, by, query))
  endpoints.add(getBuildSheet, ({ params, by }) => buildSheets.get(ctx, by, params.buildSheetId))
  endpoints.add(createBuildSheet, ({ params, body, by }) =>
    buildSheets.create(ctx, by, { id: params.buildSheetId, body }),
  )
  endpoints.add(updateBuildSheet, ({ params, version, body, by }) =>
    buildSheets.update(ctx, by, { id: params.buildSheetId, version, body }),
  )
  endpoints.add(retireBuildSheet, ({ params, version, body, by }) =>
    buildSheets.retire(ctx, by, { id: params.buildSheetId, version, reason: body.reason }),
  )
  endpoints.add(bringBackBuildSheet, ({ params, version, by }) =>
    buildSheets.bringBack(ctx, by, { id: params.buildSheetId, version }),
  )
}
