import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'

export const healthCheck = defineEndpoint({
  name: 'health-check',
  method: 'get',
  path: '/healthz',
  summary: 'The process answers',
  access: { scope: 'public' },
  response: z.object({ status: z.literal('ok') }),
})

export const readyCheck = defineEndpoint({
  name: 'ready-check',
  method: 'get',
  path: '/readyz',
  summary: 'The process can serve: the database answers',
  access: { scope: 'public' },
  response: z.object({ status: z.literal('ready') }),
  problems: ['unavailable'],
})
