import { isFailure } from '#shared/engine/outcome.ts'
import { makeTag } from '#shared/engine/tag.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

const NEXT_SERIAL: Statement = {
  name: 'next-tag-serial',
  text: `SELECT nextval('tag_serial')::int AS serial`,
}

/**
 * The next tag of a kind. One sequence serves all kinds and groups and never goes back, so no tag is used twice; a
 * serial whose check character cannot be printed (16 % of them) is passed over.
 */
export async function takeTag(tx: GroupTx, prefix: string): Promise<string> {
  for (;;) {
    const [row] = await tx.sql<{ serial: number }>(NEXT_SERIAL)
    const tag = makeTag(prefix, row!.serial)
    if (isFailure(tag)) throw new Error(tag.message)
    if (tag !== undefined) return tag
  }
}
