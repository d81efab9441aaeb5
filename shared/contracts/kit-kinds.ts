import { z } from 'zod'
import { BANDS, MODES } from '#shared/engine/vocabulary.ts'
import { defineEndpoint } from './endpoint.ts'
import { amount, id, line, newId, page, pageQuery } from './fields.ts'
import { bringBackBody, recordFields, retireBody, retiredFilter } from './registry-fields.ts'
import { CREW, KEEPERS } from './roles.ts'
import { category } from './words.ts'

const params = z.object({ kitKindId: id })
const unique = (list: readonly string[]) => new Set(list).size === list.length

export const bands = z.array(z.enum(BANDS)).max(BANDS.length).refine(unique, 'Name each band once.')

/** What kits of the kind promise. Watts are the radio's output; null where the kind promises none. */
export const kitPromise = z.strictObject({
  bands,
  modes: z.array(z.enum(MODES)).max(MODES.length).refine(unique, 'Name each mode once.'),
  watts: amount(0.1, 5000).nullable(),
  hours: amount(0.5, 1000).nullable(),
  /** Share of the time in which such a station transmits: the hours are computed with it. */
  transmitPercent: amount(1, 100).nullable().optional(),
})

/** What a position asks of the item in it; absent means it does not matter. Shown to who packs, never enforced. */
export const positionRequirements = z.strictObject({
  connector: line(40, 1).optional(),
  minA: amount(0.1, 1000).optional(),
  minWatts: amount(0.1, 10_000).optional(),
  minAh: amount(0.1, 10_000).optional(),
  note: line(120, 1).optional(),
})

/** One line of a load plan. The order of the list is the order of packing. */
export const positionBody = z.strictObject({
  id: newId,
  name: line(80, 1),
  category,
  quantity: z.int().min(1).max(50),
  vital: z.boolean(),
  requires: positionRequirements.default({}),
})

export const kitKindBody = z.strictObject({
  code: line(12, 1),
  name: line(120, 1),
  /** A station counts in the sentence of the board; a power kit or a test bench does not. */
  station: z.boolean(),
  promise: kitPromise,
  positions: z
    .array(positionBody)
    .max(200)
    .refine((list) => unique(list.map((position) => position.id)), 'A position is named twice.'),
})

export const positionRecord = z.object({
  id,
  name: z.string(),
  category,
  quantity: z.int(),
  vital: z.boolean(),
  requires: z.object(positionRequirements.shape),
})

export const kitKindRecord = z.object({
  id,
  code: z.string(),
  name: z.string(),
  station: z.boolean(),
  promise: z.object(kitPromise.shape),
  positions: z.array(positionRecord),
  kits: z.int(),
  ...recordFields,
})

/** A row of the list counts the load plan instead of carrying it. */
export const kitKindRow = kitKindRecord.omit({ positions: true }).extend({
  positions: z.int(),
  items: z.int(),
})

export const listKitKinds = defineEndpoint({
  name: 'list-kit-kinds',
  method: 'get',
  path: '/api/v1/kit-kinds',
  summary: 'Kit kinds, a page at a time',
  access: { scope: 'group', roles: CREW },
  query: z.strictObject({
    ...pageQuery,
    ...retiredFilter,
    sort: z.enum(['code', 'name', 'kits', 'positions']).default('code'),
  }),
  response: page(kitKindRow),
})

export const getKitKind = defineEndpoint({
  name: 'get-kit-kind',
  method: 'get',
  path: '/api/v1/kit-kinds/:kitKindId',
  summary: 'One kit kind with its load plan',
  access: { scope: 'group', roles: CREW },
  params,
  response: kitKindRecord,
  problems: ['not-found'],
})

export const createKitKind = defineEndpoint({
  name: 'create-kit-kind',
  method: 'put',
  path: '/api/v1/kit-kinds/:kitKindId',
  summary: 'Add a kit kind with its load plan under an id made by the client',
  access: { scope: 'group', roles: KEEPERS },
  params: z.object({ kitKindId: newId }),
  body: kitKindBody,
  response: kitKindRecord,
  problems: ['request-invalid', 'id-taken', 'already-exists'],
})

export const updateKitKind = defineEndpoint({
  name: 'update-kit-kind',
  method: 'post',
  path: '/api/v1/kit-kinds/:kitKindId',
  summary: 'Change a kit kind; positions that are not named any more are removed if nothing is in them',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: kitKindBody,
  response: kitKindRecord,
  problems: [
    'request-invalid',
    'not-found',
    'already-exists',
    'version-stale',
    'version-missing',
    'state-conflict',
  ],
})

export const retireKitKind = defineEndpoint({
  name: 'retire-kit-kind',
  method: 'post',
  path: '/api/v1/kit-kinds/:kitKindId/retire',
  summary: 'Retire a kit kind that no kit has any more',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: retireBody,
  response: kitKindRecord,
  problems: ['request-invalid', 'not-found', 'version-stale', 'version-missing', 'state-conflict'],
})

export const bringBackKitKind = defineEndpoint({
  name: 'bring-back-kit-kind',
  method: 'post',
  path: '/api/v1/kit-kinds/:kitKindId/bring-back',
  summary: 'Bring a retired kit kind back',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: bringBackBody,
  response: kitKindRecord,
  problems: ['not-found', 'already-exists', 'version-stale', 'version-missing', 'state-conflict'],
})
