import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import { listText } from '#shared/engine/plain-words.ts'
import { BANDS, type Band, type FindingWord } from '#shared/engine/vocabulary.ts'
import type { ChartTable } from '@/components/chart/chart-table.ts'
import { figureLimit } from './finding-limit.ts'

/** One band of a picture with a figure for each, in the unit that it is drawn in. */
export interface BandColumn {
  readonly band: Band
  readonly value: number
  /** Expanded uncertainty (k = 2); null where the instrument's accuracy is not known. */
  readonly uncertainty: number | null
  readonly finding: FindingWord
  readonly limit: number | null
  /** Where the figure was at first, if it is judged from there. */
  readonly base: number | null
  /** Written at the value, and under the band. */
  readonly label: string
  readonly under: string
}

export interface BandPicture {
  readonly title: string
  readonly answer: string
  readonly more: readonly string[]
  readonly unit: string
  readonly columns: readonly BandColumn[]
  /** Top of the axis where it is a natural one, such as 100 %. */
  readonly top: number | null
  readonly not: 'above' | 'below'
  /** What the limit and the dotted line are, for the key. */
  readonly limitWord: string
  readonly baseWord: string
  /** What the filling of a column means. */
  readonly fillWord: string
  readonly table: ChartTable
}

type Finding = StoredTest['findings'][number]

/** A finding about a band that has a figure, with the number that it was judged against. */
export interface BandFigure {
  readonly band: Band
  readonly value: number
  readonly uncertainty: number | null
  readonly finding: FindingWord
  readonly limit: number | null
}

/** The figures of one measure by band in wavelength order, times `factor`. */
export function bandFigures(test: StoredTest, measure: string, factor = 1): BandFigure[] {
  const { procedure } = test
  const baselineDb = test.results.baselineDb as Partial<Record<Band, number>> | undefined
  const judged = { procedure, limits: test.judgedBy.rule?.limits ?? null, ...(baselineDb && { baselineDb }) }
  return test.findings
    .flatMap((one) => figureOf(one, measure) ?? [])
    .sort((a, b) => BANDS.indexOf(a.band) - BANDS.indexOf(b.band))
    .map((one) => {
      const limit = figureLimit(one, judged)
      return {
        band: one.band,
        value: one.value * factor,
        uncertainty: one.uncertainty === null ? null : one.uncertainty * factor,
        finding: one.finding,
        limit: limit && limit.value * factor,
      }
    })
}

/** An SWR without a number is a total reflection. */
function figureOf(one: Finding, measure: string): (Finding & { band: Band; value: number }) | null {
  const value = one.value ?? (one.measure === 'swr' ? Infinity : null)
  return one.measure === measure && one.band !== null && value !== null
    ? { ...one, band: one.band, value }
    : null
}

/** `40 m and 20 m pass`; `10 m passes`; empty for none. */
export function bandsThat(figures: readonly BandFigure[], finding: FindingWord): string {
  const bands = figures.filter((one) => one.finding === finding).map(({ band }) => band)
  if (bands.length === 0) return ''
  const [one, many] = VERBS[finding]
  return `${listText(bands)} ${bands.length === 1 ? one : many}`
}

const VERBS: Readonly<Record<FindingWord, readonly [string, string]>> = {
  pass: ['passes', 'pass'],
  marginal: ['is marginal', 'are marginal'],
  fail: ['fails', 'fail'],
}

/**
 * Who fails, else who is marginal, with the figure of the worst band (`told`); then the others. The worst band is one
 * of the first group.
 */
export function worstFirst(figures: readonly BandFigure[], worst: Band, told: string): string {
  const groups = (['fail', 'marginal', 'pass'] as const).filter((word) =>
    figures.some(({ finding }) => finding === word),
  )
  const [first = 'pass', ...rest] = groups
  const isAll = rest.length === 0 && figures.length > 1
  const isOne = figures.filter(({ finding }) => finding === first).length === 1
  const who = isAll ? `Every band ${VERBS[first][0]}` : bandsThat(figures, first)
  const others = rest.map((word) => ` ${bandsThat(figures, word)}.`).join('')
  return `${who}: ${isOne ? '' : `at worst (${worst}) `}${told}.${others}`
}

export const MARGINAL_MEANS =
  'Marginal: the limit lies inside the uncertainty, so nobody can say on which side the true figure is.'

export function marginalNote(figures: readonly BandFigure[]): string[] {
  return figures.some(({ finding }) => finding === 'marginal') ? [MARGINAL_MEANS] : []
}
