/**
 * The fitted warming curve with its interval, from key-down to a time beyond the log: what a picture of a heat test is
 * drawn from. Only where `heat-fit.ts` says that the log carries a curve. Source: calculation sheet, section 6.
 */
import { fitHeatLog, riseData } from './heat-fit.ts'
import { DEFAULT_THERMOMETER_STEP_K, type HeatLog } from './heat-log.ts'
import { checkNumber, isFailure, type Outcome } from './outcome.ts'
import { fitRise } from './rise-fit.ts'
import { profileCurves, rangeAt } from './rise-profile.ts'

/** Temperatures at a time since key-down; the interval is 95 %. */
export interface HeatCurvePoint {
  readonly atS: number
  readonly bestC: number
  readonly lowC: number
  readonly highC: number
}

/** Points of the curve, evenly in time, ends included. */
const POINTS = 49

/**
 * From 0 to `untilS` (1 to 604,800 s); null where the log is too short, too few or too noisy for a curve.
 * Errors of `fitHeatLog`.
 */
export function heatCurve(log: HeatLog, untilS: number): Outcome<HeatCurvePoint[] | null> {
  const bad = checkNumber('untilS', untilS, 1, 604_800)
  if (bad) return bad
  const said = fitHeatLog(log)
  if (isFailure(said)) return said
  const data = riseData(log)
  const fit = said.identifiable
    ? fitRise(data, log.thermometerStepK ?? DEFAULT_THERMOMETER_STEP_K)
    : undefined
  if (!fit) return null
  const curves = profileCurves(data, fit)
  return Array.from({ length: POINTS }, (_, i) => {
    const atS = (untilS * i) / (POINTS - 1)
    const bestC = fit.startC - fit.riseK * Math.expm1(-atS / fit.tauS)
    return { atS, bestC, ...rangeAt(curves, fit, atS) }
  })
}
