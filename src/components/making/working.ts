import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import type { UnitText } from '@/components/picture/heat-words.ts'
import { numberText, quantityText } from '@/format/quantity.ts'

type Working = (test: StoredTest, text: UnitText) => string[]

/** The way from what was read to the figures that were judged, line by line with the numbers of this test. */
export function workingOf(test: StoredTest, text: UnitText): string[] {
  return WORKINGS[test.procedure]?.(test, text) ?? []
}

const db = (value: number) => quantityText(value, 'dB', 2)
const percent = (fraction: number) => quantityText(fraction * 100, '%', 1)
const mhz = (hz: number) => quantityText(hz / 1e6, 'MHz', 3)

interface PairRow {
  readonly band: Band
  readonly lossDb: number
  readonly efficiency: number
  readonly frequencyHz?: number
}

const rowsOf = ({ results }: StoredTest) => (results.bands ?? []) as readonly PairRow[]

function pairWorking(test: StoredTest): string[] {
  const readings = (test.inputs.bands ?? []) as readonly (
    string | { band: Band; inW: number; outW: number }
  )[]
  return rowsOf(test).map((row) => {
    const read = readings.find((one) => typeof one !== 'string' && one.band === row.band)
    if (typeof read !== 'object') return sweptWorking(row)
    return (
      `${row.band}: ${quantityText(read.inW, 'W', 2)} in, ${quantityText(read.outW, 'W', 2)} out. ` +
      `10 log (${numberText(read.inW, 2)} / ${numberText(read.outW, 2)}) = ${db(2 * row.lossDb)} for both, ` +
      `${db(row.lossDb)} for one. 10^(−${numberText(row.lossDb, 2)} / 10) = ${percent(row.efficiency)}.`
    )
  })
}

function sweptWorking({ band, frequencyHz, lossDb, efficiency }: PairRow): string {
  const where = frequencyHz === undefined ? '' : ` at ${mhz(frequencyHz)}, the worst point of the band`
  return `${band}: ${db(lossDb)}${where}. 10^(−${numberText(lossDb, 2)} / 10) = ${percent(efficiency)}.`
}

interface HeatFigures {
  readonly keyedPeakC?: number
  readonly peakC?: number
  readonly rateKPerMin?: number
  readonly keyedMinutes?: number
  readonly fit?: { identifiable: boolean; tauS?: number; riseK?: number; curveStartC?: number; says?: string }
}

function heatWorking({ inputs, results }: StoredTest, text: UnitText): string[] {
  const { keyedPeakC, rateKPerMin, keyedMinutes, fit } = results as HeatFigures
  const ambientC = inputs.ambientC as number
  const lines: string[] = []
  if (keyedPeakC !== undefined)
    lines.push(
      `Highest while keyed ${text(keyedPeakC, '°C', 1)}, ambient ${text(ambientC, '°C', 1)}: a rise of ${text(keyedPeakC - ambientC, 'K', 1)}.`,
    )
  if (rateKPerMin !== undefined && keyedMinutes !== undefined)
    lines.push(
      `First to last reading: ${text(rateKPerMin, 'K', 2)} a minute over ${quantityText(keyedMinutes, 'min', 1)}.`,
    )
  if (fit?.identifiable && fit.tauS !== undefined && fit.riseK !== undefined)
    lines.push(
      `T = ${text(fit.curveStartC ?? ambientC, '°C', 1)} + ${text(fit.riseK, 'K', 1)} × (1 − e^(−t / ${quantityText(fit.tauS / 60, 'min', 1)})).`,
    )
  if (fit?.says) lines.push(fit.says)
  return lines
}

interface LineRow {
  readonly band: Band
  readonly lossDb: number
}

function lineWorking({ results, judgedBy }: StoredTest): string[] {
  const baseline = (results.baselineDb ?? {}) as Partial<Record<Band, number>>
  const rise = judgedBy.rule?.limits.maxRiseDb
  return ((results.readings ?? []) as readonly LineRow[]).map(({ band, lossDb }) => {
    const base = baseline[band]
    if (base === undefined || typeof rise !== 'number') return `${band}: ${db(lossDb)} read.`
    return `${band}: ${db(lossDb)} read; ${db(base)} + ${db(rise)} = ${db(base + rise)} is the limit.`
  })
}

function sweepWorking({ inputs, results }: StoredTest): string[] {
  const points = (inputs.points ?? []) as readonly { band: Band }[]
  const worst = (results.worst ?? []) as readonly { band: Band; frequencyMHz: number; swr: number | null }[]
  return worst.map(({ band, frequencyMHz, swr }) => {
    const count = points.filter((point) => point.band === band).length
    const of =
      count === 0
        ? 'the worst that is judged in the band'
        : count === 1
          ? 'its one working point'
          : `the worst of ${count} working points`
    const value = swr === null ? 'beyond all measure' : numberText(swr, 2)
    return `${band}: SWR ${value} at ${quantityText(frequencyMHz, 'MHz', 3)}, ${of}.`
  })
}

interface CapacityFigures {
  readonly measuredAh: number
  readonly referredAh: number
  readonly fraction: number
  readonly factor: number
}

function capacityWorking({ inputs, results }: StoredTest, text: UnitText): string[] {
  const { measuredAh, referredAh, fraction, factor } = results as unknown as CapacityFigures
  const ah = (value: number) => quantityText(value, 'Ah', 2)
  return [
    `${ah(measuredAh)} taken out at ${text(inputs.temperatureC as number, '°C', 1)}; factor ${numberText(factor, 3)}: ` +
      `${ah(referredAh)} at 25\u00a0°C.`,
    `${ah(referredAh)} / ${ah(referredAh / fraction)} rated = ${percent(fraction)}.`,
  ]
}

function radioWorking({ results, judgedBy }: StoredTest): string[] {
  const least = judgedBy.rule?.limits.minPowerFraction
  const rows = (results.highest ?? []) as readonly { band: Band; settingW: number; measuredW: number }[]
  return rows.map(({ band, settingW, measuredW }) => {
    const share = `${quantityText(measuredW, 'W', 1)} / ${quantityText(settingW, 'W', 1)} = ${percent(measuredW / settingW)}`
    return typeof least === 'number' ? `${band}: ${share}; ${percent(least)} is asked.` : `${band}: ${share}.`
  })
}

const WORKINGS: Partial<Record<StoredTest['procedure'], Working>> = {
  'pair-loss': pairWorking,
  'open-short-load': pairWorking,
  'heat-test': heatWorking,
  'feedline-loss': lineWorking,
  'antenna-sweep': sweepWorking,
  'battery-capacity': capacityWorking,
  'radio-check': radioWorking,
}
