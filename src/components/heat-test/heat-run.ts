import type { BodyInputOf } from '#shared/contracts/endpoint.ts'
import type { recordTest } from '#shared/contracts/record-test.ts'
import type { Band } from '#shared/engine/vocabulary.ts'

type RecordBody = Extract<BodyInputOf<typeof recordTest>, { procedure: 'heat-test' }>
export type HeatInputs = RecordBody['inputs']

/** What is chosen before the key goes down. */
export interface HeatSetUp {
  readonly band: Band | null
  readonly powerW: number | null
  readonly load: HeatInputs['load']
  readonly enclosure: HeatInputs['enclosure']
  readonly ambientC: number | null
  readonly method: string
  readonly instrumentId: string
  readonly instrumentNote: string
  readonly conditions: string
}

export interface HeatReadingEntry {
  /** Seconds since key-down. */
  readonly atS: number
  readonly temperatureC: number
}

/**
 * One heat test on its way, as it is kept on the device. Every time is an instant, never a count of ticks: a screen
 * that slept or a page that was reloaded loses nothing.
 */
export interface HeatRun {
  readonly testId: string
  readonly step: 'set-up' | 'keyed' | 'cooling' | 'review'
  readonly setUp: HeatSetUp
  readonly keyDownAt: number | null
  readonly keyUpAt: number | null
  readonly readings: readonly HeatReadingEntry[]
  /** Readings by hand in whose place a thermometer's log stands now. */
  readonly setAside?: readonly HeatReadingEntry[]
  readonly stoppedAtLimit: boolean
  readonly swr: {
    readonly start: number | null
    readonly highest: number | null
    readonly lowest: number | null
  }
  readonly notes: string
}

/** What the method asks for, from the rule in force. */
export interface HeatPlan {
  readonly stopC: number
  readonly minutes: number
  /** Minutes since key-down at which to read while keyed. */
  readonly readingMinutes: readonly number[]
  /** Minutes after key-up at which to read. */
  readonly coolingMinutes: readonly number[]
}

export function secondsKeyed(run: HeatRun, now: number): number {
  if (run.keyDownAt === null) return 0
  return Math.max(0, ((run.keyUpAt ?? now) - run.keyDownAt) / 1000)
}

export function secondsCooling(run: HeatRun, now: number): number {
  return run.keyUpAt === null ? 0 : Math.max(0, (now - run.keyUpAt) / 1000)
}

/** The next reading asked for: its place in the plan and when, in s since key-down; null when all are in. */
export function nextReading(
  run: HeatRun,
  plan: HeatPlan,
): { readonly minute: number; readonly atS: number } | null {
  if (run.step === 'keyed') {
    const minute = plan.readingMinutes[run.readings.length]
    return minute === undefined ? null : { minute, atS: minute * 60 }
  }
  if (run.keyUpAt === null || run.keyDownAt === null) return null
  const keyUpS = (run.keyUpAt - run.keyDownAt) / 1000
  const cooled = run.readings.filter(({ atS }) => atS > keyUpS).length
  const minute = plan.coolingMinutes[cooled]
  return minute === undefined ? null : { minute, atS: keyUpS + minute * 60 }
}

/** Two readings cannot share a moment: the second of one second counts a tenth later. */
export function withReading(run: HeatRun, temperatureC: number, now: number): HeatRun {
  if (run.keyDownAt === null) return run
  const last = run.readings.at(-1)?.atS ?? -Infinity
  const atS = Math.max(Math.round((now - run.keyDownAt) / 100) / 10, last + 0.1)
  return { ...run, readings: [...run.readings, { atS: Math.round(atS * 10) / 10, temperatureC }] }
}

export function withoutReading(run: HeatRun, place: number): HeatRun {
  return { ...run, readings: run.readings.filter((_, index) => index !== place) }
}

export function hottestC(run: HeatRun): number | null {
  return run.readings.length === 0 ? null : Math.max(...run.readings.map(({ temperatureC }) => temperatureC))
}

/** The body to record; null while something that the test cannot do without is missing. */
export function bodyOfRun(run: HeatRun, itemId: string): RecordBody | null {
  const { band, powerW, ambientC, load, enclosure, method, instrumentId, instrumentNote, conditions } =
    run.setUp
  if (band === null || powerW === null || ambientC === null || !method || !instrumentId) return null
  if (run.keyDownAt === null || run.keyUpAt === null || run.readings.length < 2) return null
  return {
    procedure: 'heat-test',
    itemId,
    performedAt: new Date(run.keyDownAt).toISOString(),
    method,
    instrumentId,
    instrumentNote,
    notes: run.notes,
    inputs: {
      band,
      powerW,
      load,
      enclosure,
      ambientC,
      readings: run.readings.map((reading) => ({ ...reading })),
      keyUpAtS: Math.max(1, Math.round(secondsKeyed(run, run.keyUpAt) * 10) / 10),
      stoppedAtLimit: run.stoppedAtLimit,
      conditions,
      ...swrOf(run),
    },
  }
}

function swrOf({ swr }: HeatRun): Pick<HeatInputs, 'swr'> {
  if (swr.start === null) return {}
  const seen = [swr.start, swr.highest ?? swr.start, swr.lowest ?? swr.start]
  return { swr: { start: swr.start, highest: Math.max(...seen), lowest: Math.min(...seen) } }
}
