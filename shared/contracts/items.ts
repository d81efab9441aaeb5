import { z } from 'zod'
import { ACCOUNTABILITIES } from '#shared/engine/vocabulary.ts'
import { defineEndpoint } from './endpoint.ts'
import { amount, id, line, newId, page, pageQuery, plainDate, text } from './fields.ts'
import { itemDetails, itemDetailsRecord } from './item-details.ts'
import {
  bringBackBody,
  designated,
  named,
  recordFields,
  retireBody,
  retiredFilter,
} from './registry-fields.ts'
import { CREW, KEEPERS } from './roles.ts'
import { category, condition } from './words.ts'

const params = z.object({ itemId: id })

const fields = {
  designation: line(24, 1),
  /** Its `category` is fixed for good once the item exists: the tag begins with it. */
  details: itemDetails,
  maker: line(80).default(''),
  model: line(80).default(''),
  serial: line(80, 1).nullable().default(null),
  accountability: z.enum(ACCOUNTABILITIES).default('durable'),
  condition: condition.default('serviceable'),
  conditionReason: line(300).default(''),
  /** The member who lent it; null when it is the group's own. */
  ownerId: id.nullable().default(null),
  buildSheetId: id.nullable().default(null),
  batchId: id.nullable().default(null),
  acquiredOn: plainDate.nullable().default(null),
  weightKg: amount(0, 9999).multipleOf(0.001).nullable().default(null),
  notes: text(4000).default(''),
}

const needsReason = {
  path: ['conditionReason'],
  message: 'Say what is wrong, or where it went.',
}
const hasReason = (item: { condition: string; conditionReason: string }) =>
  item.condition === 'serviceable' || item.conditionReason !== ''

export const itemBody = z.strictObject(fields).refine(hasReason, needsReason)

/** A new item lies in a place or nowhere known; from there it is moved. */
export const newItemBody = z
  .strictObject({ ...fields, placeId: id.nullable().default(null) })
  .refine(hasReason, needsReason)

const itemFields = {
  id,
  tag: z.string(),
  designation: z.string(),
  category,
  maker: z.string(),
  model: z.string(),
  serial: z.string().nullable(),
  accountability: z.enum(ACCOUNTABILITIES),
  condition,
  conditionReason: z.string(),
  /** The kit it is packed in, and the position there. */
  kit: designated.nullable(),
  position: named.nullable(),
  /** The place it lies in; null while it is packed in a kit. */
  place: named.nullable(),
  owner: named.nullable(),
  batch: named.nullable(),
  buildSheet: named.nullable(),
  acquiredOn: plainDate.nullable(),
  ...recordFields,
}

export const itemRow = z.object(itemFields)

export const itemRecord = z.object({
  ...itemFields,
  details: itemDetailsRecord,
  weightKg: z.number().nullable(),
  notes: z.string(),
})

export const listItems = defineEndpoint({
  name: 'list-items',
  method: 'get',
  path: '/api/v1/items',
  summary: 'Items, a page at a time',
  access: { scope: 'group', roles: CREW },
  query: z.strictObject({
    ...pageQuery,
    ...retiredFilter,
    sort: z
      .enum([
        'designation',
        'tag',
        'category',
        'maker',
        'model',
        'serial',
        'kit',
        'place',
        'condition',
        'acquiredOn',
      ])
      .default('designation'),
    category: category.optional(),
    condition: condition.optional(),
    /** Packed in a kit, or loose: in a place or nowhere known. */
    held: z.enum(['kit', 'loose']).optional(),
    kitId: id.optional(),
    kitKindId: id.optional(),
    /** Lying there, or packed in a kit that is there. */
    placeId: id.optional(),
    batchId: id.optional(),
    buildSheetId: id.optional(),
  }),
  response: page(itemRow),
})

export const getItem = defineEndpoint({
  name: 'get-item',
  method: 'get',
  path: '/api/v1/items/:itemId',
  summary: 'One item with all its fields',
  access: { scope: 'group', roles: CREW },
  params,
  response: itemRecord,
  problems: ['not-found'],
})

export const createItem = defineEndpoint({
  name: 'create-item',
  method: 'put',
  path: '/api/v1/items/:itemId',
  summary: 'Add an item under an id made by the client; its tag is made here',
  access: { scope: 'group', roles: KEEPERS },
  params: z.object({ itemId: newId }),
  body: newItemBody,
  response: itemRecord,
  problems: ['request-invalid', 'id-taken', 'already-exists'],
})

export const updateItem = defineEndpoint({
  name: 'update-item',
  method: 'post',
  path: '/api/v1/items/:itemId',
  summary: 'Change an item; where it is changes by moving it',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: itemBody,
  response: itemRecord,
  problems: [
    'request-invalid',
    'not-found',
    'already-exists',
    'version-stale',
    'version-missing',
    'state-conflict',
  ],
})

export const retireItem = defineEndpoint({
  name: 'retire-item',
  method: 'post',
  path: '/api/v1/items/:itemId/retire',
  summary: 'Retire an item; it leaves its kit',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: retireBody,
  response: itemRecord,
  problems: ['request-invalid', 'not-found', 'version-stale', 'version-missing', 'state-conflict'],
})

export const bringBackItem = defineEndpoint({
  name: 'bring-back-item',
  method: 'post',
  path: '/api/v1/items/:itemId/bring-back',
  summary: 'Bring a retired item back, loose',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: bringBackBody,
  response: itemRecord,
  problems: ['not-found', 'already-exists', 'version-stale', 'version-missing', 'state-conflict'],
})
