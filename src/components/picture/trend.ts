import type { ItemResult } from '#shared/contracts/item-results.ts'
import { addMonths, type PlainDate } from '#shared/engine/plain-date.ts'
import type { Procedure } from '#shared/engine/vocabulary.ts'
import type { ChartTable } from '@/components/chart/chart-table.ts'
import { dayText } from '@/format/day.ts'
import { counted, FINDING_WORDS, PROCEDURE_WORDS } from '@/words.ts'
import { withUncertainty } from '@/format/figure-text.ts'
import type { UnitText } from './heat-words.ts'
import { trendSeries, type TrendPoint, type TrendSeries } from './trend-series.ts'
import { seriesSentence } from './trend-words.ts'

/** What the tests of one kind say about an item over the years. */
export interface Trend {
  readonly title: string
  readonly answer: string
  readonly more: readonly string[]
  readonly series: readonly TrendSeries[]
  readonly table: ChartTable
}

/** The two ways of measuring an efficiency are one history. */
const KINDS: readonly { readonly procedures: readonly Procedure[]; readonly title?: string }[] = [
  { procedures: ['battery-capacity'] },
  { procedures: ['pair-loss', 'open-short-load'], title: 'Efficiency' },
  { procedures: ['heat-test'] },
  { procedures: ['antenna-sweep'] },
  { procedures: ['feedline-loss'] },
  { procedures: ['radio-check'] },
]

/** The histories of an item that have anything to draw; `results` oldest first. */
export function trendsOf(results: readonly ItemResult[], text: UnitText): Trend[] {
  return KINDS.flatMap(({ procedures, title }) => {
    const tests = results.filter(({ procedure }) => procedures.includes(procedure))
    const series = trendSeries(tests)
    if (series.length === 0) return []
    const [first] = procedures
    return [
      {
        title: title ?? PROCEDURE_WORDS[first!],
        answer: seriesSentence(series, text),
        more: [...riseNote(series), ...replacedNote(tests)],
        series,
        table: tableOf(series, text),
      },
    ]
  })
}

function riseNote(series: readonly TrendSeries[]): string[] {
  if (!series.some(({ unit }) => unit === 'K')) return []
  return ['The limit is a temperature: the rise that it leaves depends on the ambient of the day.']
}

function replacedNote(tests: readonly ItemResult[]): string[] {
  const count = tests.filter(({ supersededBy }) => supersededBy !== null).length
  if (count === 0) return []
  return [`${counted(count, 'test was', 'tests were')} corrected: drawn crossed, and not counted.`]
}

/** The points that count. */
export const counting = (series: TrendSeries) => series.points.filter(({ replaced }) => replaced === null)

/** When the newest test that counts falls due; a failed one is due now, and what was only noted never. */
export function dueOf(series: TrendSeries): PlainDate | null {
  const newest = counting(series).at(-1)
  if (!newest || newest.intervalMonths === null || newest.finding === null || newest.finding === 'fail')
    return null
  return addMonths(newest.on, newest.intervalMonths)
}

function tableOf(series: readonly TrendSeries[], text: UnitText): ChartTable {
  const rows = series.flatMap((one) => one.points.map((point) => ({ one, point })))
  rows.sort((a, b) => (a.point.on < b.point.on ? 1 : a.point.on > b.point.on ? -1 : 0))
  return {
    columns: ['Tested', 'Band', 'What', 'Figure', 'Limit', 'Finding'],
    rows: rows.map(({ one, point }) => ({
      testId: point.testId,
      cells: [
        dayText(point.on),
        one.band ?? '',
        one.word,
        figureText(one, point, text),
        limitText(one, point, text),
        point.replaced === null ? findingText(point) : `Corrected: ${point.replaced}`,
      ],
    })),
  }
}

const findingText = ({ finding }: TrendPoint) => (finding ? FINDING_WORDS[finding] : '')

/** Differences of temperature follow the member's units; the other units are the same for all. */
export function figureText(
  { unit, digits }: TrendSeries,
  { value, uncertainty }: TrendPoint,
  text: UnitText,
): string {
  if (unit !== 'K') return withUncertainty(value, uncertainty, unit, digits)
  return uncertainty === null
    ? text(value, 'K', digits)
    : `${text(value, 'K', digits)} ± ${text(uncertainty, 'K', digits)}`
}

function limitText(series: TrendSeries, { limit }: TrendPoint, text: UnitText): string {
  if (limit === null || series.not === null) return ''
  const value = figureText(series, { value: limit, uncertainty: null } as TrendPoint, text)
  return `${value} at ${series.not === 'above' ? 'most' : 'least'}`
}
