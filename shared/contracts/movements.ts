import { z } from 'zod'
import { defineEndpoint } from './endpoint.ts'
import { id, line, newId } from './fields.ts'
import { itemRecord } from './items.ts'
import { designated, named } from './registry-fields.ts'
import { CREW } from './roles.ts'

const position = z.strictObject({ kind: z.literal('position'), kitId: id, positionId: id })
const place = z.strictObject({ kind: z.literal('place'), placeId: id })
const nowhere = z.strictObject({ kind: z.literal('nowhere') })

/** Where an item is as its record said when the mover read it. */
export const itemLocation = z.discriminatedUnion('kind', [position, place, nowhere])

export const movementRecord = z.object({
  id,
  itemId: id,
  from: z.object({ kit: designated.nullable(), position: named.nullable(), place: named.nullable() }),
  to: z.object({ kit: designated.nullable(), position: named.nullable(), place: named.nullable() }),
  movedAt: z.string(),
  reason: z.string(),
  /** Null for the system's own work. */
  movedBy: named.nullable(),
})

export const moveItem = defineEndpoint({
  name: 'move-item',
  method: 'post',
  path: '/api/v1/items/:itemId/moves',
  summary:
    'Move an item into a position of a kit, or to a place; the same move sent again is the same success',
  access: { scope: 'group', roles: CREW },
  params: z.object({ itemId: id }),
  body: z.strictObject({
    /** Made by the client: a move that is sent again is stored once. */
    moveId: newId,
    /** If the item is somewhere else by now, the move is refused and nothing changes. */
    from: itemLocation,
    to: z.discriminatedUnion('kind', [position, place]),
    reason: line(300).default(''),
  }),
  response: z.object({ movement: movementRecord, item: itemRecord }),
  problems: ['request-invalid', 'not-found', 'id-taken', 'state-conflict'],
})

export const listItemMoves = defineEndpoint({
  name: 'list-item-moves',
  method: 'get',
  path: '/api/v1/items/:itemId/moves',
  summary: 'Where an item has been, latest first',
  access: { scope: 'group', roles: CREW },
  params: z.object({ itemId: id }),
  query: z.strictObject({
    size: z.coerce.number().int().min(1).max(200).default(25),
    /** `next` of the page before. */
    before: id.optional(),
  }),
  response: z.object({ rows: z.array(movementRecord), next: id.nullable() }),
  problems: ['not-found'],
})
