import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, page } from './fields.ts'
import { emailAddress, givenPassword, newPassword } from './people-fields.ts'
import { sessionView } from './read-session.ts'
import { ANY_MEMBER } from './roles.ts'

// Every page asks who is signed in; the rest of this family waits until it is wanted.
export { readSession, sessionView, type SessionView } from './read-session.ts'

export const signIn = defineEndpoint({
  name: 'sign-in',
  method: 'post',
  path: '/api/v1/sign-in',
  summary: 'Sign in with an e-mail address and a password',
  access: { scope: 'public' },
  body: z.strictObject({
    email: emailAddress,
    password: givenPassword,
    /** The member's own device stays signed in for up to 90 days; any other for at most a day. */
    ownDevice: z.boolean().default(false),
  }),
  response: sessionView,
  problems: ['request-invalid', 'sign-in-refused', 'too-many-tries', 'unavailable'],
})

export const signOut = defineEndpoint({
  name: 'sign-out',
  method: 'post',
  path: '/api/v1/sign-out',
  summary: 'End this session; the same success when there is none',
  access: { scope: 'public' },
})

export const signOutEverywhere = defineEndpoint({
  name: 'sign-out-everywhere',
  method: 'post',
  path: '/api/v1/sign-out-everywhere',
  summary: 'End all of one’s own sessions, this one too',
  access: { scope: 'self', roles: ANY_MEMBER },
})

export const confirmPassword = defineEndpoint({
  name: 'confirm-password',
  method: 'post',
  path: '/api/v1/session/password',
  summary: 'Give the password again, for rights that need a fresh one; the session goes on under a new id',
  access: { scope: 'self', roles: ANY_MEMBER },
  body: z.strictObject({ password: givenPassword }),
  response: sessionView,
  problems: ['request-invalid', 'too-many-tries', 'unavailable'],
})

export const changePassword = defineEndpoint({
  name: 'change-password',
  method: 'put',
  path: '/api/v1/password',
  summary: 'Change one’s own password; all other sessions end',
  access: { scope: 'self', roles: ANY_MEMBER },
  body: z.strictObject({ password: givenPassword, newPassword }),
  problems: ['request-invalid', 'too-many-tries', 'unavailable'],
})

export const listSessions = defineEndpoint({
  name: 'list-sessions',
  method: 'get',
  path: '/api/v1/sessions',
  summary: 'Where one is signed in, latest use first',
  access: { scope: 'self', roles: ANY_MEMBER },
  response: page(
    z.object({
      id,
      /** The session of this request. */
      current: z.boolean(),
      /** The browser's description of itself. */
      device: z.string(),
      address: z.string(),
      ownDevice: z.boolean(),
      signedInAt: z.string(),
      /** To within ten minutes. */
      seenAt: z.string(),
      endsAt: z.string(),
    }),
  ),
})

export const endSession = defineEndpoint({
  name: 'end-session',
  method: 'delete',
  path: '/api/v1/sessions/:sessionId',
  summary: 'End one of one’s own sessions',
  access: { scope: 'self', roles: ANY_MEMBER },
  params: z.object({ sessionId: id }),
  problems: ['not-found'],
})
