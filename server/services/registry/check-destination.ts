import type { Category } from '#shared/engine/vocabulary.ts'
import type { Item } from '../../entities/Item.ts'
import { AppError, invalidField, notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { aCategory } from './category-words.ts'
import type { Location } from './location.ts'
import { requireReference } from './references.ts'

const POSITION: Statement = {
  name: 'position-to-fill',
  text: `SELECT k.designation, k.retired_at IS NOT NULL AS retired, p.name, p.category, p.quantity,
      ARRAY(SELECT i.designation FROM item i
        WHERE i.group_id = $1 AND i.kit_id = k.id AND i.position_id = p.id ORDER BY i.designation) AS packed
    FROM kit k JOIN position p ON p.group_id = k.group_id AND p.kit_kind_id = k.kit_kind_id
    WHERE k.group_id = $1 AND k.id = $2 AND p.id = $3 AND p.removed_at IS NULL`,
}

interface PositionRow {
  designation: string
  retired: boolean
  name: string
  category: Category
  quantity: number
  packed: string[]
}

/**
 * Throws unless the item can go there; the kit must be locked. `not-found` for a position that the kit does not have,
 * `request-invalid` for one of another category, `state-conflict` for a full one.
 */
export async function checkDestination(tx: GroupTx, item: Item, to: Location): Promise<void> {
  if (to.placeId !== null) {
    return requireReference(tx, { to: 'place', id: to.placeId, pointer: '#/to/placeId' })
  }
  const [row] = await tx.sql<PositionRow>(POSITION, [tx.groupId, to.kitId, to.positionId])
  if (!row) throw notFound('position')
  if (row.retired)
    throw new AppError('state-conflict', `${row.designation} is retired: nothing is packed in it.`)
  if (row.category !== item.category) {
    throw invalidField(
      '#/to/positionId',
      `${row.name} takes ${aCategory(row.category)}, and ${item.designation} is ${aCategory(item.category)}.`,
    )
  }
  if (row.packed.length >= row.quantity) {
    throw new AppError(
      'state-conflict',
      `${row.name} of ${row.designation} is full: ${row.packed.join(', ')}. Move that out first.`,
    )
  }
}
