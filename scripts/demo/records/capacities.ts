import type { PlainDate } from '#shared/engine/plain-date.ts'
import { BATTERIES, packOf } from '../batteries.ts'
import { PARTY } from '../dates.ts'
import type { DemoTest } from '../demo-test.ts'
import { noisy, rounded } from '../random.ts'
import type { Job } from './bench.ts'
import { instrumentFor } from './instruments.ts'

/** Capacity tests: story S2 for the lead-acid ones, anchors and noise for the lithium ones. */

const M1 = PARTY.sep25
const M7 = PARTY.mar
const M13 = PARTY.sep
const ROUNDS: readonly PlainDate[] = [M1, M7, M13]

/** Percent of the rating at M1, M7 and M13. */
export const LEAD_ACID: Readonly<Record<string, readonly number[]>> = {
  'BAT-011': [84, 79, 74],
  'BAT-012': [82, 75, 68],
  'BAT-013': [88, 84, 79],
  'BAT-014': [87, 82, 77],
  'BAT-015': [78, 70],
  'BAT-016': [76, 61],
  'BAT-021': [82],
  'BAT-022': [86],
  'BAT-023': [71, 52],
  'BAT-038': [90, 87, 83],
  'BAT-039': [88, 85, 81],
  'BAT-040': [86, 82, 76],
  'BAT-041': [84, 79, 72],
  'BAT-044': [91, 88],
  'BAT-045': [90, 85],
  // Outside the 260: swollen and retired.
  'BAT-046': [63],
}

/** Measured anchors of section 4, percent. */
const LITHIUM_ANCHORS: Readonly<Record<string, number>> = {
  'BAT-001': 96.3,
  'BAT-002': 96.3,
  'BAT-017': 98.2,
  'BAT-024': 97.3,
  'BAT-025': 97.3,
  // So that twelve hours are left whatever the noise: the digital kits have little to spare.
  'BAT-026': 97.9,
  'BAT-027': 97.9,
  'BAT-028': 97.9,
  'BAT-029': 97.9,
  'BAT-030': 96.3,
  'BAT-031': 96.3,
  'BAT-034': 98,
  'BAT-035': 98,
  'BAT-036': 98,
  'BAT-037': 98,
}
/** Kept to the digit in their newest test: the tables quote their hours. */
const EXACT = new Set(['BAT-001', 'BAT-002', 'BAT-017', 'BAT-024', 'BAT-025', 'BAT-030', 'BAT-031'])
const QUOTED = new Set([...EXACT, 'BAT-034', 'BAT-035', 'BAT-036', 'BAT-037'])

const LITHIUM = BATTERIES.filter(({ pack }) => pack.chemistry === 'lifepo4').map(
  ({ designation }) => designation,
)
const LITHIUM_SPARES = ['BAT-042', 'BAT-043']
/** K-11 stood untouched since spring: its battery was tested then. */
const IN_SPRING = ['BAT-019']
const IN_AUTUMN = LITHIUM.filter((battery) => ![...LITHIUM_SPARES, ...IN_SPRING].includes(battery))

function percentOf(battery: string, on: PlainDate): number {
  const round = ROUNDS.indexOf(on)
  const leadAcid = LEAD_ACID[battery]?.[round]
  if (leadAcid !== undefined) return leadAcid
  const own = LITHIUM_ANCHORS[battery] ?? noisy(`own capacity ${battery}`, 97, { reach: 1.5, digits: 1 })
  if (QUOTED.has(battery) && on === M13) return own
  return noisy(`capacity ${battery} ${on}`, own, { reach: 0.7, digits: 1 })
}

type CapacityInputs = Extract<DemoTest, { procedure: 'battery-capacity' }>['inputs']

function inputsOf(battery: string, on: PlainDate): CapacityInputs {
  const { chemistry, ratedAh } = packOf(battery)
  const isLithium = chemistry === 'lifepo4'
  const rest = isLithium ? 13.3 : 12.75
  return {
    measuredAh: rounded((ratedAh * percentOf(battery, on)) / 100, 3),
    currentA: isLithium ? ratedAh / 5 : ratedAh / 20,
    cutOffV: isLithium ? 11.5 : 10.5,
    temperatureC: 25,
    restingV: noisy(`rest ${battery} ${on}`, rest, { reach: 0.15, digits: 2 }),
  }
}

function job(battery: string, on: PlainDate, turn: number): Job {
  const test: Omit<DemoTest & { procedure: 'battery-capacity' }, 'performed'> = {
    procedure: 'battery-capacity',
    subject: battery,
    method: 'Discharged at constant current to the cut-off, at room temperature',
    instrument: instrumentFor('BTT', on, turn),
    inputs: inputsOf(battery, on),
  }
  return { on, crew: ['greta', 'yuna'], minutes: 5, test: (performed) => ({ ...test, performed }) }
}

const leadAcidAt = (round: number) =>
  Object.keys(LEAD_ACID).filter((battery) => LEAD_ACID[battery]?.[round] !== undefined)

export const CAPACITY_JOBS: readonly Job[] = [
  ...[...leadAcidAt(0), ...LITHIUM].map((battery, turn) => job(battery, M1, turn)),
  ...[...leadAcidAt(1), ...IN_SPRING].map((battery, turn) => job(battery, M7, turn)),
  ...[...leadAcidAt(2), ...IN_AUTUMN].map((battery, turn) => job(battery, M13, turn)),
]
