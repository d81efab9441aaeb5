/**
 * Standard errors of the warming curve's unknowns, `Cov = s2 (J^T J)^-1`, columns of J
 * `[1], 1 - exp(-t/tau), -(A t/tau^2) exp(-t/tau)`. The column of tau is kept per unit of ln tau, so that
 * the three columns are of like size. Source: calculation sheet, section 6.
 */
import type { RiseCurve, RiseData } from './rise-model.ts'

/** Undefined where the readings do not tell the unknowns apart; the start has none when it is fixed. */
export interface RiseStandardErrors {
  readonly startSeK?: number
  readonly riseSeK?: number
  readonly tauSeS?: number
}

export function riseStandardErrors(data: RiseData, best: RiseCurve, variance: number): RiseStandardErrors {
  const { tauS, riseK } = best
  const decay = data.timesS.map((t) => Math.exp(-t / tauS))
  const shape = data.timesS.map((t) => -Math.expm1(-t / tauS))
  const ofTau = data.timesS.map((t, i) => -((riseK * t) / tauS) * (decay[i] ?? 0))
  if (data.fixedStartC === undefined) {
    const [start, rise, lnTau] = inverseDiagonal3([shape.map(() => 1), shape, ofTau])
    return named(variance, { start, rise, lnTau }, tauS)
  }
  const [rise, lnTau] = inverseDiagonal2(shape, ofTau)
  return named(variance, { rise, lnTau }, tauS)
}

type Diagonal = { start?: number; rise?: number; lnTau?: number }

function named(variance: number, { start, rise, lnTau }: Diagonal, tauS: number): RiseStandardErrors {
  const se = (element: number) => Math.sqrt(variance * element)
  return {
    ...(start === undefined ? {} : { startSeK: se(start) }),
    ...(rise === undefined ? {} : { riseSeK: se(rise) }),
    ...(lnTau === undefined ? {} : { tauSeS: tauS * se(lnTau) }),
  }
}

function dot(a: readonly number[], b: readonly number[]): number {
  return a.reduce((sum, value, i) => sum + value * (b[i] ?? 0), 0)
}

/** Diagonal of the inverse of the 2 x 2 matrix of products, or nothing when it is singular. */
function inverseDiagonal2(u: readonly number[], v: readonly number[]): number[] {
  const [uu, vv, uv] = [dot(u, u), dot(v, v), dot(u, v)]
  const determinant = uu * vv - uv * uv
  return determinant > 1e-14 * uu * vv ? [vv / determinant, uu / determinant] : []
}

/** The same for three columns, by cofactors. */
function inverseDiagonal3([a, b, c]: readonly [number[], number[], number[]]): number[] {
  const [aa, bb, cc] = [dot(a, a), dot(b, b), dot(c, c)]
  const [ab, ac, bc] = [dot(a, b), dot(a, c), dot(b, c)]
  const cofactors = [bb * cc - bc * bc, aa * cc - ac * ac, aa * bb - ab * ab]
  const determinant = aa * (cofactors[0] ?? 0) - ab * (ab * cc - bc * ac) + ac * (ab * bc - bb * ac)
  if (!(determinant > 1e-14 * aa * bb * cc)) return []
  return cofactors.map((cofactor) => Math.max(0, cofactor) / determinant)
}
