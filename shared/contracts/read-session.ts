import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id } from './fields.ts'
import { ROLES } from './roles.ts'
import { lengthUnit, temperatureUnit } from './unit-choice.ts'

/** Who is signed in here; `member` is null when nobody is. */
export const sessionView = z.object({
  member: z
    .object({
      id,
      name: z.string(),
      callSign: z.string().nullable(),
      /** In force now: a role that needs the password again counts as `volunteer`. */
      roles: z.array(z.enum(ROLES)),
      /** What the member holds: of these, what `roles` lacks needs the password again. */
      heldRoles: z.array(z.enum(ROLES)),
      units: z.object({ temperature: temperatureUnit, length: lengthUnit }),
      group: z.object({
        name: z.string(),
        shortName: z.string(),
        /** IANA name: due dates are days in this zone. */
        timeZone: z.string(),
        demo: z.boolean(),
      }),
    })
    .nullable(),
})

export type SessionView = z.output<typeof sessionView>

export const readSession = defineEndpoint({
  name: 'read-session',
  method: 'get',
  path: '/api/v1/session',
  summary: 'Who is signed in here',
  access: { scope: 'public' },
  response: sessionView,
})
