import type { z } from 'zod'
import type { setKitAvailability as contract } from '#shared/contracts/kits.ts'
import { dayText } from '#shared/engine/readiness/words.ts'
import type { AppContext } from '../../context.ts'
import type { Kit } from '../../entities/Kit.ts'
import { inGroup, type GroupTx } from '../../group-transaction.ts'
import { record } from '../audit.ts'
import { rewriteReadiness } from '../rewrite-readiness.ts'
import { changesOf, isEmpty } from './changes.ts'
import { kit } from './kit.ts'
import { lockAt, refuseRetired } from './locks.ts'
import { requireReference } from './references.ts'
import type { By } from './thing.ts'
import { save } from './update-thing.ts'

type Body = z.output<typeof contract.body>
type Answer = z.input<typeof contract.response>

/** People say whether a kit may go, with the reason and when it is expected back; the verdict is another question. */
export function setKitAvailability(
  ctx: AppContext,
  by: By,
  { kitId, version, body }: { kitId: string; version: number; body: Body },
): Promise<Answer> {
  return inGroup(ctx, by, async (tx) => {
    const row = await lockAt(tx, kit, { id: kitId, version })
    refuseRetired(row, row.designation)
    if (await writeAvailability(tx, row, body)) await rewriteReadiness(tx, [kitId])
    return (await kit.read(tx, kitId))!
  })
}

/** Of a locked kit in use, with its trace; false where nothing changes. The caller rewrites the kit's readiness. */
export async function writeAvailability(tx: GroupTx, row: Kit, body: Body): Promise<boolean> {
  const { availability, reason, expectedReturnOn, holderId } = body
  await requireReference(tx, { to: 'member', id: holderId, pointer: '#/holderId', before: row.holderId })
  const columns = { availability, availabilityReason: reason, expectedReturnOn, holderId }
  const changes = changesOf(row, columns)
  if (isEmpty(changes)) return false
  await save(tx, kit, row, columns)
  await record(tx, {
    action: 'kit-availability-set',
    subjectType: 'kit',
    subjectId: row.id,
    kitId: row.id,
    summary: summaryOf(row.designation, body),
    ...changes,
  })
  return true
}

/** "set K-10 to assigned until 5 Nov 2026: training" */
function summaryOf(designation: string, { availability, reason, expectedReturnOn }: Body): string {
  const until = expectedReturnOn ? ` until ${dayText(expectedReturnOn)}` : ''
  const because = reason ? `: ${reason}` : ''
  return `set ${designation} to ${availability.replaceAll('-', ' ')}${until}${because}`
}
