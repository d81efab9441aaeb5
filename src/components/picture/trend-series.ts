import type { ItemResult } from '#shared/contracts/item-results.ts'
import type { PlainDate } from '#shared/engine/plain-date.ts'
import { BANDS, type Band, type FindingWord, type Procedure } from '#shared/engine/vocabulary.ts'
import { figureLimit } from './finding-limit.ts'

/** One test's figure in the history of an item. */
export interface TrendPoint {
  readonly testId: string
  readonly on: PlainDate
  readonly value: number
  readonly uncertainty: number | null
  /** Null: the figure was noted and not judged. */
  readonly finding: FindingWord | null
  readonly limit: number | null
  readonly intervalMonths: number | null
  /** Why it was corrected; it counts no more. Null: it counts. */
  readonly replaced: string | null
}

/** One figure of an item over the years, oldest first. */
export interface TrendSeries {
  /** What is drawn, and on which band: `Loss`, `2 m`. */
  readonly word: string
  readonly band: Band | null
  readonly unit: string
  readonly digits: number
  readonly not: 'above' | 'below' | null
  readonly points: readonly TrendPoint[]
}

interface Measure {
  readonly word: string
  readonly unit: string
  readonly digits: number
  readonly factor?: number
}

const JUDGED: Readonly<Record<string, Measure>> = {
  efficiency: { word: 'Efficiency', unit: '%', digits: 0, factor: 100 },
  capacityFraction: { word: 'Capacity', unit: '%', digits: 1, factor: 100 },
  swr: { word: 'SWR', unit: '', digits: 2 },
  lossDb: { word: 'Loss', unit: 'dB', digits: 2 },
  watts: { word: 'Power', unit: 'W', digits: 1 },
}

const NOTED: Readonly<Record<string, Measure>> = {
  swrAtRadio: { word: 'SWR at the radio', unit: '', digits: 2 },
  resonanceMHz: { word: 'Lowest SWR at', unit: 'MHz', digits: 3 },
}

type Found = TrendSeries & { readonly key: string }

/** Every figure of these tests that can be followed over time, the bands in wavelength order. */
export function trendSeries(results: readonly ItemResult[]): TrendSeries[] {
  const found = new Map<string, Found>()
  for (const result of results) for (const one of seriesOf(result)) merge(found, one)
  return [...found.values()].sort((a, b) => rank(a.band) - rank(b.band))
}

const rank = (band: Band | null) => (band === null ? -1 : BANDS.indexOf(band))

function merge(found: Map<string, Found>, one: Found): void {
  const known = found.get(one.key)
  if (!known) found.set(one.key, one)
  else found.set(one.key, { ...known, not: known.not ?? one.not, points: [...known.points, ...one.points] })
}

function seriesOf(result: ItemResult): Found[] {
  const heat = result.procedure === 'heat-test' ? heatSeries(result) : []
  return [...heat, ...result.findings.flatMap((one) => judgedSeries(result, one)), ...notedSeries(result)]
}

function judgedSeries(result: ItemResult, one: ItemResult['findings'][number]): Found[] {
  const measure = JUDGED[one.measure]
  if (!measure || one.value === null) return []
  const { factor = 1, word, unit, digits } = measure
  const limit = figureLimit(one, judgedBy(result))
  const point = {
    ...pointOf(result),
    value: one.value * factor,
    uncertainty: one.uncertainty === null ? null : one.uncertainty * factor,
    finding: one.finding,
    limit: limit && limit.value * factor,
  }
  const key = `${one.measure} ${one.band}`
  return [{ key, word, unit, digits, band: one.band, not: limit?.not ?? null, points: [point] }]
}

function notedSeries(result: ItemResult): Found[] {
  return result.figures.flatMap(({ band, measure, value }) => {
    const noted = NOTED[measure]
    if (!noted) return []
    const point = { ...pointOf(result), value, uncertainty: null, finding: null, limit: null }
    const { word, unit, digits } = noted
    return [{ key: `${measure} ${band}`, word, unit, digits, band, not: null, points: [point] }]
  })
}

/** The rise above ambient tells one day's test from another's; tests at different powers are different series. */
function heatSeries(result: ItemResult): Found[] {
  const ambient = result.figures.find(({ measure }) => measure === 'ambientC')
  const peak = result.findings.find(({ measure }) => measure === 'peakC')
  if (!ambient || !peak || peak.value === null) return []
  const word = `Rise at ${peak.powerW ?? '?'} W`
  const limit = figureLimit(peak, judgedBy(result))
  const point = {
    ...pointOf(result),
    value: peak.value - ambient.value,
    uncertainty: peak.uncertainty,
    finding: peak.finding,
    limit: limit && limit.value - ambient.value,
  }
  const key = `rise ${peak.band} ${peak.powerW}`
  return [{ key, word, unit: 'K', digits: 1, band: peak.band, not: 'above', points: [point] }]
}

function pointOf({ testId, performedOn, intervalMonths, supersededBy }: ItemResult) {
  return { testId, on: performedOn, intervalMonths, replaced: supersededBy?.reason ?? null }
}

function judgedBy({ procedure, limits, figures }: ItemResult) {
  const base = figures.filter(({ measure }) => measure === 'baselineDb')
  return {
    procedure: procedure as Procedure,
    limits,
    baselineDb: Object.fromEntries(base.map(({ band, value }) => [band, value])) as Partial<
      Record<Band, number>
    >,
  }
}
