import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, line, newId, plainDate } from './fields.ts'
import { difference, named } from './registry-fields.ts'
import { CREW, KEEPERS } from './roles.ts'

export const lotRecord = z.object({
  id,
  consumableId: id,
  /** Empty for a line that is kept without lots. */
  name: z.string(),
  quantity: z.string(),
  useByOn: plainDate.nullable(),
  condition: z.string(),
  createdAt: z.string(),
})

export const stockChangeRecord = z.object({
  id,
  lotId: id,
  lotName: z.string(),
  difference: z.string(),
  reason: z.string(),
  changedAt: z.string(),
  changedBy: named.nullable(),
})

const lotParams = { consumableId: id }

export const createLot = defineEndpoint({
  name: 'create-lot',
  method: 'put',
  path: '/api/v1/consumables/:consumableId/lots/:lotId',
  summary: 'Add an empty lot to a consumable; what is in it arrives by stock changes',
  access: { scope: 'group', roles: KEEPERS },
  params: z.object({ ...lotParams, lotId: newId }),
  body: z.strictObject({
    name: line(60).default(''),
    useByOn: plainDate.nullable().default(null),
    condition: line(200).default(''),
  }),
  response: lotRecord,
  problems: ['request-invalid', 'not-found', 'id-taken', 'already-exists', 'state-conflict'],
})

/** Counts travel as differences: two people who each take one have taken two. */
export const changeStock = defineEndpoint({
  name: 'change-stock',
  method: 'put',
  path: '/api/v1/consumables/:consumableId/lots/:lotId/changes/:changeId',
  summary: 'Add to a lot or take from it, by a difference; the same change sent again is stored once',
  access: { scope: 'group', roles: CREW },
  params: z.object({ ...lotParams, lotId: id, changeId: newId }),
  body: z.strictObject({ difference, reason: line(300, 1) }),
  response: z.object({ change: stockChangeRecord, lot: lotRecord }),
  problems: ['request-invalid', 'not-found', 'id-taken', 'state-conflict'],
})

export const listStockChanges = defineEndpoint({
  name: 'list-stock-changes',
  method: 'get',
  path: '/api/v1/consumables/:consumableId/changes',
  summary: 'What came and went, latest first',
  access: { scope: 'group', roles: CREW },
  params: z.object(lotParams),
  query: z.strictObject({
    size: z.coerce.number().int().min(1).max(200).default(25),
    /** `next` of the page before. */
    before: id.optional(),
  }),
  response: z.object({ rows: z.array(stockChangeRecord), next: id.nullable() }),
  problems: ['not-found'],
})
