import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { amount, id, line, newId, page, pageQuery, text } from './fields.ts'
import { CONSTRUCTIONS } from '#shared/engine/builds/winding-length.ts'
import { BUILT_CATEGORIES, buildDetails, buildDetailsRecord } from './item-details.ts'
import { bringBackBody, recordFields, retireBody, retiredFilter } from './registry-fields.ts'
import { CREW, KEEPERS } from './roles.ts'

const params = z.object({ buildSheetId: id })

/** What a winding card needs besides the details of the finished thing. Lengths of a turn and of a tail in mm. */
const windingFields = {
  construction: z.enum(CONSTRUCTIONS).optional(),
  awg: z.int().min(-3).max(40).optional(),
  /** Once round the core or the stack of cores, wire included. */
  meanTurnMm: amount(1, 1000).optional(),
  /** What is left of each wire at each of its ends. */
  tailMm: amount(0, 2000).optional(),
  tap: line(120, 1).optional(),
  materialsCost: amount(0, 100_000).optional(),
  currency: line(8, 1).optional(),
  /** Of this build's own, beside those that every card carries. */
  cautions: text(1000, 1).optional(),
}

/** How a transformer or an antenna is made. */
export const buildSheetBody = z.strictObject({
  name: line(120, 1),
  details: buildDetails,
  winding: z.strictObject(windingFields).default({}),
  notes: text(4000).default(''),
})

export const buildSheetRecord = z.object({
  id,
  name: z.string(),
  category: z.enum(BUILT_CATEGORIES),
  details: buildDetailsRecord,
  winding: z.object(windingFields),
  notes: z.string(),
  batches: z.int(),
  items: z.int(),
  ...recordFields,
})

export const listBuildSheets = defineEndpoint({
  name: 'list-build-sheets',
  method: 'get',
  path: '/api/v1/build-sheets',
  summary: 'Build sheets, a page at a time',
  access: { scope: 'group', roles: CREW },
  query: z.strictObject({
    ...pageQuery,
    ...retiredFilter,
    sort: z.enum(['name', 'category', 'batches', 'items']).default('name'),
    category: z.enum(BUILT_CATEGORIES).optional(),
  }),
  response: page(buildSheetRecord),
})

export const getBuildSheet = defineEndpoint({
  name: 'get-build-sheet',
  method: 'get',
  path: '/api/v1/build-sheets/:buildSheetId',
  summary: 'One build sheet',
  access: { scope: 'group', roles: CREW },
  params,
  response: buildSheetRecord,
  problems: ['not-found'],
})

export const createBuildSheet = defineEndpoint({
  name: 'create-build-sheet',
  method: 'put',
  path: '/api/v1/build-sheets/:buildSheetId',
  summary: 'Add a build sheet under an id made by the client',
  access: { scope: 'group', roles: KEEPERS },
  params: z.object({ buildSheetId: newId }),
  body: buildSheetBody,
  response: buildSheetRecord,
  problems: ['request-invalid', 'id-taken', 'already-exists'],
})

export const updateBuildSheet = defineEndpoint({
  name: 'update-build-sheet',
  method: 'post',
  path: '/api/v1/build-sheets/:buildSheetId',
  summary: 'Change a build sheet; its category never',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: buildSheetBody,
  response: buildSheetRecord,
  problems: [
    'request-invalid',
    'not-found',
    'already-exists',
    'version-stale',
    'version-missing',
    'state-conflict',
  ],
})

export const retireBuildSheet = defineEndpoint({
  name: 'retire-build-sheet',
  method: 'post',
  path: '/api/v1/build-sheets/:buildSheetId/retire',
  summary: 'Retire a build sheet: nothing new is built by it',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: retireBody,
  response: buildSheetRecord,
  problems: ['request-invalid', 'not-found', 'version-stale', 'version-missing', 'state-conflict'],
})

export const bringBackBuildSheet = defineEndpoint({
  name: 'bring-back-build-sheet',
  method: 'post',
  path: '/api/v1/build-sheets/:buildSheetId/bring-back',
  summary: 'Bring a retired build sheet back',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: bringBackBody,
  response: buildSheetRecord,
  problems: ['not-found', 'already-exists', 'version-stale', 'version-missing', 'state-conflict'],
})
