import type { z } from 'zod'
import type { kitPosition } from '#shared/contracts/kit-readiness.ts'
import { groupBy } from '#shared/engine/group-by.ts'
import type { CheckState } from '#shared/engine/readiness/period-types.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

const TAGS: Statement = { name: 'tags-in-kit', text: 'SELECT id, tag FROM item WHERE kit_id = $1' }

/** The load plan with what is in it and every check that the policy asks of each item. */
export async function kitPositions(
  tx: GroupTx,
  state: KitState,
  checks: readonly CheckState[],
): Promise<z.output<typeof kitPosition>[]> {
  const tags = await tx.sql<{ id: string; tag: string }>(TAGS, [state.kit.id])
  const tagOf = new Map(tags.map((row) => [row.id, row.tag]))
  const itemsOf = groupBy(state.items, (item) => item.positionId)
  const checksOf = groupBy(checks, (check) => check.subjectId)
  return state.positions.map(({ id, name, category, quantity, vital }) => ({
    id,
    name,
    category,
    quantity,
    vital,
    items: (itemsOf.get(id) ?? []).map((item) => ({
      id: item.id,
      designation: item.designation,
      category: item.category,
      tag: tagOf.get(item.id) ?? '',
      condition: item.condition,
      conditionReason: item.conditionReason,
      checks: checksOf.get(item.id) ?? [],
    })),
  }))
}
