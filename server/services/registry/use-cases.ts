import type { RegistryRow } from '../../entities/RegistryRow.ts'
import type { AppContext } from '../../context.ts'
import { notFound } from '../../errors.ts'
import { inGroup } from '../../group-transaction.ts'
import { batch } from './batch.ts'
import { buildSheet } from './build-sheet.ts'
import { consumable } from './consumable.ts'
import { createThing } from './create-thing.ts'
import { item } from './item.ts'
import { kitKind } from './kit-kind.ts'
import { kit } from './kit.ts'
import { place } from './place.ts'
import { bringBackThing, retireThing } from './retire-thing.ts'
import type { By, Thing } from './thing.ts'
import { updateThing } from './update-thing.ts'

/** The five things one does with a thing, each a transaction of its own. */
function useCases<Row extends RegistryRow, Body extends object, Answer>(thing: Thing<Row, Body, Answer>) {
  return {
    get: (ctx: AppContext, by: By, id: string): Promise<Answer> =>
      inGroup(ctx, by, async (tx) => {
        const answer = await thing.read(tx, id)
        if (answer === undefined) throw notFound(thing.word)
        return answer
      }),
    create: (ctx: AppContext, by: By, input: { id: string; body: Body }) =>
      inGroup(ctx, by, (tx) => createThing(tx, thing, input)),
    update: (ctx: AppContext, by: By, input: { id: string; version: number; body: Body }) =>
      inGroup(ctx, by, (tx) => updateThing(tx, thing, input)),
    retire: (ctx: AppContext, by: By, input: { id: string; version: number; reason: string }) =>
      inGroup(ctx, by, (tx) => retireThing(tx, thing, input)),
    bringBack: (ctx: AppContext, by: By, input: { id: string; version: number }) =>
      inGroup(ctx, by, (tx) => bringBackThing(tx, thing, input)),
  }
}

export const places = useCases(place)
export const kitKinds = useCases(kitKind)
export const kits = useCases(kit)
export const items = useCases(item)
export const buildSheets = useCases(buildSheet)
export const batches = useCases(batch)
export const consumables = useCases(consumable)
