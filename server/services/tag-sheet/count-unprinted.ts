import type { AppContext } from '../../context.ts'
import { inGroup, type Statement } from '../../group-transaction.ts'
import type { By } from '../registry/thing.ts'

const COUNT: Statement = {
  name: 'count-unprinted-tags',
  text: `SELECT
    (SELECT count(*)::int FROM kit t WHERE t.group_id = $1 AND t.retired_at IS NULL
      AND NOT EXISTS (SELECT FROM tag_print p WHERE p.group_id = $1 AND p.kit_id = t.id)) AS kits,
    (SELECT count(*)::int FROM item t WHERE t.group_id = $1 AND t.retired_at IS NULL
      AND NOT EXISTS (SELECT FROM tag_print p WHERE p.group_id = $1 AND p.item_id = t.id)) AS items`,
}

/** How many kits and items never had a tag printed; retired ones do not count. */
export async function countUnprinted(ctx: AppContext, by: By): Promise<{ kits: number; items: number }> {
  const [row] = await inGroup(ctx, by, (tx) => tx.sql<{ kits: number; items: number }>(COUNT, [tx.groupId]))
  return row!
}
