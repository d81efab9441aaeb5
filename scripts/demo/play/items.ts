import { createItem, updateItem, type itemRecord } from '#shared/contracts/items.ts'
import { INSTRUMENT_CATEGORIES, type Category, type Condition } from '#shared/engine/vocabulary.ts'
import { moveItem } from '#server/services/registry/move-item.ts'
import { items } from '#server/services/registry/use-cases.ts'
import type { z } from 'zod'
import type { DemoItem } from '../items.ts'
import { kitOf } from '../kits.ts'
import type { PlaceKey } from '../places.ts'
import { memberId } from './people.ts'
import { named } from './registry.ts'
import type { Location, Stage } from './stage.ts'

const WITH_SERIAL: ReadonlySet<Category> = new Set([
  'radio',
  'battery',
  'charger',
  'computer',
  'interface',
  'filter',
  ...INSTRUMENT_CATEGORIES,
])

/** Must come back whatever it costs. */
const ACCOUNTABLE: ReadonlySet<Category> = new Set(['radio', 'computer', ...INSTRUMENT_CATEGORIES])

const MAKERS = ['Maker A', 'Maker B', 'Maker C'] as const

/** New things lie in P1; what a member lent stays with the member. */
export async function addItem(stage: Stage, { item }: { item: DemoItem }): Promise<void> {
  const { ctx, by, ids, now, calendar, where } = stage
  const { designation, details, buildSheet, batch, owner } = item
  const placeId = owner === null ? ids.of(named.place('P1')) : null
  const body = createItem.body.parse({
    designation,
    details,
    ...provenance(item),
    accountability: ACCOUNTABLE.has(details.category) ? 'accountable' : 'durable',
    ownerId: owner && memberId(stage, owner),
    buildSheetId: buildSheet && ids.of(named.sheet(buildSheet)),
    batchId: batch && ids.of(named.batch(batch)),
    acquiredOn: calendar.day(item.acquiredOn),
    placeId,
  })
  await items.create(ctx, by, { id: ids.make(designation, now), body })
  where.set(designation, placeId === null ? { kind: 'nowhere' } : { kind: 'place', placeId })
}

function provenance({ designation, details: { category }, buildSheet }: DemoItem) {
  if (buildSheet !== null) return { maker: 'Our own bench' }
  const maker = MAKERS[designation.charCodeAt(0) % MAKERS.length]
  return { maker, serial: WITH_SERIAL.has(category) ? `DEMO-${designation.replace('-', '')}` : null }
}

export async function pack(
  stage: Stage,
  { item, kit, position, reason = '' }: { item: string; kit: string; position: string; reason?: string },
): Promise<void> {
  const { ids } = stage
  const positionId = ids.of(named.position(kitOf(kit).kind, position))
  await move(stage, item, { to: { kind: 'position', kitId: ids.of(kit), positionId }, reason })
}

export async function shelve(
  stage: Stage,
  { item, place, reason }: { item: string; place: PlaceKey; reason: string },
): Promise<void> {
  await move(stage, item, { to: { kind: 'place', placeId: stage.ids.of(named.place(place)) }, reason })
}

async function move(
  { ctx, by, ids, now, where }: Stage,
  item: string,
  { to, reason }: { to: Exclude<Location, { kind: 'nowhere' }>; reason: string },
): Promise<void> {
  const from = where.get(item)
  if (!from) throw new Error(`${item} is not there`)
  const moveId = ids.make(`move ${item} ${now.toISOString()}`, now)
  await moveItem(ctx, by, { itemId: ids.of(item), moveId, from, to, reason })
  where.set(item, to)
}

export async function setCondition(
  stage: Stage,
  { item, condition, reason }: { item: string; condition: Condition; reason: string },
): Promise<void> {
  const { ctx, by, ids } = stage
  const id = ids.of(item)
  const record = await items.get(ctx, by, id)
  const body = { ...bodyOf(record), condition, conditionReason: reason }
  await items.update(ctx, by, { id, version: record.version, body: updateItem.body.parse(body) })
}

/** The record as a form would send it back. */
function bodyOf(record: z.input<typeof itemRecord>): z.input<typeof updateItem.body> {
  const { designation, maker, model, serial, accountability, condition, conditionReason } = record
  const { acquiredOn, weightKg, notes, details, owner, batch, buildSheet } = record
  return {
    ...{ designation, maker, model, serial, accountability, condition, conditionReason },
    ...{ acquiredOn, weightKg, notes, details },
    ownerId: owner?.id ?? null,
    batchId: batch?.id ?? null,
    buildSheetId: buildSheet?.id ?? null,
  }
}

export async function retireItem(
  { ctx, by, ids, where }: Stage,
  { item, reason }: { item: string; reason: string },
): Promise<void> {
  const id = ids.of(item)
  const { version } = await items.get(ctx, by, id)
  await items.retire(ctx, by, { id, version, reason })
  where.delete(item)
}
