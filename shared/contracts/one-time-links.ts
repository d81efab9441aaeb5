import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { emailAddress, newPassword } from './people-fields.ts'

/** 256 random bits as the mail carries them. The page reads it behind `#`, which no server log sees. */
const token = z.string().regex(/^[\w-]{43}$/, 'This is not a link of ours.')

export const requestPasswordReset = defineEndpoint({
  name: 'request-password-reset',
  method: 'post',
  path: '/api/v1/password-resets',
  summary: 'Mail a link for a new password; the same answer whether the address is known',
  access: { scope: 'public' },
  body: z.strictObject({ email: emailAddress }),
  status: 202,
  response: z.object({ status: z.literal('accepted') }),
  problems: ['request-invalid', 'too-many-tries'],
})

export const checkOneTimeLink = defineEndpoint({
  name: 'check-one-time-link',
  method: 'post',
  path: '/api/v1/one-time-links/check',
  summary: 'What a mailed link is for; changes nothing',
  access: { scope: 'public' },
  body: z.strictObject({ token }),
  response: z.object({
    purpose: z.enum(['invitation', 'password-reset']),
    memberName: z.string(),
    email: z.string(),
    groupName: z.string(),
  }),
  problems: ['request-invalid', 'link-invalid'],
})

export const useOneTimeLink = defineEndpoint({
  name: 'use-one-time-link',
  method: 'post',
  path: '/api/v1/one-time-links/use',
  summary: 'Set the password by a mailed link, once; all sessions of the member end',
  access: { scope: 'public' },
  body: z.strictObject({ token, newPassword }),
  problems: ['request-invalid', 'link-invalid', 'unavailable'],
})
