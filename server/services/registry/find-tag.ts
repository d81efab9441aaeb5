import type { z } from 'zod'
import type { findTag as contract } from '#shared/contracts/tags.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { verifyTag } from '#shared/engine/tag.ts'
import type { AppContext } from '../../context.ts'
import { AppError, invalidField } from '../../errors.ts'
import { inGroup, type Statement } from '../../group-transaction.ts'
import type { By } from './thing.ts'

type Answer = z.input<typeof contract.response>

const FIND: Statement = {
  name: 'find-tag',
  text: `SELECT 'kit' AS kind, id, tag, designation, retired_at IS NOT NULL AS retired
      FROM kit WHERE group_id = $1 AND tag = $2
    UNION ALL SELECT 'item', id, tag, designation, retired_at IS NOT NULL FROM item WHERE group_id = $1 AND tag = $2`,
}

/** What carries a tag, from how it was typed, scanned or heard. `request-invalid` when it was read wrong. */
export async function findTag(ctx: AppContext, by: By, input: string): Promise<Answer> {
  const tag = verifyTag(input)
  if (isFailure(tag)) throw invalidField('#/tag', tag.message)
  const [row] = await inGroup(ctx, by, (tx) => tx.sql<Answer>(FIND, [tx.groupId, tag]))
  if (!row) throw new AppError('not-found', `Nothing in your group carries the tag ${tag}.`)
  return row
}
