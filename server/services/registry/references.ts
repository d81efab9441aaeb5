/** References of one record to another: they must exist in the group and must not be retired. */
import { AppError, invalidField, notFound } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'

const TABLES = {
  place: { word: 'place', table: 'place', gone: 'retired_at' },
  'kit-kind': { word: 'kit kind', table: 'kit_kind', gone: 'retired_at' },
  'build-sheet': { word: 'build sheet', table: 'build_sheet', gone: 'retired_at' },
  batch: { word: 'batch', table: 'batch', gone: 'retired_at' },
  member: { word: 'member', table: 'member', gone: 'removed_at' },
} as const

interface Reference {
  readonly to: keyof typeof TABLES
  readonly id: string | null
  /** The field of the body that holds it. */
  readonly pointer: string
  /** What the record referred to before: that may stay although it was retired since. */
  readonly before?: string | null
}

/**
 * Throws `not-found` when there is no such thing in the group, `request-invalid` when it is retired. The row is locked
 * for share until the end of the transaction, so that it cannot be retired in between.
 */
export async function requireReference(tx: GroupTx, { to, id, pointer, before }: Reference): Promise<void> {
  if (id === null || id === before) return
  const { word } = TABLES[to]
  const [row] = await tx.sql<{ gone: boolean }>(statement(to), [tx.groupId, id])
  if (!row) throw notFound(word)
  if (row.gone)
    throw invalidField(pointer, `That ${word} is ${to === 'member' ? 'not a member any more' : 'retired'}.`)
}

function statement(to: keyof typeof TABLES): Statement {
  const { table, gone } = TABLES[to]
  return {
    name: `require-${to}`,
    text: `SELECT ${gone} IS NOT NULL AS gone FROM ${table} WHERE group_id = $1 AND id = $2 FOR SHARE`,
  }
}

/** Throws `state-conflict` when a count is not zero: "Station 4 Cage still holds 3 items. Move them first." */
export function refuseInUse(name: string, uses: Readonly<Record<string, number>>, advice: string): void {
  const parts = Object.entries(uses)
    .filter(([, count]) => count > 0)
    .map(([word, count]) => `${count} ${count === 1 ? word : `${word}s`}`)
  if (parts.length > 0)
    throw new AppError('state-conflict', `${name} still has ${parts.join(' and ')}. ${advice}`)
}
