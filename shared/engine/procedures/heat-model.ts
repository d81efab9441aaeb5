/**
 * What the thermometer's log says beyond pass or fail: the curve with its interval or that the log is too short for
 * one, the thermal resistance, heat against RF loss, and the power that each mode allows. Information beside the
 * judged limit; it decides nothing. Source: calculation sheet, section 6.
 */
import type { HeatFit, NotIdentifiable } from '../heat-fit.ts'
import type { HeatTestMeasurement } from '../heat-test.ts'
import { whyTooShort } from '../heat-too-short.ts'
import { isFailure } from '../outcome.ts'
import { powerAllowance, type PowerAllowance } from '../power-allowance.ts'
import type { Band } from '../vocabulary.ts'
import { figure } from './judgement.ts'

/** What a heat test reads off other records of the same transformer. */
export interface HeatFacts {
  /** By the efficiency test in force on the day, for the test's own band. */
  readonly efficiency?: Readonly<Partial<Record<Band, EfficiencyInForce>>>
  /** Of the core alone, weighed or computed; g. */
  readonly coreMassG?: number | undefined
  /** What it is built for; W. */
  readonly ratedWatts?: number | undefined
}

export interface EfficiencyInForce {
  readonly efficiency: number
  readonly testId: string
}

interface Tested {
  readonly measured: HeatTestMeasurement
  readonly inForce: EfficiencyInForce | undefined
  readonly ambientC: number
  readonly maxC: number
  /** Power that the allowance is asked about, W. */
  readonly fullW: number
}

/** The part of a heat test's results that is about the model. */
export function heatModel(tested: Tested): Readonly<Record<string, unknown>> {
  const { measured, inForce } = tested
  return {
    fit: isFailure(measured.fit)
      ? { identifiable: false, says: measured.fit.message }
      : fitResult(measured.fit),
    ...(inForce && { efficiencyUsed: inForce }),
    ...(measured.resistance && { resistance: measured.resistance }),
    ...(measured.balance && { balance: withoutWarnings(measured.balance) }),
    ...allowance(tested),
  }
}

function fitResult(fit: HeatFit): Readonly<Record<string, unknown>> {
  const { warnings: _, ...figures } = fit
  return fit.identifiable ? figures : { ...figures, says: tooShort(fit.because) }
}

function tooShort(because: readonly NotIdentifiable[]): string {
  return `This log is too short to say where the temperature would end: ${whyTooShort(because)}.`
}

function withoutWarnings({ warnings: _, ...figures }: NonNullable<HeatTestMeasurement['balance']>) {
  return figures
}

/** A hot day, unless the test was made on a hotter one. Our choice. */
const HOT_DAY_C = 35

/** The mildest and the hardest use of a band. */
const MODES = [
  ['voice', 'ssb-conversational'],
  ['digital', 'afsk-ssb'],
] as const

interface Allowed {
  readonly mode: (typeof MODES)[number][0]
  readonly allowed: PowerAllowance
}

function allowance(tested: Tested): Readonly<Record<string, unknown>> {
  const { measured, inForce, maxC, fullW } = tested
  const { fit, resistance } = measured
  if (isFailure(fit) || !fit.identifiable || !resistance || !inForce) return {}
  const ambientC = Math.max(HOT_DAY_C, tested.ambientC)
  const common = {
    radioW: fullW,
    resistanceKPerW: resistance.kPerW,
    tauS: fit.tauS,
    efficiency: inForce.efficiency,
    ambientC,
    limitC: maxC,
  }
  const modes = MODES.flatMap(([mode, emission]): Allowed[] => {
    const allowed = powerAllowance({ ...common, emission })
    return isFailure(allowed) ? [] : [{ mode, allowed }]
  })
  if (modes.length === 0) return {}
  const said = modes.map(({ mode, allowed }) => sentencePart(mode, allowed))
  return {
    allowance: {
      ambientC,
      modes: modes.map(({ mode, allowed }) => ({ mode, ...allowed })),
      sentence: `On a day of ${figure(ambientC, 0)} °C, to get no hotter than ${figure(maxC, 0)} °C: ${said.join('; ')}.`,
    },
  }
}

/** Rounded down: a limit is not rounded up. */
function sentencePart(mode: string, { withoutBreakW, fullPower, longestOverS }: PowerAllowance): string {
  if (fullPower) return `${mode} at ${figure(withoutBreakW, 0)} W without a break`
  const longest =
    longestOverS === null
      ? ''
      : `, or full power for ${figure(Math.floor(longestOverS / 6) / 10, 1)} min at a time`
  return `${mode} at ${Math.floor(withoutBreakW)} W without a break${longest}`
}
