import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id } from './fields.ts'
import { checkState } from './readiness-shapes.ts'
import { CREW } from './roles.ts'

export const readItemChecks = defineEndpoint({
  name: 'read-item-checks',
  method: 'get',
  path: '/api/v1/items/:itemId/checks',
  summary: 'Every check that the policy asks of one item, and how each stands now',
  access: { scope: 'group', roles: CREW },
  params: z.strictObject({ itemId: id }),
  /** Empty for what is retired, and where no rule asks for anything. */
  response: z.object({ checks: z.array(checkState) }),
  problems: ['not-found'],
})
