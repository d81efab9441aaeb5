import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { LEADS } from './roles.ts'
import { answeredAt } from './words.ts'

/** Names people with what hangs on them: for those who answer for the group, not for everybody in it. */
export const readSinglePoints = defineEndpoint({
  name: 'read-single-points',
  method: 'get',
  path: '/api/v1/single-points',
  summary: 'What the group has only one of: one key holder, one instrument, one person who can',
  access: { scope: 'group', roles: LEADS },
  response: z.object({
    at: answeredAt,
    points: z.array(
      z.object({
        kind: z.enum(['key', 'instrument', 'charger', 'tester', 'role', 'operator']),
        text: z.string(),
        /** What to do about it. */
        todo: z.string(),
      }),
    ),
  }),
})
