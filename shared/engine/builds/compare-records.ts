import { compareBuilds, type Build, type BuildComparison } from '../build-comparison.ts'
import type { HeatRun } from '../build-heat.ts'
import { groupBy } from '../group-by.ts'
import { median } from '../median.ts'
import type { Outcome } from '../outcome.ts'
import type { Band } from '../vocabulary.ts'
import { isSameLength } from './alike-runs.ts'
import type { BuildRecord } from './build-record.ts'
import { byBandOrder } from './unit-figures.ts'

/** Half of the power is heat: nobody goes on the air with that. Our choice; the policy's limit is far below. */
export const UNUSABLE_ABOVE_DB = 3

export interface NamedRecord {
  readonly id: string
  readonly record: BuildRecord
}

export interface RecordComparison extends BuildComparison {
  /** The run that the rises are compared by: the one that most builds and most units have. */
  readonly run: Omit<SharedRun, 'rises'> | null
}

/** Compares build sheets by what all their units lose. Sheets without a measured unit take no part. */
export function compareRecords(sheets: readonly NamedRecord[]): Outcome<RecordComparison> {
  const run = sharedRun(sheets)
  const builds = sheets.map((sheet) => buildOf(sheet, run)).filter(({ units }) => units.length > 0)
  const compared = compareBuilds(builds, UNUSABLE_ABOVE_DB)
  if ('code' in compared) return compared
  return { ...compared, run: run && { band: run.band, minutes: run.minutes, powerW: run.powerW } }
}

function buildOf({ id, record }: NamedRecord, run: SharedRun | null): Build {
  const units = record.units.flatMap(({ unitId, figures }) => {
    const losses = figures.filter(({ measure }) => measure === 'lossDb').toSorted(byBandOrder)
    const lossDb = Object.fromEntries(losses.map(({ band, value }) => [band, value]))
    return losses.length > 0 ? [{ label: unitId, lossDb }] : []
  })
  const rises = run?.rises.get(id)
  const heat: HeatRun | undefined =
    run && rises ? { riseK: median(rises), powerW: run.powerW, minutes: run.minutes } : undefined
  return { name: id, units, ...(heat && { heat }) }
}

interface SharedRun {
  readonly band: Band
  readonly minutes: number
  readonly powerW: number
  /** Rises of the units of each build. */
  readonly rises: ReadonlyMap<string, readonly number[]>
}

/** Rises are compared only between like runs, so one kind of run is chosen for all. */
function sharedRun(sheets: readonly NamedRecord[]): SharedRun | null {
  const runs = sheets.flatMap(({ id, record }) =>
    record.units.flatMap(({ figures }) =>
      figures.flatMap(({ band, run }) => (run && run.riseK >= 0 ? [{ id, band, ...run }] : [])),
    ),
  )
  const alike = groupBy(runs, ({ band, powerW }) => `${band} ${powerW}`)
  // Each length that was run stands for all within a hand's breadth of it; the one that gathers most is compared by.
  const kinds = [...alike.values()].flatMap((list) =>
    list.map(({ band, powerW, minutes }) => {
      const same = list.filter((one) => isSameLength(one.minutes, minutes))
      const byBuild = groupBy(same, ({ id }) => id)
      const rises = new Map([...byBuild].map(([id, own]) => [id, own.map(({ riseK }) => riseK)]))
      return { band, powerW, minutes, rises, units: same.length }
    }),
  )
  const [best] = kinds.toSorted(
    (a, b) => b.rises.size - a.rises.size || b.units - a.units || b.minutes - a.minutes,
  )
  return best && best.rises.size > 1 ? best : null
}
