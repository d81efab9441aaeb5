import { counted } from '../plain-words.ts'
import { isDeployable, type Availability, type Verdict } from '../vocabulary.ts'
import type { Tense } from './words.ts'

/** What the first sentence of the board is made of: stations only. */
export interface Tally {
  readonly stations: number
  readonly canGo: number
  readonly withLimits: number
  readonly onIssue: number
  readonly cannot: number
}

interface Count {
  readonly station: boolean
  readonly availability: Availability
  readonly verdict: Verdict
  readonly n: number
}

export function tallyOf(counts: readonly Count[]): Tally {
  const sum = (matches: (count: Count) => boolean) =>
    counts.filter((count) => count.station && matches(count)).reduce((total, { n }) => total + n, 0)
  const goes = ({ availability, verdict }: Count) => availability === 'available' && isDeployable(verdict)
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
