import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { newId } from './fields.ts'
import { ADMINISTRATORS } from './roles.ts'
import { answeredAt } from './words.ts'

const params = z.strictObject({ token: z.string().max(200) })
const choice = z.object({ memberName: z.string(), groupName: z.string(), wantsReminders: z.boolean() })

/** What the link in a reminder opens: no session needed, and nothing else is reached by it. */
export const readReminderLink = defineEndpoint({
  name: 'read-reminder-link',
  method: 'get',
  path: '/api/v1/reminder-links/:token',
  summary: 'Whose reminders a link is about, and whether they come',
  access: { scope: 'public' },
  params,
  response: choice,
  problems: ['link-invalid'],
})

export const changeReminderLink = defineEndpoint({
  name: 'change-reminder-link',
  method: 'post',
  path: '/api/v1/reminder-links/:token',
  summary: 'Start or stop the reminders of the member whom a link belongs to',
  access: { scope: 'public' },
  params,
  body: z.strictObject({ wantsReminders: z.boolean() }),
  response: choice,
  problems: ['link-invalid'],
})

/** RFC 8058: posted by mail programs without a session, any number of times, never redirected. */
export const stopReminders = defineEndpoint({
  name: 'stop-reminders',
  method: 'post',
  path: '/api/v1/reminder-links/:token/stop',
  summary: 'One-click unsubscribe from reminders',
  access: { scope: 'public' },
  params,
  problems: ['link-invalid'],
})

/** Mails that the mail server refused, and jobs that failed for good. */
export const listUndelivered = defineEndpoint({
  name: 'list-undelivered',
  method: 'get',
  path: '/api/v1/undelivered',
  summary: 'Mail that could not be delivered and work that failed for good',
  access: { scope: 'group', roles: ADMINISTRATORS },
  response: z.object({
    mails: z.array(
      z.object({
        id: newId,
        memberName: z.string().nullable(),
        recipient: z.string(),
        subject: z.string(),
        queuedAt: answeredAt,
        tries: z.int(),
        lastError: z.string(),
        givenUpAt: answeredAt.nullable(),
      }),
    ),
    jobs: z.array(z.object({ id: z.string(), work: z.string(), failedAt: answeredAt })),
  }),
})
