import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, line, newId, page, pageQuery, plainDate, text } from './fields.ts'
import { bringBackBody, named, recordFields, retireBody, retiredFilter } from './registry-fields.ts'
import { CREW, KEEPERS } from './roles.ts'

const params = z.object({ batchId: id })

/** Units made together from one core lot. */
export const batchBody = z.strictObject({
  buildSheetId: id,
  name: line(60, 1),
  coreLot: line(60).default(''),
  builtOn: plainDate.nullable().default(null),
  builderId: id.nullable().default(null),
  notes: text(4000).default(''),
})

export const batchRecord = z.object({
  id,
  name: z.string(),
  buildSheet: named,
  coreLot: z.string(),
  builtOn: plainDate.nullable(),
  builder: named.nullable(),
  notes: z.string(),
  items: z.int(),
  ...recordFields,
})

export const listBatches = defineEndpoint({
  name: 'list-batches',
  method: 'get',
  path: '/api/v1/batches',
  summary: 'Batches, a page at a time',
  access: { scope: 'group', roles: CREW },
  query: z.strictObject({
    ...pageQuery,
    ...retiredFilter,
    sort: z.enum(['name', 'buildSheet', 'coreLot', 'builtOn', 'items']).default('name'),
    buildSheetId: id.optional(),
  }),
  response: page(batchRecord),
})

export const getBatch = defineEndpoint({
  name: 'get-batch',
  method: 'get',
  path: '/api/v1/batches/:batchId',
  summary: 'One batch',
  access: { scope: 'group', roles: CREW },
  params,
  response: batchRecord,
  problems: ['not-found'],
})

export const createBatch = defineEndpoint({
  name: 'create-batch',
  method: 'put',
  path: '/api/v1/batches/:batchId',
  summary: 'Add a batch under an id made by the client',
  access: { scope: 'group', roles: KEEPERS },
  params: z.object({ batchId: newId }),
  body: batchBody,
  response: batchRecord,
  problems: ['request-invalid', 'id-taken', 'already-exists'],
})

export const updateBatch = defineEndpoint({
  name: 'update-batch',
  method: 'post',
  path: '/api/v1/batches/:batchId',
  summary: 'Change a batch',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: batchBody,
  response: batchRecord,
  problems: [
    'request-invalid',
    'not-found',
    'already-exists',
    'version-stale',
    'version-missing',
    'state-conflict',
  ],
})

export const retireBatch = defineEndpoint({
  name: 'retire-batch',
  method: 'post',
  path: '/api/v1/batches/:batchId/retire',
  summary: 'Retire a batch: nothing is added to it any more',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: retireBody,
  response: batchRecord,
  problems: ['request-invalid', 'not-found', 'version-stale', 'version-missing', 'state-conflict'],
})

export const bringBackBatch = defineEndpoint({
  name: 'bring-back-batch',
  method: 'post',
  path: '/api/v1/batches/:batchId/bring-back',
  summary: 'Bring a retired batch back',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: bringBackBody,
  response: batchRecord,
  problems: ['not-found', 'already-exists', 'version-stale', 'version-missing', 'state-conflict'],
})
