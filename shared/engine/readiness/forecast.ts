import { groupBy } from '../group-by.ts'
import { VERDICTS, type Availability, type Verdict } from '../vocabulary.ts'
import { horizonOf, type VerdictPeriod } from './horizon.ts'
import type { EpochMs } from './types.ts'

/** A kit as the forecast sees it: its periods from the beginning of the forecast on, oldest first. */
export interface ForecastKit {
  readonly kitId: string
  readonly designation: string
  readonly availability: Availability
  readonly periods: readonly VerdictPeriod[]
}

/** Kits by verdict. */
export type VerdictTally = Readonly<Record<Verdict, number>>

export interface ForecastChange {
  readonly kitId: string
  readonly designation: string
  readonly before: Verdict
  readonly after: Verdict
  readonly cause: string
}

/** A moment at which verdicts change, and how many kits then have each. */
export interface ForecastStep {
  readonly at: EpochMs
  readonly changes: readonly ForecastChange[]
  readonly tally: VerdictTally
}

export interface Forecast {
  readonly start: VerdictTally
  readonly steps: readonly ForecastStep[]
}

/**
 * How many of these kits will have which verdict if nobody does anything, from the first instant of their periods until
 * `to`. Only kits that are available count: whether one on issue comes back, its periods do not say. Changes at one
 * instant are one step, in the order of their designations.
 */
export function forecast(kits: readonly ForecastKit[], to: EpochMs): Forecast {
  const here = kits.filter(({ availability }) => availability === 'available')
  const start = tallyOf(here.flatMap(({ periods }) => periods[0]?.verdict ?? []))
  const all = here.flatMap(changesOf).filter(({ at }) => at < to)
  const moments = [...groupBy(all, ({ at }) => at)].sort(([a], [b]) => a - b)
  let tally = start
  const steps = moments.map(([at, dated]) => {
    const changes = dated
      .map(({ change }) => change)
      .sort((a, b) => a.designation.localeCompare(b.designation))
    tally = changes.reduce(moved, tally)
    return { at, changes, tally }
  })
  return { start, steps }
}

function changesOf({ kitId, designation, periods }: ForecastKit): { at: EpochMs; change: ForecastChange }[] {
  const steps = horizonOf(periods)
  return steps.flatMap(({ until, verdict, cause }, place) => {
    const next = steps[place + 1]
    if (until === null || !next) return []
    return [{ at: until, change: { kitId, designation, before: verdict, after: next.verdict, cause } }]
  })
}

function tallyOf(verdicts: readonly Verdict[]): VerdictTally {
  const count = (verdict: Verdict) => verdicts.filter((one) => one === verdict).length
  return Object.fromEntries(VERDICTS.map((verdict) => [verdict, count(verdict)])) as Record<Verdict, number>
}

function moved(tally: VerdictTally, { before, after }: ForecastChange): VerdictTally {
  return { ...tally, [before]: tally[before] - 1, [after]: tally[after] + 1 }
}
