import type { z } from 'zod'
import type { itemBody, newItemBody } from '#shared/contracts/items.ts'
import type { Category } from '#shared/engine/vocabulary.ts'
import type { Item } from '../../entities/Item.ts'
import { invalidField } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { aCategory } from './category-words.ts'
import { claimDesignation } from './claim-designation.ts'
import { requireReference } from './references.ts'

type Body = z.output<typeof itemBody> & Partial<Pick<z.output<typeof newItemBody>, 'placeId'>>

/** What an item must agree with: its category for good, its owner, its build sheet and its batch. */
export async function checkItem(tx: GroupTx, body: Body, row: Item | null): Promise<void> {
  if (row && row.category !== body.details.category) {
    throw invalidField(
      '#/details/category',
      'An item keeps its category: its tag says it. Retire it and add another.',
    )
  }
  const { placeId = null, ownerId, buildSheetId, batchId } = body
  await requireReference(tx, { to: 'place', id: placeId, pointer: '#/placeId' })
  await requireReference(tx, { to: 'member', id: ownerId, pointer: '#/ownerId', before: row?.ownerId })
  const pointer = '#/buildSheetId'
  await requireReference(tx, { to: 'build-sheet', id: buildSheetId, pointer, before: row?.buildSheetId })
  await requireReference(tx, { to: 'batch', id: batchId, pointer: '#/batchId', before: row?.batchId })
  await checkBuild(tx, body)
  if (row?.designation !== body.designation) await claimDesignation(tx, 'item', body.designation)
}

const BUILD: Statement = {
  name: 'build-of-item',
  text: `SELECT s.category, b.build_sheet_id = s.id AS agrees
    FROM build_sheet s LEFT JOIN batch b ON b.group_id = s.group_id AND b.id = $3
    WHERE s.group_id = $1
      AND s.id = coalesce($2, (SELECT build_sheet_id FROM batch WHERE group_id = $1 AND id = $3))`,
}

async function checkBuild(tx: GroupTx, { buildSheetId, batchId, details }: Body): Promise<void> {
  if (buildSheetId === null && batchId === null) return
  const [build] = await tx.sql<{ category: Category; agrees: boolean | null }>(BUILD, [
    tx.groupId,
    buildSheetId,
    batchId,
  ])
  const pointer = buildSheetId === null ? '#/batchId' : '#/buildSheetId'
  if (build && build.category !== details.category) {
    throw invalidField(
      pointer,
      `That is how ${aCategory(build.category)} is made, and this is ${aCategory(details.category)}.`,
    )
  }
  if (batchId !== null && !build?.agrees) {
    throw invalidField('#/batchId', 'That batch was made by another build sheet.')
  }
}
