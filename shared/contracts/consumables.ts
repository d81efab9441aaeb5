import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, line, newId, page, pageQuery, text } from './fields.ts'
import { bringBackBody, decimal, named, recordFields, retireBody, retiredFilter } from './registry-fields.ts'
import { CREW, KEEPERS } from './roles.ts'
import { lotRecord } from './stock.ts'

const params = z.object({ consumableId: id })

/** A counted line. Quantities are exact decimals written as strings. */
export const consumableBody = z.strictObject({
  name: line(120, 1),
  unit: line(20, 1),
  minimum: decimal,
  placeId: id.nullable().default(null),
  notes: text(2000).default(''),
})

const consumableFields = {
  id,
  name: z.string(),
  unit: z.string(),
  minimum: z.string(),
  /** All lots together. */
  quantity: z.string(),
  belowMinimum: z.boolean(),
  /** The earliest use-by day of a lot with something left. */
  useByOn: z.string().nullable(),
  place: named.nullable(),
  ...recordFields,
}

export const consumableRow = z.object({ ...consumableFields, lots: z.int() })

export const consumableRecord = z.object({
  ...consumableFields,
  notes: z.string(),
  /** Earliest use-by day first. */
  lots: z.array(lotRecord),
})

export const listConsumables = defineEndpoint({
  name: 'list-consumables',
  method: 'get',
  path: '/api/v1/consumables',
  summary: 'Consumables, a page at a time',
  access: { scope: 'group', roles: CREW },
  query: z.strictObject({
    ...pageQuery,
    ...retiredFilter,
    sort: z.enum(['name', 'quantity', 'minimum', 'useByOn', 'place']).default('name'),
    placeId: id.optional(),
    /** Only those that hold less than their minimum. */
    short: z.stringbool().optional(),
  }),
  response: page(consumableRow),
})

export const getConsumable = defineEndpoint({
  name: 'get-consumable',
  method: 'get',
  path: '/api/v1/consumables/:consumableId',
  summary: 'One consumable with its lots',
  access: { scope: 'group', roles: CREW },
  params,
  response: consumableRecord,
  problems: ['not-found'],
})

export const createConsumable = defineEndpoint({
  name: 'create-consumable',
  method: 'put',
  path: '/api/v1/consumables/:consumableId',
  summary: 'Add a consumable under an id made by the client',
  access: { scope: 'group', roles: KEEPERS },
  params: z.object({ consumableId: newId }),
  body: consumableBody,
  response: consumableRecord,
  problems: ['request-invalid', 'id-taken', 'already-exists'],
})

export const updateConsumable = defineEndpoint({
  name: 'update-consumable',
  method: 'post',
  path: '/api/v1/consumables/:consumableId',
  summary: 'Change a consumable; its quantity changes by stock changes only',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: consumableBody,
  response: consumableRecord,
  problems: [
    'request-invalid',
    'not-found',
    'already-exists',
    'version-stale',
    'version-missing',
    'state-conflict',
  ],
})

export const retireConsumable = defineEndpoint({
  name: 'retire-consumable',
  method: 'post',
  path: '/api/v1/consumables/:consumableId/retire',
  summary: 'Retire a consumable',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: retireBody,
  response: consumableRecord,
  problems: ['request-invalid', 'not-found', 'version-stale', 'version-missing', 'state-conflict'],
})

export const bringBackConsumable = defineEndpoint({
  name: 'bring-back-consumable',
  method: 'post',
  path: '/api/v1/consumables/:consumableId/bring-back',
  summary: 'Bring a retired consumable back',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: bringBackBody,
  response: consumableRecord,
  problems: ['not-found', 'already-exists', 'version-stale', 'version-missing', 'state-conflict'],
})

export const setLotCondition = defineEndpoint({
  name: 'set-lot-condition',
  method: 'post',
  path: '/api/v1/consumables/:consumableId/lots/:lotId/condition',
  summary: 'Say what state a lot is in, such as "leaking"; empty when nothing is wrong',
  access: { scope: 'group', roles: CREW },
  versioned: true,
  params: params.extend({ lotId: id }),
  body: z.strictObject({ condition: line(200) }),
  response: consumableRecord,
  problems: ['request-invalid', 'not-found', 'version-stale', 'version-missing', 'state-conflict'],
})
