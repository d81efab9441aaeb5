import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { ANY_MEMBER } from './roles.ts'

/** `data:` of every `board` event: fetch the board again when `revision` is newer than what is on the screen. */
export const boardEvent = z.object({
  revision: z.int(),
  /** The kits whose periods changed; empty: too many to name. */
  kitIds: z.array(z.string()),
})

/** `text/event-stream`; comments keep it alive every 20 s; it ends when the session ends. */
export const followBoard = defineEndpoint({
  name: 'follow-board',
  method: 'get',
  path: '/api/v1/live',
  summary: 'Server-sent events: the board of the group has changed',
  access: { scope: 'group', roles: ANY_MEMBER },
  response: boardEvent,
})

export type BoardEvent = z.output<typeof boardEvent>
