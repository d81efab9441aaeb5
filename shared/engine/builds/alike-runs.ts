import { groupBy } from '../group-by.ts'
import type { UnitFigure } from './unit-figures.ts'

/** A hand on the key: lengths this far apart are the same. Our choice, as for the judgement of a run. */
const SAME_MINUTES = 5 / 60

/** Lengths that a few seconds of a hand on the key tell apart, and no more. */
export const isSameLength = (minutes: number, other: number): boolean =>
  Math.abs(minutes - other) <= SAME_MINUTES

export interface RunOfUnit {
  readonly unitId: string
  readonly figure: UnitFigure
}

/**
 * A rise depends on how long the key was down, so only runs of one length are compared: on each band the length that
 * most units have, the longer of two. Of a unit's runs of that length the newest counts, at whatever power: below the
 * point where a core runs away the rise goes with the power.
 */
export function alikeRuns(runs: readonly RunOfUnit[]): RunOfUnit[] {
  const byBand = groupBy(runs, ({ figure }) => figure.band)
  return [...byBand.values()].flatMap((ofBand) => {
    const minutes = usualMinutes(ofBand)
    const alike = ofBand.filter((run) => isAlike(run, minutes))
    return [...groupBy(alike, ({ unitId }) => unitId).values()].flatMap(([newest]) => newest ?? [])
  })
}

function usualMinutes(runs: readonly RunOfUnit[]): number {
  const units = (minutes: number) =>
    new Set(runs.filter((run) => isAlike(run, minutes)).map(({ unitId }) => unitId)).size
  const lengths = runs.map(({ figure }) => figure.run?.minutes ?? 0)
  return lengths.reduce((best, one) => {
    const more = units(one) - units(best)
    return more > 0 || (more === 0 && one > best) ? one : best
  }, lengths[0] ?? 0)
}

const isAlike = ({ figure }: RunOfUnit, minutes: number) => isSameLength(figure.run?.minutes ?? 0, minutes)
