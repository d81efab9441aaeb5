import type { HeatReadingEntry, HeatRun } from './heat-run.ts'

/** A log and where the test lies in it, s since the log's first line. */
export interface PlacedLog {
  readonly readings: readonly HeatReadingEntry[]
  readonly keyDownS: number
  /** Null: the moments of the run stand, and only the readings are taken over. */
  readonly keyed: { readonly keyUpS: number; readonly startedAt: number } | null
}

/**
 * The log in the place of what was read by hand, which is set aside and not lost. What was logged before the key went
 * down is left out, but for the last line, which is the start when none falls on the moment itself.
 */
export function withLog(run: HeatRun, { readings, keyDownS, keyed }: PlacedLog): HeatRun {
  const tenth = (seconds: number) => Math.round(seconds * 10) / 10
  const from = readings.findLastIndex(({ atS }) => atS <= keyDownS)
  const taken = readings
    .slice(Math.max(0, from))
    .map(({ atS, temperatureC }) => ({ atS: Math.max(0, tenth(atS - keyDownS)), temperatureC }))
    .filter(({ atS }, place, all) => place === 0 || atS > (all[place - 1]?.atS ?? 0))
  return {
    ...run,
    readings: taken,
    setAside: run.setAside ?? run.readings,
    step: 'review',
    ...(keyed && {
      keyDownAt: keyed.startedAt,
      keyUpAt: keyed.startedAt + Math.max(1, keyed.keyUpS - keyDownS) * 1000,
    }),
  }
}

/** Back to the readings by hand. */
export function withoutLog(run: HeatRun): HeatRun {
  const { setAside, ...rest } = run
  return { ...rest, readings: setAside ?? run.readings }
}
