/**
 * What a test shows besides what it was judged by: figures that make sense of a trend. SWR at the radio beside the
 * loss of a line, the frequency of resonance beside an antenna's SWR, the ambient beside a temperature.
 */
import type { Band } from '../vocabulary.ts'
import type { AntennaSweepInputs } from './antenna-sweep.ts'
import type { FeedlineLossInputs } from './feedline-loss.ts'
import type { HeatTestInputs } from './heat-test.ts'
import type { Performance } from './judge-test.ts'

/** Measures carry their unit in their name. */
export interface SideFigure {
  readonly band: Band | null
  readonly measure:
    'swr' | 'resonanceMHz' | 'swrAtRadio' | 'baselineDb' | 'ambientC' | 'measuredAh' | 'temperatureC'
  readonly value: number
  readonly frequencyMHz: number | null
}

interface Stored {
  readonly procedure: Performance['procedure'] | (string & {})
  readonly inputs: unknown
  readonly results: unknown
}

/** Empty for procedures that show no more than their findings. */
export function sideFigures({ procedure, inputs, results }: Stored): SideFigure[] {
  switch (procedure) {
    case 'antenna-sweep':
      return sweepFigures(inputs as AntennaSweepInputs)
    case 'feedline-loss':
      return lineFigures(
        inputs as FeedlineLossInputs,
        results as { baselineDb?: Partial<Record<Band, number>> },
      )
    case 'heat-test':
      return heatFigures(inputs as HeatTestInputs)
    case 'battery-capacity':
      return batteryFigures(inputs as { temperatureC: number }, results as { measuredAh?: number })
    default:
      return []
  }
}

function figure(
  measure: SideFigure['measure'],
  value: number | undefined,
  more: Partial<SideFigure> = {},
): SideFigure[] {
  return value === undefined ? [] : [{ band: null, measure, value, frequencyMHz: null, ...more }]
}

function sweepFigures({ points = [], resonances = [] }: Partial<AntennaSweepInputs>): SideFigure[] {
  return [
    ...points.flatMap(({ band, frequencyMHz, swr }) => figure('swr', swr, { band, frequencyMHz })),
    ...resonances.flatMap(({ band, frequencyMHz }) =>
      figure('resonanceMHz', frequencyMHz, { band, frequencyMHz }),
    ),
  ]
}

function lineFigures(
  { readings = [] }: Partial<FeedlineLossInputs>,
  { baselineDb = {} }: { baselineDb?: Partial<Record<Band, number>> },
): SideFigure[] {
  return readings.flatMap(({ band, swrAtRadio }) => [
    ...figure('swrAtRadio', swrAtRadio, { band }),
    ...figure('baselineDb', baselineDb[band], { band }),
  ])
}

const heatFigures = ({ band, ambientC }: HeatTestInputs) => figure('ambientC', ambientC, { band })

const batteryFigures = (
  { temperatureC }: { temperatureC: number },
  { measuredAh }: { measuredAh?: number },
) => [...figure('measuredAh', measuredAh), ...figure('temperatureC', temperatureC)]
