import { z } from 'zod'
import { PAPERS, TAG_SIZES } from '#shared/engine/tag-layout.ts'
import { defineEndpoint } from './endpoint.ts'
import { amount, id } from './fields.ts'
import { KEEPERS } from './roles.ts'

/** More than this in one print is refused. */
export const MAX_LABELS = 2000

const unique = (list: readonly string[]) => new Set(list).size === list.length
const chosen = z.array(id).max(1000).refine(unique, 'Name each one once.').default([])

/** What to print: these, or all that never had a tag printed and are not retired. */
export const tagSelection = z.discriminatedUnion('kind', [
  z
    .strictObject({ kind: z.literal('chosen'), kitIds: chosen, itemIds: chosen })
    .refine((value) => value.kitIds.length + value.itemIds.length > 0, 'Choose at least one thing to print.'),
  z.strictObject({ kind: z.literal('unprinted'), of: z.enum(['kits', 'items', 'all']) }),
])

/** On what: a sheet with many cells, or a roll whose every page is one label of the size given, mm. */
export const tagFormat = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('sheet'),
    paper: z.enum(PAPERS),
    size: z.enum(TAG_SIZES),
    /** The first free cell of the first sheet, counted along the rows from 1. */
    startCell: z.int().min(1).max(100).default(1),
    cropMarks: z.boolean().default(false),
  }),
  z.strictObject({ kind: z.literal('roll'), widthMm: amount(20, 120), heightMm: amount(20, 300) }),
])

export const printTagSheet = defineEndpoint({
  name: 'print-tag-sheet',
  method: 'post',
  path: '/api/v1/tag-sheets',
  summary: 'A PDF of QR tags; what was printed is remembered',
  access: { scope: 'group', roles: KEEPERS },
  status: 200,
  media: 'application/pdf',
  body: z.strictObject({ selection: tagSelection, format: tagFormat }),
  problems: ['request-invalid', 'not-found'],
})

/** How many things were never printed, for the button that prints them. */
export const countUnprintedTags = defineEndpoint({
  name: 'count-unprinted-tags',
  method: 'get',
  path: '/api/v1/tag-sheets/unprinted',
  summary: 'How many kits and items never had a tag printed',
  access: { scope: 'group', roles: KEEPERS },
  response: z.object({ kits: z.int(), items: z.int() }),
})
