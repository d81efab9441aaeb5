import { AppError } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

const LOCK: Statement = {
  name: 'lock-designation',
  text: `SELECT pg_advisory_xact_lock(hashtextextended($1::text || lower($2), 1))`,
}

const TAKEN: Readonly<Record<'kit' | 'item', Statement>> = {
  kit: {
    name: 'designation-of-item',
    text: `SELECT 1 FROM item WHERE group_id = $1 AND lower(designation) = lower($2) AND retired_at IS NULL`,
  },
  item: {
    name: 'designation-of-kit',
    text: `SELECT 1 FROM kit WHERE group_id = $1 AND lower(designation) = lower($2)`,
  },
}

/**
 * A designation said aloud means one thing: no kit is called like an item. Within kits and within items a unique index
 * sees to it; between the two this does, with a lock that lasts to the end of the transaction.
 */
export async function claimDesignation(
  tx: GroupTx,
  kind: 'kit' | 'item',
  designation: string,
): Promise<void> {
  await tx.sql(LOCK, [tx.groupId, designation])
  const [taken] = await tx.sql(TAKEN[kind], [tx.groupId, designation])
  if (!taken) return
  const detail = `${kind === 'kit' ? 'An item' : 'A kit'} has that designation already.`
  throw new AppError('already-exists', detail, { errors: [{ pointer: '#/designation', detail }] })
}
