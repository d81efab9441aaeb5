import { BATTERIES_ACTION, MEASURE_LOAD_ACTION, replaceAction } from './actions.ts'
import { standingPart } from './band-part.ts'
import { bankRuntime, cutOffText } from './bank-runtime.ts'
import { countBattery, DEFAULT_ENDURANCE_C, type CountedBattery } from './counted-battery.ts'
import { conditionsText } from './endurance-words.ts'
import type { Moment } from './moment.ts'
import { reasonAbout, reasonOf } from './reason.ts'
import { ruleFor } from './rules-in-force.ts'
import { HOURS_UNKNOWN, hoursShortText, NO_ENDURANCE, noRatingText, notCountedText } from './sentences.ts'
import type { FilledPosition } from './slots.ts'
import { standingOf } from './standing.ts'
import { stationLoad, type StationLoad } from './station-load.ts'
import type { Action, Reason } from './period-types.ts'
import type { Evidence, ReadinessItem } from './types.ts'

export interface Endurance {
  /** h; null when no battery counts or nobody measured the load. */
  readonly hours: number | null
  readonly usableAh: number | null
  readonly factors: readonly string[]
  /** What the hours hold for, on one line; empty without hours. */
  readonly conditions: string
  readonly reasons: readonly Reason[]
  readonly tests: readonly Evidence[]
}

/**
 * Hours from the measured capacity of the batteries whose capacity test stands, the usable fraction, the temperature
 * and what the station draws over time. A battery below its limit counts for nothing.
 */
export function judgeEndurance(moment: Moment, filled: readonly FilledPosition[]): Endurance {
  const batteries = filled.filter(({ position }) => position.category === 'battery')
  if (batteries.length === 0) return NO_BATTERY
  const judged = batteries.flatMap(({ position, working }) =>
    working.map((item) => judgeBattery(moment, item, position.vital)),
  )
  const counted = judged.flatMap(({ counted: one }) => one ?? [])
  const found = judged.flatMap(({ reasons }) => reasons)
  // What lifts a battery's own reason brings its hours back; without one, better batteries do.
  const fix = found[0]?.action ?? BATTERIES_ACTION
  const load = stationLoad(moment, filled)
  const runtime = counted.length > 0 && load ? bankRuntime(counted, load.profile) : null
  const hours = runtime?.hours ?? null
  const short = hoursReasons(moment.state.promise.hours, { hours, counted: counted.length }, fix)
  return {
    hours,
    usableAh: counted.length > 0 ? counted.reduce((sum, battery) => sum + battery.usableAh, 0) : null,
    factors: [...counted.map(({ factor }) => factor), ...(load?.factors ?? []), ...(runtime?.factors ?? [])],
    conditions: load && runtime ? conditionsOf(moment, load) : '',
    reasons: [...found, ...short, ...cutOffReasons(counted, load)],
    tests: judged.flatMap(({ tests }) => tests),
  }
}

const NO_BATTERY: Endurance = {
  hours: null,
  usableAh: null,
  factors: [],
  conditions: '',
  reasons: [],
  tests: [],
}

function conditionsOf({ policy }: Moment, { use, basis }: StationLoad): string {
  return conditionsText(use, policy?.settings.enduranceC ?? DEFAULT_ENDURANCE_C, basis)
}

/** Said beside the verdict: a rating is not a measurement. */
function cutOffReasons(counted: readonly CountedBattery[], load: StationLoad | null): Reason[] {
  const text = load ? cutOffText(counted, load.profile) : undefined
  return text === undefined ? [] : [reasonOf({ code: 'battery-over-current', level: 'note', text })]
}

interface JudgedBattery {
  readonly counted: CountedBattery | undefined
  readonly reasons: readonly Reason[]
  readonly tests: readonly Evidence[]
}

function judgeBattery(moment: Moment, item: ReadinessItem, vitalPosition: boolean): JudgedBattery {
  const rule = ruleFor(moment.policy, item, 'battery-capacity', moment.today)
  const asked = { subjectId: item.id, procedures: ['battery-capacity'], rule, band: null } as const
  const standing = standingOf(moment, asked)
  const fraction = standing.finding?.value ?? null
  if (standing.state === 'failed') {
    const text = notCountedText(item.designation, fraction)
    return uncounted(batteryReason(item, 'battery-not-counted', text, standing.test))
  }
  if (standing.state !== 'good') {
    const weighed = rule && { ...rule, vital: rule.vital && vitalPosition }
    const check = { item, rule: weighed, procedure: 'battery-capacity', band: null } as const
    return { counted: undefined, reasons: standingPart(check, standing).reasons, tests: [] }
  }
  const measured = { fraction: fraction ?? 0, on: standing.test!.performedOn }
  const counted = countBattery(item, measured, moment.policy?.settings ?? {})
  if (counted) return { counted, reasons: [], tests: [standing.test!] }
  return uncounted(batteryReason(item, 'battery-unrated', noRatingText(item.designation), standing.test))
}

function uncounted(reason: Reason): JudgedBattery {
  return { counted: undefined, reasons: [reason], tests: [] }
}

function batteryReason(item: ReadinessItem, code: string, text: string, test: Evidence | null): Reason {
  const shown = { testId: test?.id ?? null, procedure: 'battery-capacity' } as const
  return reasonAbout(item, { code, level: 'limit', text, ...shown, action: replaceAction(item.designation) })
}

function hoursReasons(
  promised: number | null,
  { hours, counted }: { hours: number | null; counted: number },
  action: Action,
): Reason[] {
  if (promised === null) return []
  const limit = (code: string, text: string, lift = action) => [
    reasonOf({ code, level: 'limit', text, action: lift }),
  ]
  if (counted === 0) return limit('no-battery-endurance', NO_ENDURANCE)
  if (hours === null) return limit('hours-unknown', HOURS_UNKNOWN, MEASURE_LOAD_ACTION)
  return hours < promised ? limit('hours-short', hoursShortText(hours, promised)) : []
}
