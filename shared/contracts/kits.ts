import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, line, newId, page, pageQuery, plainDate, text } from './fields.ts'
import { positionRecord } from './kit-kinds.ts'
import { bringBackBody, named, recordFields, retireBody, retiredFilter } from './registry-fields.ts'
import { CREW, KEEPERS, LEADS } from './roles.ts'
import { availability, condition, verdict } from './words.ts'

const params = z.object({ kitId: id })

export const kitBody = z.strictObject({
  designation: line(24, 1),
  kitKindId: id,
  homePlaceId: id.nullable().default(null),
  /** Where the kit is now; null while it is with a holder or nobody knows. */
  placeId: id.nullable().default(null),
  /** Who answers for it and is reminded of what falls due; whoever it is assigned to comes first. */
  responsibleId: id.nullable().default(null),
  sealNumber: line(40, 1).nullable().default(null),
  /** False: the seal is broken or is not the recorded one, and the kit is not proven until counted. */
  sealMatches: z.boolean().default(true),
  notes: text(4000).default(''),
})

const kitFields = {
  id,
  tag: z.string(),
  designation: z.string(),
  kind: z.object({ id, code: z.string(), name: z.string(), station: z.boolean() }),
  homePlace: named.nullable(),
  place: named.nullable(),
  availability,
  availabilityReason: z.string(),
  expectedReturnOn: plainDate.nullable(),
  /** Who has it, where it is assigned to a member. */
  holder: named.nullable(),
  /** Who answers for it while nobody holds it. */
  responsible: named.nullable(),
  /** As of this moment; null until readiness was computed. */
  verdict: verdict.nullable(),
  /** Null: no end in sight, or no verdict. */
  holdsUntil: z.string().nullable(),
  ...recordFields,
}

export const kitRow = z.object({
  ...kitFields,
  /** Items in the kit, and how many its load plan asks for. */
  items: z.int(),
  itemsPlanned: z.int(),
})

export const kitItem = z.object({
  id,
  tag: z.string(),
  designation: z.string(),
  maker: z.string(),
  model: z.string(),
  condition,
  version: z.int(),
})

export const kitRecord = z.object({
  ...kitFields,
  sealNumber: z.string().nullable(),
  sealMatches: z.boolean(),
  notes: z.string(),
  /** The load plan in order, each position with what is in it. */
  positions: z.array(positionRecord.extend({ items: z.array(kitItem) })),
})

export const listKits = defineEndpoint({
  name: 'list-kits',
  method: 'get',
  path: '/api/v1/kits',
  summary: 'Kits, a page at a time',
  access: { scope: 'group', roles: CREW },
  query: z.strictObject({
    ...pageQuery,
    ...retiredFilter,
    sort: z
      .enum(['designation', 'tag', 'kind', 'place', 'availability', 'verdict', 'holdsUntil'])
      .default('designation'),
    kitKindId: id.optional(),
    placeId: id.optional(),
    availability: availability.optional(),
    verdict: verdict.optional(),
  }),
  response: page(kitRow),
})

export const getKit = defineEndpoint({
  name: 'get-kit',
  method: 'get',
  path: '/api/v1/kits/:kitId',
  summary: 'One kit with what is in its positions',
  access: { scope: 'group', roles: CREW },
  params,
  response: kitRecord,
  problems: ['not-found'],
})

export const createKit = defineEndpoint({
  name: 'create-kit',
  method: 'put',
  path: '/api/v1/kits/:kitId',
  summary: 'Add a kit under an id made by the client; its tag is made here',
  access: { scope: 'group', roles: KEEPERS },
  params: z.object({ kitId: newId }),
  body: kitBody,
  response: kitRecord,
  problems: ['request-invalid', 'not-found', 'id-taken', 'already-exists', 'state-conflict'],
})

export const updateKit = defineEndpoint({
  name: 'update-kit',
  method: 'post',
  path: '/api/v1/kits/:kitId',
  summary: 'Change a kit; its kind only while nothing is in it',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: kitBody,
  response: kitRecord,
  problems: [
    'request-invalid',
    'not-found',
    'already-exists',
    'version-stale',
    'version-missing',
    'state-conflict',
  ],
})

export const setKitAvailability = defineEndpoint({
  name: 'set-kit-availability',
  method: 'post',
  path: '/api/v1/kits/:kitId/availability',
  summary: 'Say whether a kit may go: available, assigned or out of service',
  access: { scope: 'group', roles: LEADS },
  versioned: true,
  params,
  body: z
    .strictObject({
      availability,
      reason: line(300).default(''),
      expectedReturnOn: plainDate.nullable().default(null),
      holderId: id.nullable().default(null),
    })
    .refine((body) => body.availability === 'available' || body.reason !== '', {
      path: ['reason'],
      message: 'Say why: who has it, or what is wrong.',
    })
    .refine((body) => body.availability === 'assigned' || body.holderId === null, {
      path: ['holderId'],
      message: 'Only an assigned kit has a holder.',
    })
    .refine((body) => body.availability !== 'available' || body.expectedReturnOn === null, {
      path: ['expectedReturnOn'],
      message: 'An available kit has come back already.',
    }),
  response: kitRecord,
  problems: ['request-invalid', 'not-found', 'version-stale', 'version-missing', 'state-conflict'],
})

export const retireKit = defineEndpoint({
  name: 'retire-kit',
  method: 'post',
  path: '/api/v1/kits/:kitId/retire',
  summary: 'Retire a kit that holds nothing any more',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: retireBody,
  response: kitRecord,
  problems: ['request-invalid', 'not-found', 'version-stale', 'version-missing', 'state-conflict'],
})

export const bringBackKit = defineEndpoint({
  name: 'bring-back-kit',
  method: 'post',
  path: '/api/v1/kits/:kitId/bring-back',
  summary: 'Bring a retired kit back',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: bringBackBody,
  response: kitRecord,
  problems: ['not-found', 'version-stale', 'version-missing', 'state-conflict'],
})
