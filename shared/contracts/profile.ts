import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id } from './fields.ts'
import { lengthUnit, ownFields, temperatureUnit } from './people-fields.ts'
import { ANY_MEMBER, ROLES } from './roles.ts'

export const profileRecord = z.object({
  id,
  name: z.string(),
  /** Changed by an administrator: it is what one signs in with. */
  email: z.string().nullable(),
  phone: z.string().nullable(),
  callSign: z.string().nullable(),
  licenceClass: z.string().nullable(),
  licenceExpiresOn: z.string().nullable(),
  roles: z.array(z.enum(ROLES)),
  temperatureUnit,
  lengthUnit,
  wantsReminders: z.boolean(),
  version: z.int(),
})

export const readProfile = defineEndpoint({
  name: 'read-profile',
  method: 'get',
  path: '/api/v1/profile',
  summary: 'One’s own record',
  access: { scope: 'self', roles: ANY_MEMBER },
  response: profileRecord,
})

export const changeProfile = defineEndpoint({
  name: 'change-profile',
  method: 'post',
  path: '/api/v1/profile',
  summary: 'Change one’s own record',
  access: { scope: 'self', roles: ANY_MEMBER },
  versioned: true,
  body: z.strictObject({ ...ownFields, temperatureUnit, lengthUnit, wantsReminders: z.boolean() }),
  response: profileRecord,
  problems: ['request-invalid', 'version-stale', 'version-missing'],
})
