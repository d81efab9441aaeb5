import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { amount, id, line, newId, page, pageQuery } from './fields.ts'
import { bringBackBody, recordFields, retireBody, retiredFilter } from './registry-fields.ts'
import { CREW, KEEPERS } from './roles.ts'

const params = z.object({ placeId: id })

/** Where kits and items live. Temperatures are the range over a year, °C. */
export const placeBody = z
  .strictObject({
    name: line(120, 1),
    kind: line(80).default(''),
    minC: amount(-60, 70).multipleOf(0.1).nullable().default(null),
    maxC: amount(-60, 70).multipleOf(0.1).nullable().default(null),
    access: line(500).default(''),
    keyHolders: line(500).default(''),
  })
  .refine((place) => place.minC === null || place.maxC === null || place.minC <= place.maxC, {
    path: ['maxC'],
    message: 'The warmest must not be below the coldest.',
  })

export const placeRecord = z.object({
  id,
  name: z.string(),
  kind: z.string(),
  minC: z.number().nullable(),
  maxC: z.number().nullable(),
  access: z.string(),
  keyHolders: z.string(),
  /** Kits that are there now. */
  kits: z.int(),
  /** Loose items that are there now; what is packed in a kit counts with its kit. */
  items: z.int(),
  ...recordFields,
})

export const listPlaces = defineEndpoint({
  name: 'list-places',
  method: 'get',
  path: '/api/v1/places',
  summary: 'Places, a page at a time',
  access: { scope: 'group', roles: CREW },
  query: z.strictObject({
    ...pageQuery,
    ...retiredFilter,
    sort: z.enum(['name', 'kind', 'kits', 'items']).default('name'),
  }),
  response: page(placeRecord),
})

export const getPlace = defineEndpoint({
  name: 'get-place',
  method: 'get',
  path: '/api/v1/places/:placeId',
  summary: 'One place',
  access: { scope: 'group', roles: CREW },
  params,
  response: placeRecord,
  problems: ['not-found'],
})

export const createPlace = defineEndpoint({
  name: 'create-place',
  method: 'put',
  path: '/api/v1/places/:placeId',
  summary: 'Add a place under an id made by the client',
  access: { scope: 'group', roles: KEEPERS },
  params: z.object({ placeId: newId }),
  body: placeBody,
  response: placeRecord,
  problems: ['request-invalid', 'id-taken', 'already-exists'],
})

export const updatePlace = defineEndpoint({
  name: 'update-place',
  method: 'post',
  path: '/api/v1/places/:placeId',
  summary: 'Change a place',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: placeBody,
  response: placeRecord,
  problems: [
    'request-invalid',
    'not-found',
    'already-exists',
    'version-stale',
    'version-missing',
    'state-conflict',
  ],
})

export const retirePlace = defineEndpoint({
  name: 'retire-place',
  method: 'post',
  path: '/api/v1/places/:placeId/retire',
  summary: 'Retire a place that holds nothing any more',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: retireBody,
  response: placeRecord,
  problems: ['request-invalid', 'not-found', 'version-stale', 'version-missing', 'state-conflict'],
})

export const bringBackPlace = defineEndpoint({
  name: 'bring-back-place',
  method: 'post',
  path: '/api/v1/places/:placeId/bring-back',
  summary: 'Bring a retired place back',
  access: { scope: 'group', roles: KEEPERS },
  versioned: true,
  params,
  body: bringBackBody,
  response: placeRecord,
  problems: ['not-found', 'already-exists', 'version-stale', 'version-missing', 'state-conflict'],
})
