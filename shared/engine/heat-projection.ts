/**
 * While a heat test runs: where the temperature is heading and when it meets the limit, from the readings so
 * far. Says only what `heat-fit.ts` can say; until then the slope, which meets the limit at the earliest
 * because a real curve bends down. Source: calculation sheet, section 6.
 */
import { fitHeatLog, riseData, type HeatCurveFit, type HeatSlopeFit } from './heat-fit.ts'
import { DEFAULT_THERMOMETER_STEP_K, type HeatLog } from './heat-log.ts'
import { checkNumber, isFailure, type Outcome } from './outcome.ts'
import { fitRise } from './rise-fit.ts'
import { crossingOf, crossingRange, profileCurves } from './rise-profile.ts'

/** Seconds count from the last reading; null = the limit is not reached at this power. */
export type HeatProjection =
  | { readonly state: 'waiting' | 'no-rise' | 'at-limit' }
  | { readonly state: 'slope'; readonly fit: HeatSlopeFit; readonly soonestS: number }
  | {
      readonly state: 'curve'
      readonly fit: HeatCurveFit
      readonly endC: number
      readonly endLowC: number
      readonly endHighC: number
      readonly toLimitS: number | null
      readonly soonestS: number | null
      readonly latestS: number | null
    }

/** `waiting` under two readings. Limit -40 to 1000 deg C. `E_TIME_ORDER`, `E_RANGE` as for a heat log. */
export function projectHeat(log: HeatLog, limitC: number): Outcome<HeatProjection> {
  const bad = checkNumber('limitC', limitC, -40, 1000)
  if (bad) return bad
  const fit = fitHeatLog(log)
  if (isFailure(fit) && !['E_TOO_FEW', 'E_NO_RISE'].includes(fit.code)) return fit
  if (log.readings.some((reading) => reading.temperatureC >= limitC)) return { state: 'at-limit' }
  if (isFailure(fit)) return { state: fit.code === 'E_TOO_FEW' ? 'waiting' : 'no-rise' }
  if (fit.identifiable) return curveProjection(log, limitC, fit)
  return { state: 'slope', fit, soonestS: (limitC - fit.lastC) / fit.slopeKPerS }
}

function curveProjection(log: HeatLog, limitC: number, fit: HeatCurveFit): HeatProjection {
  const ends = {
    endC: log.ambientC + fit.steadyRiseK,
    endLowC: log.ambientC + fit.steadyRiseLowK,
    endHighC: log.ambientC + fit.steadyRiseHighK,
  }
  return { state: 'curve', fit, ...ends, ...timesToLimit(log, limitC) }
}

function timesToLimit(log: HeatLog, limitC: number) {
  const data = riseData(log)
  const rise = fitRise(data, log.thermometerStepK ?? DEFAULT_THERMOMETER_STEP_K)
  if (!rise) return { toLimitS: null, soonestS: null, latestS: null }
  const fromS = data.timesS.at(-1) ?? 0
  const range = crossingRange(profileCurves(data, rise), rise, { limitC, fromS })
  const left = (atS: number) => (Number.isFinite(atS) ? atS - fromS : null)
  return {
    toLimitS: left(crossingOf(rise, { limitC, fromS })),
    soonestS: left(range.soonestS),
    latestS: left(range.latestS),
  }
}
