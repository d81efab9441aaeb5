import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id } from './fields.ts'
import { CREW } from './roles.ts'

export const findTag = defineEndpoint({
  name: 'find-tag',
  method: 'get',
  path: '/api/v1/tags/:tag',
  summary: 'The thing that carries a tag, however the tag was typed or read out',
  access: { scope: 'group', roles: CREW },
  params: z.object({ tag: z.string() }),
  response: z.object({
    kind: z.enum(['kit', 'item']),
    id,
    /** As it is stored and printed. */
    tag: z.string(),
    designation: z.string(),
    retired: z.boolean(),
  }),
  problems: ['request-invalid', 'not-found'],
})
