import { batchBody } from '#shared/contracts/batches.ts'
import { buildSheetBody } from '#shared/contracts/build-sheets.ts'
import { kitKindBody } from '#shared/contracts/kit-kinds.ts'
import { createKit } from '#shared/contracts/kits.ts'
import { createPlace } from '#shared/contracts/places.ts'
import * as registry from '#server/services/registry/use-cases.ts'
import { BATCHES, BUILD_SHEETS, TRANSFORMERS, type BatchKey, type BuildKey } from '../builds.ts'
import { KIT_KINDS, type DemoKind, type KindCode } from '../kit-kinds.ts'
import { kitOf } from '../kits.ts'
import { PLACES, type PlaceKey } from '../places.ts'
import { memberId } from './people.ts'
import type { Stage } from './stage.ts'

/** The names that ids are kept under. */
export const named = {
  place: (place: PlaceKey) => `place ${place}`,
  kind: (kind: KindCode) => `kind ${kind}`,
  position: (kind: KindCode, position: string) => `position ${kind} ${position}`,
  sheet: (sheet: BuildKey) => `build sheet ${sheet}`,
  batch: (batch: BatchKey) => `batch ${batch}`,
}

export async function addPlace({ ctx, by, ids, now }: Stage, { place }: { place: PlaceKey }): Promise<void> {
  const body = createPlace.body.parse(PLACES[place])
  await registry.places.create(ctx, by, { id: ids.make(named.place(place), now), body })
}

export async function changePlace(
  { ctx, by, ids }: Stage,
  { place, access }: { place: PlaceKey; access: string },
): Promise<void> {
  const id = ids.of(named.place(place))
  const { version } = await registry.places.get(ctx, by, id)
  const body = createPlace.body.parse({ ...PLACES[place], access })
  await registry.places.update(ctx, by, { id, version, body })
}

export async function addKind({ ctx, by, ids, now }: Stage, { kind }: { kind: KindCode }): Promise<void> {
  const { name, station, promise, plan }: DemoKind = KIT_KINDS[kind]
  const positions = plan.map((line) => ({ ...line, id: ids.make(named.position(kind, line.name), now) }))
  const body = kitKindBody.parse({ code: kind, name, station, promise, positions })
  await registry.kitKinds.create(ctx, by, { id: ids.make(named.kind(kind), now), body })
}

export async function addBuildSheet(
  { ctx, by, ids, now }: Stage,
  { sheet }: { sheet: BuildKey },
): Promise<void> {
  const body = buildSheetBody.parse(BUILD_SHEETS[sheet])
  await registry.buildSheets.create(ctx, by, { id: ids.make(named.sheet(sheet), now), body })
}

export async function addBatch(stage: Stage, { batch }: { batch: BatchKey }): Promise<void> {
  const { ctx, by, ids, now, calendar } = stage
  const { name, coreLot, builtOn } = BATCHES[batch]
  const units = Object.values(TRANSFORMERS).filter((one) => one.batch === batch).length
  const body = batchBody.parse({
    buildSheetId: ids.of(named.sheet('transformer')),
    name,
    coreLot,
    builtOn: calendar.day(builtOn),
    builderId: memberId(stage, 'josiah'),
    notes: `${units} units from one core lot.`,
  })
  await registry.batches.create(ctx, by, { id: ids.make(named.batch(batch), now), body })
}

export async function addKit({ ctx, by, ids, now }: Stage, { kit }: { kit: string }): Promise<void> {
  const { kind, home } = kitOf(kit)
  const placeId = ids.of(named.place(home))
  const kitKindId = ids.of(named.kind(kind))
  const body = createKit.body.parse({ designation: kit, kitKindId, homePlaceId: placeId, placeId })
  await registry.kits.create(ctx, by, { id: ids.make(kit, now), body })
}
