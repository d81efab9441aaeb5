/**
 * The warming curve `T = T0 + A (1 - exp(-t/tau))` for a given tau: then A (and T0) are linear, so the best
 * ones and the sum of squares follow directly. Times in s since key-down, temperatures in deg C.
 * Source: lumped capacitance, Incropera and DeWitt, ch. 5 (from memory, verify); calculation sheet, section 6.
 */

export interface RiseData {
  readonly timesS: readonly number[]
  readonly temperaturesC: readonly number[]
  /** T0 when it is known (started at ambient); otherwise it is the third unknown. */
  readonly fixedStartC?: number
}

/** The best curve of one tau. */
export interface RiseCurve {
  readonly tauS: number
  readonly startC: number
  /** A, K. */
  readonly riseK: number
  /** Sum of squared residuals, K2. */
  readonly sse: number
  /** The curve's own precision, see `leverageAt`. */
  readonly precision: { readonly ofMean: number; readonly meanShape: number; readonly spread: number }
}

/** The limit of long tau: a straight line, through T0 when that is fixed. */
export interface RiseLine {
  readonly slopeKPerS: number
  readonly sse: number
}

export interface RiseModel {
  /** A and tau, and T0 unless fixed. */
  readonly unknowns: 2 | 3
  readonly line: RiseLine
  readonly curveAt: (tauS: number) => RiseCurve
}

/** Readings are copied once and one buffer is reused: a fit asks for some five hundred curves. */
export function riseModel(data: RiseData): RiseModel {
  const timesS = Float64Array.from(data.timesS)
  const temperaturesC = Float64Array.from(data.temperaturesC)
  const shape = new Float64Array(timesS.length)
  const { slope, sse } = regress(timesS, temperaturesC, data.fixedStartC)

  function curveAt(tauS: number): RiseCurve {
    for (let i = 0; i < shape.length; i++) shape[i] = -Math.expm1(-(timesS[i] ?? 0) / tauS)
    const fit = regress(shape, temperaturesC, data.fixedStartC)
    const precision = { ofMean: fit.ofMean, meanShape: fit.meanX, spread: fit.sxx }
    return { tauS, startC: fit.intercept, riseK: fit.slope, sse: fit.sse, precision }
  }

  return { unknowns: data.fixedStartC === undefined ? 3 : 2, line: { slopeKPerS: slope, sse }, curveAt }
}

/**
 * Variance of the fitted temperature where the curve has gone the part `shape` (0 to 1) of its way, as a
 * multiple of the variance of one reading; 1 is the end temperature.
 */
export function leverageAt({ precision }: RiseCurve, shape: number): number {
  const { ofMean, meanShape, spread } = precision
  return ofMean + (spread > 0 ? (shape - meanShape) ** 2 / spread : 0)
}

interface Regression {
  readonly intercept: number
  readonly slope: number
  readonly sse: number
  readonly meanX: number
  readonly sxx: number
  /** Weight of the mean: 1/n, or 0 through a fixed intercept. */
  readonly ofMean: number
}

/** Least squares of y on x, about the means or through a fixed intercept. */
function regress(x: Float64Array, y: Float64Array, fixed: number | undefined): Regression {
  const meanX = fixed === undefined ? mean(x) : 0
  const meanY = fixed === undefined ? mean(y) : fixed
  let sxx = 0
  let sxy = 0
  for (let i = 0; i < x.length; i++) {
    const dx = (x[i] ?? 0) - meanX
    sxx += dx * dx
    sxy += dx * ((y[i] ?? 0) - meanY)
  }
  // No spread in x (every reading long after the curve has ended): the slope is free, so none is claimed.
  const slope = sxx > 0 ? sxy / sxx : 0
  let sse = 0
  for (let i = 0; i < x.length; i++) {
    const residual = (y[i] ?? 0) - meanY - slope * ((x[i] ?? 0) - meanX)
    sse += residual * residual
  }
  const ofMean = fixed === undefined ? 1 / x.length : 0
  return { intercept: meanY - slope * meanX, slope, sse, meanX, sxx, ofMean }
}

function mean(values: Float64Array): number {
  let sum = 0
  for (let i = 0; i < values.length; i++) sum += values[i] ?? 0
  return sum / values.length
}
