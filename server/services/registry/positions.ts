/** The load plan of a kit kind: read in order, written as a whole. */
import type { z } from 'zod'
import type { positionBody, positionRecord } from '#shared/contracts/kit-kinds.ts'
import type { Category } from '#shared/engine/vocabulary.ts'
import { Position } from '../../entities/Position.ts'
import { AppError, invalidField } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { sameContent } from './changes.ts'
import { idTaken } from './duplicates.ts'
import type { Changes } from './thing.ts'

type Body = z.output<typeof positionBody>
type Answer = z.input<typeof positionRecord>

interface Row {
  id: string
  kit_kind_id: string
  ordinal: number
  name: string
  category: Category
  quantity: number
  vital: boolean
  requires: Record<string, unknown>
  removed: boolean
  /** The most items that any one kit has in it. */
  fullest: number
}

const READ: Statement = {
  name: 'read-positions',
  text: `SELECT id, name, category, quantity, vital, requires FROM position
    WHERE group_id = $1 AND kit_kind_id = $2 AND removed_at IS NULL ORDER BY ordinal, id`,
}

const READ_TO_WRITE: Statement = {
  name: 'read-positions-to-write',
  text: `SELECT p.id, p.kit_kind_id, p.ordinal, p.name, p.category, p.quantity, p.vital, p.requires,
      p.removed_at IS NOT NULL AS removed,
      coalesce((SELECT max(n) FROM (SELECT count(*)::int AS n FROM item i
        WHERE i.group_id = p.group_id AND i.position_id = p.id GROUP BY i.kit_id) AS packed), 0) AS fullest
    FROM position p WHERE p.group_id = $1 AND (p.kit_kind_id = $2 OR p.id = ANY($3::uuid[]))`,
}

export async function positionsOf(tx: GroupTx, kitKindId: string): Promise<Answer[]> {
  return tx.sql<Answer>(READ, [tx.groupId, kitKindId])
}

/**
 * Makes the load plan what the list says, in its order. A position that something lies in keeps its category, is not
 * removed and does not shrink below what is in it: `state-conflict` says which.
 */
export async function writePositions(
  tx: GroupTx,
  kitKindId: string,
  list: readonly Body[],
): Promise<Changes | undefined> {
  const ids = list.map((position) => position.id)
  const known = await tx.sql<Row>(READ_TO_WRITE, [tx.groupId, kitKindId, ids])
  const old = known.filter((row) => !row.removed).sort((one, other) => one.ordinal - other.ordinal)
  const before = old.map(bodyOf)
  if (sameContent(before, list)) return undefined
  for (const [index, position] of list.entries()) {
    const row = known.find((candidate) => candidate.id === position.id)
    checkKept(row, position, { kitKindId, index })
    await writeOne(tx, { row, position, kitKindId, ordinal: index + 1 })
  }
  for (const row of old.filter((candidate) => !ids.includes(candidate.id))) await remove(tx, row)
  return { before: { positions: before }, after: { positions: list } }
}

function checkKept(
  row: Row | undefined,
  position: Body,
  { kitKindId, index }: { kitKindId: string; index: number },
): void {
  if (!row) return
  if (row.kit_kind_id !== kitKindId) throw idTaken()
  if (row.fullest === 0) return
  if (row.category !== position.category) {
    throw new AppError('state-conflict', `${row.name} cannot become another category: something lies in it.`)
  }
  if (row.fullest > position.quantity) {
    throw invalidField(`#/positions/${index}/quantity`, `A kit has ${row.fullest} of them packed already.`)
  }
}

async function writeOne(
  tx: GroupTx,
  { row, position, kitKindId, ordinal }: { row?: Row; position: Body; kitKindId: string; ordinal: number },
): Promise<void> {
  const positions = tx.repository(Position)
  const { id, name, category, quantity, vital, requires } = position
  const columns = { ordinal, name, category, quantity, vital, requires, removedAt: null }
  if (!row) await positions.insert({ ...columns, id, kitKindId } as Position)
  else if (row.removed || row.ordinal !== ordinal || !sameContent(bodyOf(row), position)) {
    await positions.update({ id }, columns)
  }
}

async function remove(tx: GroupTx, row: Row): Promise<void> {
  if (row.fullest > 0) {
    throw new AppError(
      'state-conflict',
      `${row.name} cannot be removed: something lies in it. Move that out first.`,
    )
  }
  await tx.repository(Position).update({ id: row.id }, { removedAt: tx.now })
}

const bodyOf = ({ id, name, category, quantity, vital, requires }: Row) => ({
  id,
  name,
  category,
  quantity,
  vital,
  requires,
})
