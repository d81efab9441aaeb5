import { setKitAvailability as contract, updateKit } from '#shared/contracts/kits.ts'
import type { PlainDate } from '#shared/engine/plain-date.ts'
import { setKitAvailability } from '#server/services/registry/set-kit-availability.ts'
import { kits } from '#server/services/registry/use-cases.ts'
import type { Deed, KitChanges } from '../deeds.ts'
import { memberId } from './people.ts'
import { named } from './registry.ts'
import type { Stage } from './stage.ts'

export async function changeKit(
  { ctx, by, ids }: Stage,
  { kit, changes: { place, ...changes } }: { kit: string; changes: KitChanges },
): Promise<void> {
  const id = ids.of(kit)
  const now = await kits.get(ctx, by, id)
  const body = updateKit.body.parse({
    designation: now.designation,
    kitKindId: now.kind.id,
    homePlaceId: now.homePlace?.id ?? null,
    placeId: place === undefined ? (now.place?.id ?? null) : place && ids.of(named.place(place)),
    sealNumber: now.sealNumber,
    sealMatches: now.sealMatches,
    notes: now.notes,
    ...changes,
  })
  await kits.update(ctx, by, { id, version: now.version, body })
}

type Availability = Extract<Deed, { do: 'set-availability' }>

export async function setAvailability(stage: Stage, deed: Availability): Promise<void> {
  const { ctx, by, ids, calendar } = stage
  const { kit, availability, reason, holder, expectedReturnOn } = deed
  const kitId = ids.of(kit)
  const { version } = await kits.get(ctx, by, kitId)
  const day = (on: PlainDate | undefined) => (on === undefined ? null : calendar.day(on))
  const body = contract.body.parse({
    availability,
    reason,
    expectedReturnOn: day(expectedReturnOn),
    holderId: holder === undefined ? null : memberId(stage, holder),
  })
  await setKitAvailability(ctx, by, { kitId, version, body })
}
