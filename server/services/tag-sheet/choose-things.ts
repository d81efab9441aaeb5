import type { z } from 'zod'
import { MAX_LABELS, type tagSelection } from '#shared/contracts/tag-sheets.ts'
import type { Category } from '#shared/engine/vocabulary.ts'
import { AppError, invalidField } from '../../errors.ts'
import type { GroupTx, Statement } from '../../group-transaction.ts'
import { categoryWords } from '../registry/category-words.ts'
import type { Label } from './draw-face.ts'

type Selection = z.output<typeof tagSelection>

/** A kit or an item whose tag is printed. */
export interface TaggedThing extends Label {
  readonly id: string
  readonly of: 'kit' | 'item'
}

interface Row {
  id: string
  of: 'kit' | 'item'
  tag: string
  designation: string
  /** The kit's kind, or the item's category. */
  kind: string
}

const KITS = `SELECT t.id, 'kit' AS of, t.tag, t.designation, k.name AS kind
  FROM kit t JOIN kit_kind k ON k.id = t.kit_kind_id WHERE t.group_id = $1`
const ITEMS = `SELECT t.id, 'item' AS of, t.tag, t.designation, t.category AS kind FROM item t WHERE t.group_id = $1`

const CHOSEN: Statement = {
  name: 'tags-chosen',
  text: `${KITS} AND t.id = ANY($2::uuid[]) UNION ALL ${ITEMS} AND t.id = ANY($3::uuid[])`,
}

const UNPRINTED: Statement = {
  name: 'tags-unprinted',
  text: `SELECT * FROM (
    ${KITS} AND t.retired_at IS NULL AND $2::text <> 'items'
      AND NOT EXISTS (SELECT FROM tag_print p WHERE p.group_id = $1 AND p.kit_id = t.id)
    UNION ALL ${ITEMS} AND t.retired_at IS NULL AND $2::text <> 'kits'
      AND NOT EXISTS (SELECT FROM tag_print p WHERE p.group_id = $1 AND p.item_id = t.id)) AS things LIMIT $3`,
}

/** What is to be printed: kits first, then items, each by designation. `not-found` when one does not exist. */
export async function chooseThings(tx: GroupTx, selection: Selection): Promise<TaggedThing[]> {
  const rows = await read(tx, selection)
  if (rows.length > MAX_LABELS) {
    throw invalidField('#/selection', `At most ${MAX_LABELS} tags in one print: choose fewer.`)
  }
  if (rows.length === 0)
    throw new AppError('state-conflict', 'Every tag was printed before: nothing is left.')
  return rows.map(thingOf).sort(inOrder)
}

async function read(tx: GroupTx, selection: Selection): Promise<Row[]> {
  if (selection.kind === 'unprinted')
    return tx.sql<Row>(UNPRINTED, [tx.groupId, selection.of, MAX_LABELS + 1])
  const { kitIds, itemIds } = selection
  const rows = await tx.sql<Row>(CHOSEN, [tx.groupId, kitIds, itemIds])
  if (rows.length !== kitIds.length + itemIds.length) {
    throw new AppError(
      'not-found',
      'Some of what was chosen does not exist in your group. Nothing was printed.',
    )
  }
  return rows
}

function thingOf(row: Row): TaggedThing {
  if (row.of === 'kit') return row
  const words = categoryWords(row.kind as Category)
  return { ...row, kind: words.charAt(0).toUpperCase() + words.slice(1) }
}

const collator = new Intl.Collator('en', { numeric: true })

function inOrder(one: TaggedThing, other: TaggedThing): number {
  if (one.of !== other.of) return one.of === 'kit' ? -1 : 1
  return collator.compare(one.designation, other.designation)
}
