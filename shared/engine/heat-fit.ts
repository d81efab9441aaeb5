/**
 * What a heat log can honestly say: time constant and end temperature when the data carries them, else the
 * slope alone. Identifiability is our choice, built on the F-test: enough readings, a straight line fits
 * significantly worse, the interval of tau is finite and no wider than tau itself.
 * Source: calculation sheet, section 6.
 */
import {
  checkHeatLog,
  DEFAULT_THERMOMETER_STEP_K,
  keyedReadings,
  startsAtAmbient,
  type HeatLog,
} from './heat-log.ts'
import { failure, type Outcome, type Warning } from './outcome.ts'
import { fitRise, type RiseFit } from './rise-fit.ts'
import { riseModel, type RiseData } from './rise-model.ts'
import { endRange, profileCurves } from './rise-profile.ts'

export type NotIdentifiable = 'too-few-readings' | 'straight-line-fits' | 'no-upper-end' | 'interval-too-wide'

interface HeatFitBasis {
  readonly start: 'ambient' | 'warm'
  readonly readings: number
  /** From the first to the last reading while keyed, s. */
  readonly spanS: number
  readonly firstC: number
  readonly lastC: number
  readonly warnings: readonly Warning[]
}

/** Intervals are 95 %. */
export interface HeatCurveFit extends HeatFitBasis {
  readonly identifiable: true
  readonly tauS: number
  readonly tauLowS: number
  readonly tauHighS: number
  /** T0 and A of the curve. */
  readonly curveStartC: number
  readonly riseK: number
  /** Above ambient when keyed for ever at this power. */
  readonly steadyRiseK: number
  readonly steadyRiseLowK: number
  readonly steadyRiseHighK: number
  /** A/tau: the slope at key-down, before any heat leaves. */
  readonly initialSlopeKPerS: number
  readonly rmseK: number
}

/** The log is too short, too few or too noisy to say: no tau, end temperature or thermal resistance. */
export interface HeatSlopeFit extends HeatFitBasis {
  readonly identifiable: false
  readonly because: readonly NotIdentifiable[]
  /** The larger of the fitted line's slope and the whole rise over the whole span. */
  readonly slopeKPerS: number
}

export type HeatFit = HeatCurveFit | HeatSlopeFit

/** A rise below this over the whole log is rounding of binary fractions, K. */
const ROUNDING_K = 1e-9

/** `E_TOO_FEW`, `E_TIME_ORDER`, `E_RANGE`, `E_NO_RISE`; `W_EXTRAPOLATED`, `W_SURFACE_LAG`. */
export function fitHeatLog(log: HeatLog): Outcome<HeatFit> {
  const bad = checkHeatLog(log)
  if (bad) return bad
  const data = riseData(log)
  const fit = fitRise(data, log.thermometerStepK ?? DEFAULT_THERMOMETER_STEP_K)
  const basis = basisOf(log, data)
  const slopeKPerS = Math.max(riseModel(data).line.slopeKPerS, (basis.lastC - basis.firstC) / basis.spanS)
  if ((fit && fit.riseK <= 0) || slopeKPerS * basis.spanS < ROUNDING_K)
    return failure('E_NO_RISE', 'The temperature did not rise: check the probe, the power and the ambient.', {
      field: 'readings',
    })
  const because = fit ? notIdentifiable(fit, data.timesS.length) : (['too-few-readings'] as const)
  if (!fit || because.length > 0) return { ...basis, identifiable: false, because, slopeKPerS }
  return curveFit(log, { basis, data, fit })
}

/** The keyed readings in the form the curve is fitted to. The log must have passed `checkHeatLog`. */
export function riseData(log: HeatLog): RiseData {
  const keyed = keyedReadings(log)
  return {
    timesS: keyed.map((reading) => reading.atS),
    temperaturesC: keyed.map((reading) => reading.temperatureC),
    ...(startsAtAmbient(log) ? { fixedStartC: log.ambientC } : {}),
  }
}

function notIdentifiable(fit: RiseFit, readings: number): NotIdentifiable[] {
  const because: NotIdentifiable[] = []
  if (readings < fit.unknowns + 3) because.push('too-few-readings')
  if (fit.lineF <= fit.criticalF) because.push('straight-line-fits')
  if (fit.tauHighS === Infinity) because.push('no-upper-end')
  else if ((fit.tauHighS - fit.tauLowS) / fit.tauS > 1) because.push('interval-too-wide')
  return because
}

function basisOf(log: HeatLog, data: RiseData): HeatFitBasis {
  const spanS = (data.timesS.at(-1) ?? 0) - (data.timesS[0] ?? 0)
  return {
    start: startsAtAmbient(log) ? 'ambient' : 'warm',
    readings: data.timesS.length,
    spanS,
    firstC: data.temperaturesC[0] ?? 0,
    lastC: data.temperaturesC.at(-1) ?? 0,
    warnings: spanS > 30 ? [] : [SURFACE_LAG],
  }
}

function curveFit(log: HeatLog, from: { basis: HeatFitBasis; data: RiseData; fit: RiseFit }): HeatCurveFit {
  const { basis, data, fit } = from
  const end = endRange(profileCurves(data, fit), fit)
  return {
    ...basis,
    identifiable: true,
    tauS: fit.tauS,
    tauLowS: fit.tauLowS,
    tauHighS: fit.tauHighS,
    curveStartC: fit.startC,
    riseK: fit.riseK,
    steadyRiseK: fit.startC + fit.riseK - log.ambientC,
    steadyRiseLowK: end.lowC - log.ambientC,
    steadyRiseHighK: end.highC - log.ambientC,
    initialSlopeKPerS: fit.riseK / fit.tauS,
    rmseK: fit.rmseK,
    warnings: basis.spanS < fit.tauS ? [...basis.warnings, EXTRAPOLATED] : basis.warnings,
  }
}

const EXTRAPOLATED: Warning = {
  code: 'W_EXTRAPOLATED',
  message: 'The log is shorter than the time constant: the end temperature lies far beyond it.',
}

const SURFACE_LAG: Warning = {
  code: 'W_SURFACE_LAG',
  message: 'The surface follows the core by about half a minute: do not judge the slope on 30 s alone.',
}
