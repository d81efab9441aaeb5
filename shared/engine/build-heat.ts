import { checkPositive } from './check-range.ts'
import { checkNumber, type Failure } from './outcome.ts'

/** A short run of full carrier: how much one unit of a build warmed. */
export interface HeatRun {
  /** Rise of the hottest surface, 0..500 K. */
  readonly riseK: number
  /** Above 0, up to 1e6 W. */
  readonly powerW: number
  /** Above 0, up to 1440. */
  readonly minutes: number
}

export interface HeatedBuild {
  readonly name: string
  readonly lossDb: number
  readonly heat?: HeatRun
}

export type HeatAgreement =
  | { readonly verdict: 'not-compared' }
  | {
      readonly verdict: 'agrees' | 'disagrees'
      /** Rise over the power sent in, of every build with a run. */
      readonly rises: readonly { readonly name: string; readonly kPerW: number }[]
    }

/** Runs at powers further apart than this are not alike. Our choice. */
const POWER_TOLERANCE = 0.05

/**
 * Whether the build with the lower loss is also the one that warms less, over every pair of builds with alike
 * runs (same minutes, powers within 5 %). The order is all it says: a rise after two minutes depends on
 * mass as well as on loss, and two temperatures tell no end temperature.
 */
export function compareHeat(builds: readonly HeatedBuild[]): HeatAgreement {
  const runs = builds.flatMap(({ name, lossDb, heat }) => (heat ? [{ ...heat, name, lossDb }] : []))
  const pairs = runs.flatMap((one, at) => runs.slice(at + 1).map((other) => [one, other] as const))
  const alike = pairs.filter(([one, other]) => areAlike(one, other))
  if (alike.length === 0) return { verdict: 'not-compared' }
  const agrees = alike.every(([one, other]) => (one.lossDb - other.lossDb) * (one.riseK - other.riseK) >= 0)
  return {
    verdict: agrees ? 'agrees' : 'disagrees',
    rises: runs.map(({ name, riseK, powerW }) => ({ name, kPerW: riseK / powerW })),
  }
}

function areAlike(one: HeatRun, other: HeatRun): boolean {
  const apart = Math.abs(one.powerW - other.powerW) / Math.max(one.powerW, other.powerW)
  return one.minutes === other.minutes && apart <= POWER_TOLERANCE
}

/** `E_NUMBER` or `E_RANGE` unless within the ranges of `HeatRun`. */
export function checkHeatRun({ riseK, powerW, minutes }: HeatRun): Failure | undefined {
  return (
    checkNumber('riseK', riseK, 0, 500) ??
    checkPositive('powerW', powerW, 1e6) ??
    checkPositive('minutes', minutes, 1440)
  )
}
