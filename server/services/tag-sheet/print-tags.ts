import { v7 as uuidv7 } from 'uuid'
import type { BodyOf } from '#shared/contracts/endpoint.ts'
import type { printTagSheet } from '#shared/contracts/tag-sheets.ts'
import type { AppContext } from '../../context.ts'
import { inGroup, type GroupTx, type Statement } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import type { By } from '../registry/thing.ts'
import { chooseThings, type TaggedThing } from './choose-things.ts'
import { printFormat } from './print-format.ts'
import { renderTags } from './render-tags.ts'

type Body = BodyOf<typeof printTagSheet>

const GROUP: Statement = {
  name: 'group-on-tags',
  text: 'SELECT name, return_address FROM groups WHERE id = $1',
}

const REMEMBER: Statement = {
  name: 'remember-prints',
  text: `INSERT INTO tag_print (id, group_id, kit_id, item_id, printed_at, printed_by)
    SELECT id, $1, kit_id, item_id, $2, $3 FROM unnest($4::uuid[], $5::uuid[], $6::uuid[]) AS p (id, kit_id, item_id)`,
}

/**
 * The PDF of the tags asked for. It is drawn between two transactions, so that no connection waits for it; what went
 * into it is remembered before it is handed out.
 */
export async function printTags(ctx: AppContext, by: By, { selection, format }: Body): Promise<Buffer> {
  const { publicUrl } = ctx.config
  const plan = printFormat(format, publicUrl)
  const { things, address } = await inGroup(ctx, by, async (tx) => ({
    things: await chooseThings(tx, selection),
    address: await addressLine(tx),
  }))
  const pdf = await renderTags({ labels: things, format: plan, publicUrl, address, now: ctx.clock.now() })
  await inGroup(ctx, by, (tx) => remember(tx, things, format))
  return pdf
}

async function addressLine(tx: GroupTx): Promise<string> {
  const [group] = await tx.sql<{ name: string; return_address: string }>(GROUP, [tx.groupId])
  return group?.return_address ? `If found: ${group.return_address}` : `If found: ${group?.name ?? ''}`
}

async function remember(tx: GroupTx, things: readonly TaggedThing[], format: Body['format']): Promise<void> {
  const idOf = (of: TaggedThing['of']) => things.map((thing) => (thing.of === of ? thing.id : null))
  const ids = things.map(() => uuidv7())
  await tx.sql(REMEMBER, [tx.groupId, tx.now, tx.actor.memberId, ids, idOf('kit'), idOf('item')])
  const words = things.length === 1 ? `the tag of ${things[0]!.designation}` : `${things.length} tags`
  await record(tx, {
    action: 'tags-printed',
    subjectType: 'tag-print',
    subjectId: ids[0]!,
    summary: `printed ${words}`,
    after: { format, tags: things.map((thing) => thing.tag) },
  })
}
