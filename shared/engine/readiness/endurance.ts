import { isFailure } from '../outcome.ts'
import { reasonForStanding } from './check-reason.ts'
import type { Moment } from './moment.ts'
import { reasonOf } from './reason.ts'
import { ruleFor } from './rules-in-force.ts'
import { amountText, replaceAction, SWAP_MINUTES } from './sentences.ts'
import { itemsOf, type FilledPosition } from './slots.ts'
import { standingOf } from './standing.ts'
import { temperatureFactor } from './temperature-factor.ts'
import type { Evidence, PolicySettings, ReadinessItem, Reason } from './types.ts'

export interface Endurance {
  readonly hours: number | null
  readonly usableAh: number | null
  readonly factors: readonly string[]
  readonly reasons: readonly Reason[]
  readonly tests: readonly Evidence[]
}

interface CountedBattery {
  readonly item: ReadinessItem
  readonly fraction: number
  readonly usableAh: number
  readonly factor: string
}

/** A new battery may hold more than its rating; the sum takes no more than this (calculation sheet, section 10). */
const MOST_OF_RATING = 1.1
const DEFAULT_ENDURANCE_C = 20

/**
 * Hours from the measured capacity of the batteries whose capacity test stands, the usable fraction, the temperature
 * and the kit's measured mean load. A battery below its limit counts for nothing.
 */
export function judgeEndurance(moment: Moment, filled: readonly FilledPosition[]): Endurance {
  const batteries = itemsOf(filled, 'battery')
  const plansBatteries = filled.some(({ position }) => position.category === 'battery')
  if (!plansBatteries) return { hours: null, usableAh: null, factors: [], reasons: [], tests: [] }
  const judged = batteries.map((item) => judgeBattery(moment, item))
  const counted = judged.flatMap(({ counted: one }) => (one ? [one] : []))
  const usableAh = counted.reduce((sum, battery) => sum + battery.usableAh, 0)
  const loadA = itemsOf(filled, 'radio')[0]?.facts.meanLoadA
  const hours = counted.length > 0 && loadA ? usableAh / loadA : null
  return {
    hours,
    usableAh: counted.length > 0 ? usableAh : null,
    factors: [...counted.map(({ factor }) => factor), ...(loadA ? [`mean load ${amountText(loadA)} A`] : [])],
    reasons: [...judged.flatMap(({ reasons }) => reasons), ...hoursReasons(moment, counted.length, hours)],
    tests: judged.flatMap(({ tests }) => tests),
  }
}

interface JudgedBattery {
  readonly counted: CountedBattery | null
  readonly reasons: readonly Reason[]
  readonly tests: readonly Evidence[]
}

function judgeBattery(moment: Moment, item: ReadinessItem): JudgedBattery {
  const rule = ruleFor(moment.policy, item, 'battery-capacity', moment.today)
  const asked = { subjectId: item.id, procedures: ['battery-capacity'] as const, rule, band: null }
  const standing = standingOf(moment, asked)
  const tests = standing.test ? [standing.test] : []
  const fraction = standing.finding?.value ?? null
  if (standing.state === 'good') {
    const counted = fraction === null ? null : countBattery(item, fraction, moment.policy?.settings ?? {})
    return { counted, reasons: [], tests }
  }
  if (standing.state === 'failed')
    return { counted: null, reasons: [failedReason(item, fraction, standing.test!)], tests }
  const subject = { name: item.designation, itemId: item.id, positionId: item.positionId }
  const level = rule?.vital ? 'not-proven' : 'limit'
  const reason =
    rule && reasonForStanding(subject, { procedure: 'battery-capacity', band: null, level }, standing)
  return { counted: null, reasons: reason ? [reason] : [], tests: [] }
}

function failedReason(item: ReadinessItem, fraction: number | null, test: Evidence): Reason {
  const held =
    fraction === null ? 'failed its capacity test' : `holds ${Math.round(fraction * 100)} % of its rating`
  return reasonOf({
    code: 'battery-not-counted',
    level: 'limit',
    text: `${item.designation} ${held} and is not counted`,
    itemId: item.id,
    positionId: item.positionId,
    testId: test.id,
    procedure: 'battery-capacity',
    action: replaceAction(item.designation),
  })
}

function countBattery(
  item: ReadinessItem,
  fraction: number,
  settings: PolicySettings,
): CountedBattery | null {
  const { ratedAh, chemistry = 'agm' } = item.facts
  if (!ratedAh) return null
  const usable = settings.usableFraction?.[chemistry] ?? (isLithium(chemistry) ? 0.8 : 0.5)
  const atC = settings.enduranceC ?? DEFAULT_ENDURANCE_C
  const cold = settings.temperatureFactor ?? temperatureFactor(chemistry, atC)
  if (isFailure(cold)) return null
  const counts = Math.min(fraction, MOST_OF_RATING)
  const factor =
    `${item.designation}: ${amountText(ratedAh)} Ah, ${Math.round(fraction * 1000) / 10} % measured, ` +
    `${Math.round(usable * 100)} % of it usable, ${Math.round(cold * 100)} % at ${atC} °C`
  return { item, fraction, usableAh: ratedAh * counts * usable * cold, factor }
}

function isLithium(chemistry: string): boolean {
  return chemistry === 'lifepo4' || chemistry === 'lithium-ion'
}

function hoursReasons(moment: Moment, counted: number, hours: number | null): Reason[] {
  const promised = moment.state.promise.hours
  if (promised === null) return []
  const action = {
    kind: 'replace',
    text: 'Fit batteries that passed their capacity test',
    minutes: SWAP_MINUTES,
  } as const
  if (counted === 0) {
    const text = 'No battery endurance: from mains or a vehicle only'
    return [reasonOf({ code: 'no-battery-endurance', level: 'limit', text, action })]
  }
  if (hours === null || hours >= promised) return []
  const text = `${amountText(hours)} h from its batteries instead of the ${amountText(promised)} h promised`
  return [reasonOf({ code: 'hours-short', level: 'limit', text, action })]
}
