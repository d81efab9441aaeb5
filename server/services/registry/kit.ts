import type { z } from 'zod'
import type { kitBody, kitRecord } from '#shared/contracts/kits.ts'
import { KIT_TAG_PREFIX } from '#shared/engine/vocabulary.ts'
import { Kit } from '../../entities/Kit.ts'
import { AppError } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { claimDesignation } from './claim-designation.ts'
import { readKit } from './read-kit.ts'
import { refuseInUse, requireReference } from './references.ts'
import { takeTag } from './take-tag.ts'
import type { Thing } from './thing.ts'

type Body = z.output<typeof kitBody>
type Answer = z.input<typeof kitRecord>

async function check(tx: GroupTx, body: Body, row: Kit | null): Promise<void> {
  const { kitKindId, homePlaceId, placeId, responsibleId } = body
  await requireReference(tx, {
    to: 'kit-kind',
    id: kitKindId,
    pointer: '#/kitKindId',
    before: row?.kitKindId,
  })
  await requireReference(tx, {
    to: 'place',
    id: homePlaceId,
    pointer: '#/homePlaceId',
    before: row?.homePlaceId,
  })
  await requireReference(tx, { to: 'place', id: placeId, pointer: '#/placeId', before: row?.placeId })
  await requireReference(tx, {
    to: 'member',
    id: responsibleId,
    pointer: '#/responsibleId',
    before: row?.responsibleId,
  })
  if (row?.designation !== body.designation) await claimDesignation(tx, 'kit', body.designation)
  if (row && row.kitKindId !== kitKindId && (await itemsIn(tx, row.id)) > 0) {
    throw new AppError('state-conflict', `${row.designation} keeps its kind while something is packed in it.`)
  }
}

const ITEMS_IN: Statement = {
  name: 'items-in-kit',
  text: 'SELECT count(*)::int AS n FROM item WHERE group_id = $1 AND kit_id = $2',
}

async function itemsIn(tx: GroupTx, kitId: string): Promise<number> {
  const [row] = await tx.sql<{ n: number }>(ITEMS_IN, [tx.groupId, kitId])
  return row?.n ?? 0
}

export const kit: Thing<Kit, Body, Answer> = {
  entity: Kit,
  subject: 'kit',
  word: 'kit',
  nameOf: (row) => row.designation,
  columns: (body) => ({ ...body }),
  read: readKit,
  check,
  bornWith: async (tx) => ({ tag: await takeTag(tx, KIT_TAG_PREFIX) }),
  retire: async (tx, row) => {
    refuseInUse(row.designation, { item: await itemsIn(tx, row.id) }, 'Move them out first.')
    return {}
  },
  bringBack: (tx, row) => claimDesignation(tx, 'kit', row.designation),
  kitOf: (row) => row.id,
  dependingKits: async (_tx, row) => [row.id],
}
