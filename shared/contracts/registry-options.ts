import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id } from './fields.ts'
import { BUILT_CATEGORIES } from './item-details.ts'
import { positionRecord } from './kit-kinds.ts'
import { named } from './registry-fields.ts'
import { CREW } from './roles.ts'

export const getRegistryOptions = defineEndpoint({
  name: 'get-registry-options',
  method: 'get',
  path: '/api/v1/registry/options',
  summary: 'The short lists that forms choose from; nothing that is retired',
  access: { scope: 'group', roles: CREW },
  response: z.object({
    kitKinds: z.array(
      z.object({
        id,
        code: z.string(),
        name: z.string(),
        positions: z.array(positionRecord.omit({ requires: true })),
      }),
    ),
    places: z.array(named),
    buildSheets: z.array(named.extend({ category: z.enum(BUILT_CATEGORIES) })),
    batches: z.array(named.extend({ buildSheetId: id })),
    members: z.array(named.extend({ callSign: z.string().nullable() })),
  }),
})
