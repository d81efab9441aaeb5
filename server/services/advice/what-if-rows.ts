import type { BodyOf } from '#shared/contracts/endpoint.ts'
import type { doWhatIf as contract, WhatIfDone } from '#shared/contracts/what-if.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { sameContent } from '../registry/changes.ts'
import { idTaken, namingDuplicates } from '../registry/duplicates.ts'

type Body = BodyOf<typeof contract>

interface Row {
  [column: string]: unknown
  id: string
  steps: Body['steps']
  reason: string
  place_id: string | null
  done: WhatIfDone['done']
  notes: WhatIfDone['notes']
  kits: WhatIfDone['kits']
  done_at: Date
  done_by: string | null
}

const SELECT = `SELECT w.id, w.steps, w.reason, w.place_id, w.done, w.notes, w.kits, w.done_at, m.name AS done_by
  FROM what_if w LEFT JOIN member m ON m.id = w.done_by`
const READ: Statement = { name: 'read-what-if', text: `${SELECT} WHERE w.group_id = $1 AND w.id = $2` }
const LATEST: Statement = {
  name: 'latest-what-ifs',
  text: `${SELECT} WHERE w.group_id = $1 ORDER BY w.done_at DESC, w.id DESC LIMIT 20`,
}
const INSERT: Statement = {
  name: 'insert-what-if',
  text: `INSERT INTO what_if (id, group_id, steps, reason, place_id, done, notes, kits, done_at, done_by)
    VALUES ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10)`,
}

interface NewWhatIf extends Pick<WhatIfDone, 'id' | 'done' | 'notes' | 'kits'> {
  readonly body: Body
}

export async function insertWhatIf(tx: GroupTx, { id, body, done, notes, kits }: NewWhatIf): Promise<void> {
  const lists = [done, notes, kits].map((list) => JSON.stringify(list))
  const values = [id, tx.groupId, JSON.stringify(body.steps), body.reason, body.placeId, ...lists]
  await namingDuplicates(() => tx.sql(INSERT, [...values, tx.now, tx.actor.memberId]))
}

export async function readWhatIf(tx: GroupTx, id: string): Promise<WhatIfDone | null> {
  const [row] = await tx.sql<Row>(READ, [tx.groupId, id])
  return row ? shown(row) : null
}

/** The one that was done under this id before, if it is the same; `id-taken` if it is another. */
export async function sameWhatIf(tx: GroupTx, id: string, body: Body): Promise<WhatIfDone | null> {
  const [row] = await tx.sql<Row>(READ, [tx.groupId, id])
  if (!row) return null
  const { steps, reason, placeId } = body
  if (
    sameContent({ steps: row.steps, reason: row.reason, placeId: row.place_id }, { steps, reason, placeId })
  )
    return shown(row)
  throw idTaken()
}

export async function listWhatIfs(tx: GroupTx): Promise<{ rows: WhatIfDone[] }> {
  return { rows: (await tx.sql<Row>(LATEST, [tx.groupId])).map(shown) }
}

function shown({ id, reason, done, notes, kits, done_at: doneAt, done_by: doneBy }: Row): WhatIfDone {
  return { id, reason, done, notes, kits, doneAt: doneAt.toISOString(), doneBy: doneBy ?? '' }
}
