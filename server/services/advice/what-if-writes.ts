import { v7 as uuidv7 } from 'uuid'
import type { BodyOf } from '#shared/contracts/endpoint.ts'
import type { doWhatIf as contract } from '#shared/contracts/what-if.ts'
import { doable } from '#shared/engine/advice/doable-steps.ts'
import { findItem } from '#shared/engine/advice/world.ts'
import { Item } from '../../entities/Item.ts'
import { Kit } from '../../entities/Kit.ts'
import { invalidField } from '../../errors.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { insertDecision } from '../evidence/verdict-decisions.ts'
import { auditMove } from '../registry/audit-move.ts'
import { NOWHERE, sameLocation, type Location } from '../registry/location.ts'
import { lockRow } from '../registry/locks.ts'
import { recordMovement } from '../registry/record-movement.ts'
import { requireReference } from '../registry/references.ts'
import { writeAvailability } from '../registry/set-kit-availability.ts'
import type { Question } from './what-if-question.ts'

type Body = BodyOf<typeof contract>

/**
 * Every item goes from where it is to where the steps leave it, in one movement: what was taken out on the way to
 * another kit was never put down. Categories and room were looked at by the steps themselves, under the kits' locks.
 */
export async function writeMoves(tx: GroupTx, { told, atOnce }: Question, body: Body): Promise<void> {
  const ids = doable(told).flatMap((step) =>
    step.kind === 'move' || step.kind === 'take-out' ? [step.itemId] : [],
  )
  for (const id of [...new Set(ids)].sort()) {
    const item = (await lockRow(tx, Item, id))!
    const found = findItem(atOnce, id)!
    const to = found.loose
      ? await putDown(tx, item, body.placeId)
      : { kitId: found.state.kit.id, positionId: found.item.positionId, placeId: null }
    await writeMove(tx, item, { to, reason: body.reason })
  }
}

async function writeMove(
  tx: GroupTx,
  item: Item,
  { to, reason }: { to: Location; reason: string },
): Promise<void> {
  const from = { kitId: item.kitId, positionId: item.positionId, placeId: item.placeId }
  if (sameLocation(from, to)) return
  await recordMovement(tx, { id: uuidv7(), item, to, reason })
  await tx.repository(Item).update({ id: item.id }, { ...to, version: item.version + 1 })
  await auditMove(tx, item, { from, to, reason })
}

/** Where an item lies that ends up in no kit: as it lay before, else at the place given, else where its kit is. */
async function putDown(tx: GroupTx, item: Item, placeId: string | null): Promise<Location> {
  if (item.kitId === null) return { ...NOWHERE, placeId: item.placeId }
  const kit = placeId === null ? await tx.repository(Kit).findOneBy({ id: item.kitId }) : null
  const at = placeId ?? kit?.placeId ?? kit?.homePlaceId ?? null
  if (at === null) {
    throw invalidField('#/placeId', `Say where ${item.designation} is put: its kit has no place.`)
  }
  await requireReference(tx, { to: 'place', id: at, pointer: '#/placeId' })
  return { ...NOWHERE, placeId: at }
}

/** People's word that a kit may go again. */
export async function writeBacks(tx: GroupTx, { told }: Question): Promise<void> {
  for (const step of doable(told)) {
    if (step.kind !== 'back') continue
    const row = (await lockRow(tx, Kit, step.kitId))!
    const available = {
      availability: 'available',
      reason: '',
      expectedReturnOn: null,
      holderId: null,
    } as const
    await writeAvailability(tx, row, available)
  }
}

/** Risks that were accepted for tests that are skipped. */
export async function writeRisks(tx: GroupTx, { before, atOnce }: Question): Promise<void> {
  for (const { kit, decisions } of atOnce.kits.values()) {
    const known = before.kits.get(kit.id)!.decisions
    for (const { kind, toVerdict, reason, until } of decisions.filter((one) => !known.includes(one))) {
      const untilAt = until === null ? null : new Date(until)
      await insertDecision(tx, { id: uuidv7(), kit, kind, toVerdict, reason, untilAt })
    }
  }
}
