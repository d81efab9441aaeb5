import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import { heatCurve, type HeatCurvePoint } from '#shared/engine/heat-curve.ts'
import { fitHeatLog, type HeatFit } from '#shared/engine/heat-fit.ts'
import { projectHeat, type HeatProjection } from '#shared/engine/heat-projection.ts'
import { isFailure, type Outcome } from '#shared/engine/outcome.ts'
import { limitsOf } from '#shared/engine/policy/limits.ts'
import type { HeatTestInputs, HeatTestLimits } from '#shared/engine/procedures/heat-test.ts'

/** What a key-down heat test says, ready to be drawn and told. Temperatures in deg C, times in s since key-down. */
export interface HeatPicture {
  readonly inputs: HeatTestInputs
  readonly limits: HeatTestLimits
  readonly fit: Outcome<HeatFit>
  readonly projection: HeatProjection | null
  /** Null where the log carries no curve. */
  readonly curve: readonly HeatCurvePoint[] | null
  /** Where the time axis ends. */
  readonly untilS: number
  /** Highest while keyed, which is judged; a surface may go on warming once the key is up. */
  readonly peakC: number
  /** The power that each mode allows, as the engine said it then; null where it could not. */
  readonly allowed: string | null
}

/** How far beyond the log a curve is drawn at most, in lengths of the log: farther it is no more than a direction. */
const FARTHEST = 3

export function heatPicture(test: StoredTest): HeatPicture {
  const inputs = test.inputs as unknown as HeatTestInputs
  const limits = limitsOf('heat-test', test.judgedBy.rule ?? undefined)
  const { readings, ambientC, keyUpAtS } = inputs
  const log = { readings, ambientC, keyUpAtS }
  const fit = fitHeatLog(log)
  const said = projectHeat(log, limits.maxC)
  const projection = isFailure(said) ? null : said
  const untilS = timeAxisEnd(inputs, limits, projection)
  const curve = heatCurve(log, untilS)
  return {
    inputs,
    limits,
    fit,
    projection,
    curve: isFailure(curve) ? null : curve,
    untilS,
    allowed: (test.results as { allowance?: { sentence?: string } }).allowance?.sentence ?? null,
    peakC: readings.reduce(
      (peak, { atS, temperatureC }) => (atS <= keyUpAtS ? Math.max(peak, temperatureC) : peak),
      -Infinity,
    ),
  }
}

function timeAxisEnd(
  { readings, keyUpAtS }: HeatTestInputs,
  { minutes }: HeatTestLimits,
  projection: HeatProjection | null,
): number {
  const meetsS =
    projection?.state === 'curve' && projection.toLimitS !== null ? keyUpAtS + projection.toLimitS : 0
  const wanted = Math.max(readings.at(-1)?.atS ?? 0, minutes * 60, meetsS * 1.1)
  return Math.max(readings.at(-1)?.atS ?? 0, Math.min(wanted, keyUpAtS * FARTHEST))
}
