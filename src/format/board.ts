import type { BoardAnswer, BoardCount, BoardRow } from '#shared/contracts/board.ts'
import { unpackBands } from '#shared/engine/readiness/band-codes.ts'
import { counted } from '@/words.ts'
import { wallClock } from './day.ts'
import { numberText, quantityText } from './quantity.ts'

/** What the first sentence of the board is made of: stations only. */
export interface Tally {
  readonly stations: number
  readonly canGo: number
  readonly withLimits: number
  readonly onIssue: number
  readonly cannot: number
}

const DEPLOYABLE = new Set(['proven', 'proven-with-limits'])

export function tallyOf(counts: readonly BoardCount[]): Tally {
  const sum = (matches: (count: BoardCount) => boolean) =>
    counts.filter((count) => count.station && matches(count)).reduce((total, { n }) => total + n, 0)
  const goes = ({ availability, verdict }: BoardCount) =>
    availability === 'available' && DEPLOYABLE.has(verdict)
  const stations = sum(() => true)
  const canGo = sum(goes)
  const onIssue = sum(({ availability }) => availability === 'assigned')
  return {
    stations,
    canGo,
    withLimits: sum((count) => goes(count) && count.verdict === 'proven-with-limits'),
    onIssue,
    cannot: stations - canGo - onIssue,
  }
}

export type Tense = BoardAnswer['computedFor']

const CAN: Readonly<Record<Tense, string>> = { now: 'can go', past: 'could go', future: 'will be able to go' }
const CANNOT: Readonly<Record<Tense, string>> = {
  now: 'cannot be used now',
  past: 'could not be used',
  future: 'will not be usable',
}

/** The answer in one sentence, its weighty part apart: `12 of 20 stations can go,` `7 of them with limits. ...` */
export function sayTally(tally: Tally, tense: Tense): { lead: string; rest: string } {
  const { stations, canGo, withLimits, onIssue, cannot } = tally
  if (stations === 0) return { lead: 'No stations yet.', rest: '' }
  const lead = `${canGo === 0 ? 'None' : canGo} of ${counted(stations, 'station')} ${CAN[tense]}`
  const limits =
    withLimits === 0 ? '' : withLimits === canGo ? 'all with limits' : `${withLimits} of them with limits`
  const rest = [
    limits && `${limits}.`,
    onIssue > 0 && `${onIssue} ${verb(onIssue, tense)} out on issue.`,
    cannot > 0 && `${cannot} ${CANNOT[tense]}.`,
  ].filter(Boolean)
  return { lead: limits ? `${lead},` : `${lead}.`, rest: rest.join(' ') }
}

function verb(count: number, tense: Tense): string {
  if (tense === 'past') return count === 1 ? 'was' : 'were'
  return count === 1 ? 'is' : 'are'
}

/** The parts of the board, in the order of the sentence. */
export const SECTIONS = ['can-go', 'on-issue', 'cannot'] as const
export type Section = (typeof SECTIONS)[number]

export function sectionOf({ availability, verdict }: BoardRow): Section {
  if (availability === 'assigned') return 'on-issue'
  return availability === 'available' && DEPLOYABLE.has(verdict) ? 'can-go' : 'cannot'
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
