/**
 * A key-down heat test as measured: peak, rise, curve or slope, thermal resistance, and heat against RF
 * loss. Figures only; whether it passes is for the rule in force. Source: calculation sheet, section 6.
 */
import { checkPositive } from './check-range.ts'
import { heatBalance, type HeatBalance } from './core-heat.ts'
import { fitHeatLog, riseData, type HeatFit } from './heat-fit.ts'
import { checkHeatLog, twoPointRise, type HeatLog, type TwoPointRise } from './heat-log.ts'
import { checkNumber, failure, isFailure, type Failure, type Outcome, type Warning } from './outcome.ts'
import { riseModel } from './rise-model.ts'
import { MAX_POWER_W, thermalResistance } from './thermal.ts'

export interface HeatTestInput extends HeatLog {
  /** Carrier power at the device's input, above 0 to 100,000 W. */
  readonly inputW: number
  /** 0 to 1 at the test frequency, from the loss test in force; without it no thermal resistance. */
  readonly efficiency?: number
  /** Mass that warms, kg; without it no heat balance. */
  readonly massKg?: number
  readonly heatCapacityJPerKgK?: number
}

export interface HeatTestMeasurement {
  /** Highest reading, cooling included: a surface can lag the core. deg C. */
  readonly peakC: number
  /** Peak above ambient, K. */
  readonly peakRiseK: number
  readonly twoPoint: TwoPointRise
  /** `E_NO_RISE` here does not spoil the rest: a device that stays cold has been measured too. */
  readonly fit: Outcome<HeatFit>
  /** K/W with its 95 % interval (of the fit alone); null without a curve or an efficiency below 1. */
  readonly resistance: { kPerW: number; lowKPerW: number; highKPerW: number } | null
  readonly balance: HeatBalance | null
  readonly warnings: readonly Warning[]
}

/** Errors as for a heat log, and `E_RANGE` for power, efficiency, mass and heat capacity. */
export function measureHeatTest(test: HeatTestInput): Outcome<HeatTestMeasurement> {
  const bad = checkHeatLog(test) ?? checkDevice(test)
  if (bad) return bad
  const twoPoint = twoPointRise(test)
  if (isFailure(twoPoint)) return twoPoint
  const peakC = test.readings.reduce((peak, reading) => Math.max(peak, reading.temperatureC), -Infinity)
  const fit = fitHeatLog(test)
  const { resistance, warnings } = resistanceOf(test, fit)
  const balance = balanceOf(test, fit)
  return {
    peakC,
    peakRiseK: peakC - test.ambientC,
    twoPoint,
    fit,
    resistance,
    balance,
    warnings: unrepeated([
      ...(isFailure(fit) ? [] : fit.warnings),
      ...warnings,
      ...(balance?.warnings ?? []),
    ]),
  }
}

/**
 * Slope of the first minute of readings, K/s, through ambient when the test began there: for the heat
 * balance of a log without a curve. `E_TOO_FEW` unless two readings lie within a minute of the first.
 */
export function firstMinuteSlope(log: HeatLog): Outcome<number> {
  const bad = checkHeatLog(log)
  if (bad) return bad
  const { timesS, temperaturesC, ...start } = riseData(log)
  const within = timesS.filter((atS) => atS - (timesS[0] ?? 0) <= 60)
  if (within.length < 2)
    return failure('E_TOO_FEW', 'The first minute needs two readings.', { field: 'readings' })
  return riseModel({ timesS: within, temperaturesC: temperaturesC.slice(0, within.length), ...start }).line
    .slopeKPerS
}

function checkDevice(test: HeatTestInput): Failure | undefined {
  const { inputW, efficiency, massKg, heatCapacityJPerKgK } = test
  return (
    checkPositive('inputW', inputW, MAX_POWER_W) ??
    (efficiency === undefined ? undefined : checkNumber('efficiency', efficiency, 0, 1)) ??
    (massKg === undefined ? undefined : checkPositive('massKg', massKg, 1000)) ??
    (heatCapacityJPerKgK === undefined
      ? undefined
      : checkPositive('heatCapacityJPerKgK', heatCapacityJPerKgK, 100_000))
  )
}

function resistanceOf(
  test: HeatTestInput,
  fit: Outcome<HeatFit>,
): Pick<HeatTestMeasurement, 'resistance' | 'warnings'> {
  const { inputW, efficiency } = test
  if (isFailure(fit) || !fit.identifiable || efficiency === undefined)
    return { resistance: null, warnings: [] }
  const thermal = thermalResistance({ steadyRiseK: fit.steadyRiseK, inputW, efficiency })
  if (isFailure(thermal)) return { resistance: null, warnings: [] }
  const { resistanceKPerW: kPerW, heatW, warnings } = thermal
  if (kPerW === null) return { resistance: null, warnings }
  const [lowKPerW, highKPerW] = [fit.steadyRiseLowK / heatW, fit.steadyRiseHighK / heatW]
  return { resistance: { kPerW, lowKPerW, highKPerW }, warnings }
}

function balanceOf(test: HeatTestInput, fit: Outcome<HeatFit>): HeatBalance | null {
  const { massKg, efficiency, inputW, heatCapacityJPerKgK } = test
  if (isFailure(fit) || massKg === undefined || efficiency === undefined) return null
  const slopeKPerS = fit.identifiable ? fit.initialSlopeKPerS : firstMinuteSlope(test)
  if (isFailure(slopeKPerS)) return null
  const balance = heatBalance({
    massKg,
    slopeKPerS,
    inputW,
    efficiency,
    ...(heatCapacityJPerKgK === undefined ? {} : { heatCapacityJPerKgK }),
  })
  return isFailure(balance) ? null : balance
}

/** One warning of a kind: resistance and balance both notice an efficiency of 1. */
function unrepeated(warnings: readonly Warning[]): Warning[] {
  return warnings.filter((warning, at) => warnings.findIndex(({ code }) => code === warning.code) === at)
}
