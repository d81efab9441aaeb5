import type { z } from 'zod'
import type { itemBody, itemRecord, newItemBody } from '#shared/contracts/items.ts'
import { CATEGORIES, INSTRUMENT_CATEGORIES } from '#shared/engine/vocabulary.ts'
import { Item } from '../../entities/Item.ts'
import type { GroupTx } from '../../group-transaction.ts'
import { affectedKits } from '../evidence/affected-kits.ts'
import { checkItem } from './check-item.ts'
import { claimDesignation } from './claim-designation.ts'
import { lockItem } from './lock-item.ts'
import { readItem } from './read-item.ts'
import { recordLeaving } from './record-movement.ts'
import { takeTag } from './take-tag.ts'
import type { Thing } from './thing.ts'
import { numeric } from './values.ts'

type Body = z.output<typeof itemBody> & Partial<Pick<z.output<typeof newItemBody>, 'placeId'>>
type Answer = z.input<typeof itemRecord>

function columns(body: Body): Partial<Item> {
  const {
    placeId: _,
    weightKg,
    details: { category, ...details },
    ...rest
  } = body
  return { ...rest, category, details, weightKg: numeric(weightKg, 3) }
}

/** A retired item is nowhere: it leaves its kit or its place, and that stands in its movements. */
async function retire(tx: GroupTx, row: Item): Promise<Partial<Item>> {
  await recordLeaving(tx, row)
  return { kitId: null, positionId: null, placeId: null }
}

const isInstrument = ({ category }: Item) => INSTRUMENT_CATEGORIES.some((one) => one === category)

export const item: Thing<Item, Body, Answer> = {
  entity: Item,
  subject: 'item',
  word: 'item',
  nameOf: (row) => row.designation,
  columns,
  read: readItem,
  lock: lockItem,
  check: checkItem,
  bornWith: async (tx, { placeId = null, details }) => ({
    tag: await takeTag(tx, CATEGORIES[details.category]),
    placeId,
  }),
  retire,
  bringBack: (tx, row) => claimDesignation(tx, 'item', row.designation),
  kitOf: (row) => row.kitId ?? null,
  // An instrument speaks in the reasons of every kit that was measured with it.
  dependingKits: (tx, row) => affectedKits(tx, row, isInstrument(row) ? 'calibration' : 'inspection'),
}
