import type { z } from 'zod'
import type { itemLocation } from '#shared/contracts/movements.ts'

/** In a position of a kit, in a place, or (all null) nowhere known. */
export interface Location {
  readonly kitId: string | null
  readonly positionId: string | null
  readonly placeId: string | null
}

export const NOWHERE: Location = { kitId: null, positionId: null, placeId: null }

export function locationOf(location: z.output<typeof itemLocation>): Location {
  if (location.kind === 'nowhere') return NOWHERE
  if (location.kind === 'place') return { ...NOWHERE, placeId: location.placeId }
  return { ...NOWHERE, kitId: location.kitId, positionId: location.positionId }
}

export function sameLocation(one: Location, other: Location): boolean {
  return one.kitId === other.kitId && one.positionId === other.positionId && one.placeId === other.placeId
}
