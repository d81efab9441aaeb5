/**
 * What a test shows besides what it was judged by: figures that make sense of a trend. SWR at the radio beside the
 * loss of a line, the frequency of resonance beside an antenna's SWR, the ambient beside a temperature.
 */
import type { Band, Procedure } from '../vocabulary.ts'
import type { AntennaSweepInputs } from './antenna-sweep.ts'
import type { BatteryCapacityInputs } from './battery-capacity.ts'
import type { HeatTestInputs } from './heat-test.ts'
import type { FeedlineReading } from './line-history.ts'
import type { WorstSwr } from './sweep-baseline.ts'

/** Measures carry their unit in their name. */
export interface SideFigure {
  readonly band: Band | null
  readonly measure:
    'swr' | 'resonanceMHz' | 'swrAtRadio' | 'baselineDb' | 'ambientC' | 'measuredAh' | 'temperatureC'
  readonly value: number
  readonly frequencyMHz: number | null
}

interface Stored {
  readonly procedure: Procedure
  readonly inputs: unknown
  readonly results: unknown
}

/** Empty for procedures that show no more than their findings. */
export function sideFigures({ procedure, inputs, results }: Stored): SideFigure[] {
  switch (procedure) {
    case 'antenna-sweep':
      return sweepFigures(inputs as Partial<AntennaSweepInputs>, results as SweepResults)
    case 'feedline-loss':
      return lineFigures(results as LineResults)
    case 'heat-test':
      return heatFigures(inputs as HeatTestInputs)
    case 'battery-capacity':
      return batteryFigures(inputs as BatteryCapacityInputs, results as { measuredAh?: number })
    default:
      return []
  }
}

function figure(
  measure: SideFigure['measure'],
  value: number | null | undefined,
  more: Partial<SideFigure> = {},
): SideFigure[] {
  return typeof value === 'number' ? [{ band: null, measure, value, frequencyMHz: null, ...more }] : []
}

interface SweepResults {
  readonly worst?: readonly WorstSwr[]
  readonly resonances?: readonly { readonly band: Band; readonly frequencyMHz: number }[]
}

/** Every working point that was read by hand; of a file the point of each band that was judged. */
function sweepFigures(
  inputs: Partial<AntennaSweepInputs>,
  { worst = [], resonances = [] }: SweepResults,
): SideFigure[] {
  const points: readonly WorstSwr[] = inputs.points ?? worst
  return [
    ...points.flatMap(({ band, frequencyMHz, swr }) => figure('swr', swr, { band, frequencyMHz })),
    ...resonances.flatMap(({ band, frequencyMHz }) =>
      figure('resonanceMHz', frequencyMHz, { band, frequencyMHz }),
    ),
  ]
}

interface LineResults {
  readonly readings?: readonly FeedlineReading[]
  readonly baselineDb?: Readonly<Partial<Record<Band, number>>>
}

function lineFigures({ readings = [], baselineDb = {} }: LineResults): SideFigure[] {
  return readings.flatMap(({ band, swrAtRadio }) => [
    ...figure('swrAtRadio', swrAtRadio, { band }),
    ...figure('baselineDb', baselineDb[band], { band }),
  ])
}

const heatFigures = ({ band, ambientC }: HeatTestInputs) => figure('ambientC', ambientC, { band })

const batteryFigures = ({ temperatureC }: BatteryCapacityInputs, { measuredAh }: { measuredAh?: number }) => [
  ...figure('measuredAh', measuredAh),
  ...figure('temperatureC', temperatureC),
]
