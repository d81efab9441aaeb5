import type { Item } from '../../entities/Item.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import type { Location } from './location.ts'

const NAMES: Statement = {
  name: 'names-of-location',
  text: `SELECT (SELECT designation FROM kit WHERE group_id = $1 AND id = $2) AS kit,
    (SELECT name FROM position WHERE group_id = $1 AND id = $3) AS position,
    (SELECT name FROM place WHERE group_id = $1 AND id = $4) AS place`,
}

interface Names {
  kit: string | null
  position: string | null
  place: string | null
}

interface Move {
  readonly from: Location
  readonly to: Location
  readonly reason: string
}

/** The move on the item's page and on the pages of both kits; the kit that lost the item gets an entry of its own. */
export async function auditMove(tx: GroupTx, item: Item, { from, to, reason }: Move): Promise<void> {
  const [before, after] = await Promise.all([namesOf(tx, from), namesOf(tx, to)])
  const words = `moved ${item.designation} from ${wordsOf(before)} to ${wordsOf(after)}`
  const summary = reason ? `${words}: ${reason}` : words
  const fields = { before, after: reason ? { ...after, reason } : after }
  const left = from.kitId !== null && from.kitId !== to.kitId
  await record(tx, {
    action: 'item-moved',
    subjectType: 'item',
    subjectId: item.id,
    kitId: to.kitId ?? from.kitId,
    summary,
    ...fields,
  })
  if (!left || to.kitId === null) return
  await record(tx, {
    action: 'item-left',
    subjectType: 'kit',
    subjectId: from.kitId!,
    kitId: from.kitId,
    summary,
    ...fields,
  })
}

async function namesOf(tx: GroupTx, { kitId, positionId, placeId }: Location): Promise<Names> {
  const [row] = await tx.sql<Names>(NAMES, [tx.groupId, kitId, positionId, placeId])
  return { kit: row?.kit ?? null, position: row?.position ?? null, place: row?.place ?? null }
}

function wordsOf({ kit, place }: Names): string {
  return kit ?? place ?? 'nowhere known'
}
