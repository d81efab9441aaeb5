import { BATCHES, BUILD_SHEETS, type BatchKey, type BuildKey } from '../builds.ts'
import { later, onDay, type Local } from '../calendar.ts'
import { CONSUMABLES } from '../consumables.ts'
import { RECORD_BEGINS_ON } from '../dates.ts'
import type { Deed, Step } from '../deeds.ts'
import { FIRST_ITEMS } from '../items.ts'
import { KIND_CODES } from '../kit-kinds.ts'
import { KITS } from '../kits.ts'
import { PERSON_KEYS, type PersonKey } from '../people.ts'
import { PLACES, type PlaceKey } from '../places.ts'

/** The first week: everything is put on record, then packed. Nothing was known of it before. */

const NEWEST: PersonKey = 'yuna'

const oneAfterAnother = (from: Local, by: PersonKey, deeds: readonly Deed[]): Step[] =>
  deeds.map((deed, minute) => ({ at: later(from, minute), by, deed }))

const people: Deed[] = PERSON_KEYS.filter((person) => person !== NEWEST).map((person) => ({
  do: 'enrol',
  person,
}))

const rooms: Deed[] = [
  ...(Object.keys(PLACES) as PlaceKey[]).map((place): Deed => ({ do: 'add-place', place })),
  ...KIND_CODES.map((kind): Deed => ({ do: 'add-kind', kind })),
  ...KITS.map(({ designation }): Deed => ({ do: 'add-kit', kit: designation })),
]

const builds: Deed[] = [
  ...(Object.keys(BUILD_SHEETS) as BuildKey[]).map((sheet): Deed => ({ do: 'add-build-sheet', sheet })),
  ...(Object.keys(BATCHES) as BatchKey[])
    .filter((batch) => batch !== 'B')
    .map((batch): Deed => ({ do: 'add-batch', batch })),
]

const things: Deed[] = FIRST_ITEMS.map((item) => ({ do: 'add-item', item }))

const packing: Deed[] = FIRST_ITEMS.flatMap(({ designation, packedIn }): Deed[] =>
  packedIn ? [{ do: 'pack', item: designation, ...packedIn }] : [],
)

const stock: Deed[] = CONSUMABLES.map(({ name }) => ({ do: 'add-consumable', consumable: name }))

export const BEGINNING: readonly Step[] = [
  ...oneAfterAnother(onDay(RECORD_BEGINS_ON, '19:00'), 'ines', people),
  ...oneAfterAnother(onDay(RECORD_BEGINS_ON, '19:40'), 'ines', [{ do: 'put-policy-in-force' }]),
  ...oneAfterAnother(onDay(RECORD_BEGINS_ON, '19:45'), 'tobin', rooms),
  ...oneAfterAnother('2025-09-02 18:00', 'tobin', builds),
  ...oneAfterAnother('2025-09-03 14:00', 'tobin', things),
  ...oneAfterAnother('2025-09-04 14:00', 'maren', packing),
  ...oneAfterAnother('2025-09-05 18:00', 'june', stock),
  ...oneAfterAnother('2025-09-07 20:00', 'ines', [{ do: 'enrol', person: NEWEST }]),
]
