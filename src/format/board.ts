import type { BoardRow } from '#shared/contracts/board.ts'
import { unpackBands } from '#shared/engine/readiness/band-codes.ts'
import { isDeployable } from '#shared/engine/vocabulary.ts'
import { wallClock } from './day.ts'
import { numberText, quantityText } from './quantity.ts'

/** The parts of the board, in the order of the sentence. */
export const SECTIONS = ['can-go', 'on-issue', 'cannot'] as const
export type Section = (typeof SECTIONS)[number]

export function sectionOf({ availability, verdict }: BoardRow): Section {
  if (availability === 'assigned') return 'on-issue'
  return availability === 'available' && isDeployable(verdict) ? 'can-go' : 'cannot'
}

/** Watts at the antenna over the bands that stand, as `71–85 W`; else the radio's output; else nothing. */
export function wattsOf(row: Pick<BoardRow, 'bandCodes' | 'watts'>): { text: string; where: string } | null {
  const watts = standing(row.bandCodes).flatMap(({ wattsAtAntenna }) =>
    wattsAtAntenna === null ? [] : [wattsAtAntenna],
  )
  if (watts.length > 0)
    return { text: rangeText(Math.min(...watts), Math.max(...watts)), where: 'at the antenna' }
  return row.watts === null ? null : { text: quantityText(row.watts, 'W', 0), where: 'at the radio' }
}

function rangeText(low: number, high: number): string {
  const least = numberText(low, 0)
  const most = quantityText(high, 'W', 0)
  return most.startsWith(`${least}\u00a0`) ? most : `${least}\u2013${most}`
}

const standing = (bandCodes: string) =>
  unpackBands(bandCodes).filter(({ state }) => state === 'proven' || state === 'limited')

/** Hours on the kit's own batteries; `mains` where a band stands and no battery counts. */
export function hoursOf(row: Pick<BoardRow, 'bandCodes' | 'hours'>): { text: string; where: string } | null {
  if (row.hours !== null)
    return { text: quantityText(row.hours, 'h', row.hours < 20 ? 1 : 0), where: 'endurance' }
  return standing(row.bandCodes).length === 0 ? null : { text: 'mains', where: 'or a vehicle' }
}

const JUST_NOW_MS = 60_000

/** `updated just now` for a minute, then `updated 18:02`. */
export function updatedText(atMs: number, nowMs: number, zone: string): string {
  return nowMs - atMs < JUST_NOW_MS ? 'updated just now' : `updated ${wallClock(atMs, zone).time}`
}
