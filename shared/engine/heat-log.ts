/**
 * The temperatures of a key-down heat test as logged. Readings after key-up (cooling) belong to the record
 * and to the peak, not to the fit. Source: calculation sheet, section 6.
 */
import { checkNumber, failure, type Failure, type Outcome } from './outcome.ts'

export interface HeatReading {
  /** Seconds since key-down, 0 to 604,800. */
  readonly atS: number
  /** -40 to 300 deg C. */
  readonly temperatureC: number
}

export interface HeatLog {
  readonly readings: readonly HeatReading[]
  /** -40 to 85 deg C. */
  readonly ambientC: number
  /** When the key was released, s since key-down; readings after it are cooling. */
  readonly keyUpAtS?: number
  /** The smallest step the thermometer shows, K, 0 to 10; 0.1 unless given. */
  readonly thermometerStepK?: number
  /** Whether the device began at ambient; unless given, yes when the first reading is within 2 K of it. */
  readonly start?: 'ambient' | 'warm'
}

/** Two points: the whole rise and its rate. Never a time constant or an end temperature. */
export interface TwoPointRise {
  readonly riseK: number
  readonly rateKPerMin: number
  readonly fromS: number
  readonly toS: number
}

export const DEFAULT_THERMOMETER_STEP_K = 0.1
const AMBIENT_START_WITHIN_K = 2
const WEEK_S = 604_800

/**
 * `E_TOO_FEW` under two readings while keyed; `E_TIME_ORDER` and `E_RANGE` with the 1-based row as `line`.
 */
export function checkHeatLog(log: HeatLog): Failure | undefined {
  const { readings, ambientC, keyUpAtS, thermometerStepK = DEFAULT_THERMOMETER_STEP_K } = log
  const bad =
    checkNumber('ambientC', ambientC, -40, 85) ??
    checkNumber('thermometerStepK', thermometerStepK, 0, 10) ??
    (keyUpAtS === undefined ? undefined : checkNumber('keyUpAtS', keyUpAtS, 0, WEEK_S))
  if (bad) return bad
  if (!Array.isArray(readings))
    return failure('E_MISSING', 'readings are missing: log at least two.', { field: 'readings' })
  const badRow = checkRows(readings)
  if (badRow) return badRow
  if (keyedReadings(log).length >= 2) return undefined
  return failure('E_TOO_FEW', 'A heat test needs at least two readings while keyed.', { field: 'readings' })
}

/** The readings from key-down to key-up. */
export function keyedReadings({ readings, keyUpAtS = Infinity }: HeatLog): HeatReading[] {
  return readings.filter((reading) => reading.atS <= keyUpAtS)
}

export function startsAtAmbient(log: HeatLog): boolean {
  if (log.start) return log.start === 'ambient'
  const first = log.readings[0]
  return first !== undefined && Math.abs(first.temperatureC - log.ambientC) <= AMBIENT_START_WITHIN_K
}

/** First and last reading while keyed. The rise may be zero or negative: it is what was read. */
export function twoPointRise(log: HeatLog): Outcome<TwoPointRise> {
  const bad = checkHeatLog(log)
  if (bad) return bad
  const keyed = keyedReadings(log)
  const first = keyed[0] as HeatReading
  const last = keyed.at(-1) as HeatReading
  const riseK = last.temperatureC - first.temperatureC
  return { riseK, rateKPerMin: (riseK / (last.atS - first.atS)) * 60, fromS: first.atS, toS: last.atS }
}

function checkRows(readings: readonly HeatReading[]): Failure | undefined {
  let before = -1
  for (const [index, reading] of readings.entries()) {
    const bad =
      checkNumber('atS', reading?.atS, 0, WEEK_S) ??
      checkNumber('temperatureC', reading?.temperatureC, -40, 300)
    if (bad) return { ...bad, line: index + 1 }
    if (reading.atS <= before) {
      const message = `Reading ${index + 1} is not later than the one before: times must increase.`
      return failure('E_TIME_ORDER', message, { field: 'atS', line: index + 1 })
    }
    before = reading.atS
  }
  return undefined
}
