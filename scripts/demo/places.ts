import type { z } from 'zod'
import type { placeBody } from '#shared/contracts/places.ts'

/** Places of the scenario, section 2. */
export const PLACES = {
  P1: {
    name: 'Station 4 Cage',
    kind: 'locked cage in a fire station, heated',
    minC: 15,
    maxC: 24,
    access: 'two keys and a duty lockbox, any hour',
    keyHolders: 'Tobin Arkwell, Maren Oldstrand; duty lockbox',
  },
  P2: {
    name: 'Quarry Bend Grange Locker',
    kind: 'unheated locker in a hall',
    minC: -8,
    maxC: 34,
    access: 'one key, one host',
    keyHolders: 'Hollis Wrenfield',
  },
  P3: {
    name: 'Response Trailer',
    kind: 'trailer in the county yard',
    minC: -5,
    maxC: 48,
    access: 'gate code with the duty officer; two keys',
    keyHolders: 'Tobin Arkwell, Oona Kessleray',
  },
} as const satisfies Record<string, z.input<typeof placeBody>>

export type PlaceKey = keyof typeof PLACES
