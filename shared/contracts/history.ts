import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id } from './fields.ts'
import { CREW } from './roles.ts'

/** What has a history page of its own. A kit's shows what happened to the things in it too. */
export const HISTORY_SUBJECTS = [
  'kit',
  'item',
  'place',
  'kit-kind',
  'build-sheet',
  'batch',
  'consumable',
  'policy',
] as const

export const historyEntry = z.object({
  id: z.string(),
  at: z.string(),
  /** The name as it was then. */
  actor: z.string(),
  memberId: id.nullable(),
  action: z.string(),
  subjectType: z.string().nullable(),
  subjectId: id.nullable(),
  /** A sentence without its actor. */
  summary: z.string(),
  /** The changed fields only. */
  before: z.record(z.string(), z.unknown()).nullable(),
  after: z.record(z.string(), z.unknown()).nullable(),
})

export const listHistory = defineEndpoint({
  name: 'list-history',
  method: 'get',
  path: '/api/v1/history/:subjectType/:subjectId',
  summary: 'Who changed what about one thing, latest first',
  access: { scope: 'group', roles: CREW },
  params: z.object({ subjectType: z.enum(HISTORY_SUBJECTS), subjectId: id }),
  query: z.strictObject({
    size: z.coerce.number().int().min(1).max(200).default(25),
    /** `next` of the page before. */
    before: z
      .string()
      .regex(/^\d{1,18}$/)
      .optional(),
  }),
  response: z.object({ rows: z.array(historyEntry), next: z.string().nullable() }),
  problems: ['not-found'],
})
