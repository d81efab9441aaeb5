import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, line, newId, page, pageQuery, text } from './fields.ts'
import { emailAddress, ownFields, rolesOfMember } from './people-fields.ts'
import { ADMINISTRATORS, CREW, ROLES } from './roles.ts'

const params = z.object({ memberId: id })

/** `no-sign-in`: on record without an address. `invited`: has not chosen a password yet. */
export const SIGN_IN_STATES = ['active', 'invited', 'no-sign-in'] as const

export const personRecord = z.object({
  id,
  name: z.string(),
  email: z.string().nullable(),
  phone: z.string().nullable(),
  callSign: z.string().nullable(),
  licenceClass: z.string().nullable(),
  licenceExpiresOn: z.string().nullable(),
  roles: z.array(z.enum(ROLES)),
  notes: z.string(),
  signIn: z.enum(SIGN_IN_STATES),
  wantsReminders: z.boolean(),
  createdAt: z.string(),
  removedAt: z.string().nullable(),
  version: z.int(),
})

const personBody = z.strictObject({
  ...ownFields,
  email: emailAddress.nullable(),
  notes: text(2000).default(''),
})

export const listPeople = defineEndpoint({
  name: 'list-people',
  method: 'get',
  path: '/api/v1/people',
  summary: 'Members with their contacts and roles, a page at a time',
  access: { scope: 'group', roles: ADMINISTRATORS },
  query: z.strictObject({
    ...pageQuery,
    sort: z.enum(['name', 'callSign', 'email', 'licenceExpiresOn', 'createdAt']).default('name'),
    role: z.enum(ROLES).optional(),
    removed: z.enum(['no', 'yes', 'any']).default('no'),
  }),
  response: page(personRecord),
})

export const getPerson = defineEndpoint({
  name: 'get-person',
  method: 'get',
  path: '/api/v1/people/:memberId',
  summary: 'One member',
  access: { scope: 'group', roles: ADMINISTRATORS },
  params,
  response: personRecord,
  problems: ['not-found'],
})

export const invitePerson = defineEndpoint({
  name: 'invite-person',
  method: 'put',
  path: '/api/v1/people/:memberId',
  summary: 'Add a member under an id made by the client, and mail the invitation',
  access: { scope: 'group', roles: ADMINISTRATORS },
  params: z.object({ memberId: newId }),
  body: personBody.extend({ roles: rolesOfMember }),
  response: personRecord,
  problems: ['request-invalid', 'id-taken', 'already-exists'],
})

export const updatePerson = defineEndpoint({
  name: 'update-person',
  method: 'post',
  path: '/api/v1/people/:memberId',
  summary: 'Change a member’s record; a new e-mail address ends their sessions and open links',
  access: { scope: 'group', roles: ADMINISTRATORS },
  versioned: true,
  params,
  body: personBody,
  response: personRecord,
  problems: [
    'request-invalid',
    'not-found',
    'already-exists',
    'state-conflict',
    'version-stale',
    'version-missing',
  ],
})

export const changeRoles = defineEndpoint({
  name: 'change-roles',
  method: 'post',
  path: '/api/v1/people/:memberId/roles',
  summary: 'Set a member’s roles; they hold from the member’s next request on',
  access: { scope: 'group', roles: ADMINISTRATORS },
  versioned: true,
  params,
  body: z.strictObject({ roles: rolesOfMember }),
  response: personRecord,
  problems: ['request-invalid', 'not-found', 'state-conflict', 'version-stale', 'version-missing'],
})

export const inviteAgain = defineEndpoint({
  name: 'invite-again',
  method: 'post',
  path: '/api/v1/people/:memberId/invitations',
  summary: 'Mail a fresh invitation; the one before stops working',
  access: { scope: 'group', roles: ADMINISTRATORS },
  params,
  body: z.strictObject({}),
  response: personRecord,
  problems: ['not-found', 'state-conflict', 'too-many-tries'],
})

export const removePerson = defineEndpoint({
  name: 'remove-person',
  method: 'post',
  path: '/api/v1/people/:memberId/remove',
  summary: 'Remove a member: their sessions end at once, their records stay',
  access: { scope: 'group', roles: ADMINISTRATORS },
  versioned: true,
  params,
  body: z.strictObject({ reason: line(500, 1) }),
  response: personRecord,
  problems: ['request-invalid', 'not-found', 'state-conflict', 'version-stale', 'version-missing'],
})

export const listMembers = defineEndpoint({
  name: 'list-members',
  method: 'get',
  path: '/api/v1/members',
  summary: 'Names and call signs of the members, for choosing a holder',
  access: { scope: 'group', roles: CREW },
  query: z.strictObject(pageQuery),
  response: page(z.object({ id, name: z.string(), callSign: z.string().nullable() })),
})
