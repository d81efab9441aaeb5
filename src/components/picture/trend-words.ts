import { daysBetween } from '#shared/engine/plain-date.ts'
import { dayText } from '@/format/day.ts'
import { numberText, quantityText } from '@/format/quantity.ts'
import { counted } from '@/words.ts'
import type { UnitText } from './heat-words.ts'
import type { TrendPoint, TrendSeries } from './trend-series.ts'

/** What a history answers: where the figure that matters most stood at first, where it stands, and its limit. */
export function seriesSentence(series: readonly TrendSeries[], text: UnitText): string {
  const wet = wetLine(series)
  if (wet) return wet
  const judged = series.filter(({ not }) => not !== null)
  const told = [...(judged.length > 0 ? judged : series)].sort((a, b) => urgency(b) - urgency(a))[0]
  const points = told?.points.filter(({ replaced }) => replaced === null) ?? []
  const [first, last] = [points[0], points.at(-1)]
  if (!told || !first || !last) return 'Every test of this was corrected.'
  const name = told.band === null ? told.word : `${told.word} on ${told.band}`
  // The rise that a limit of temperature leaves is another one every day.
  const limit =
    last.limit === null || told.not === null || told.unit === 'K'
      ? ''
      : `; ${told.not === 'above' ? 'at most' : 'at least'} ${figure(told, last.limit, text)} is asked`
  if (first === last)
    return `${name}: ${figure(told, last.value, text)} in the one test so far, ${dayText(last.on)}${limit}.`
  const way = `${figure(told, first.value, text)} on ${dayText(first.on)}, ${figure(told, last.value, text)} on ${dayText(last.on)}`
  return `${name}: ${way}${limit}${standing(last)}.`
}

const standing = ({ finding }: TrendPoint) =>
  finding === 'fail' ? ': it fails' : finding === 'marginal' ? ': it is marginal' : ''

/** A failing figure first, then a marginal one, then the one nearest to its limit. */
function urgency({ points, not }: TrendSeries): number {
  const last = points.findLast(({ replaced }) => replaced === null)
  if (!last) return -1
  const rank = last.finding === 'fail' ? 2 : last.finding === 'marginal' ? 1 : 0
  if (last.limit === null || not === null) return rank
  const used = not === 'above' ? last.value / last.limit : last.limit / last.value
  return rank + Math.min(Math.max(used, 0), 1) / 2
}

function figure({ unit, digits }: TrendSeries, value: number, text: UnitText): string {
  if (unit === '') return numberText(value, digits)
  return unit === 'K' ? text(value, unit, digits) : quantityText(value, unit, digits)
}

/** Changes below these lie in the reading. Our choice. */
const LOSS_STEP_DB = 0.3
const SWR_STEP = 0.05

/** The loss grows and the SWR looks better for it: the one thing that a look at the SWR alone would miss. */
function wetLine(series: readonly TrendSeries[]): string | null {
  for (const loss of series.filter(({ word }) => word === 'Loss')) {
    const swr = series.find(({ word, band }) => word === 'SWR at the radio' && band === loss.band)
    const [lossThen, lossNow] = endsOf(loss)
    const [swrThen, swrNow] = swr ? endsOf(swr) : []
    if (!lossThen || !lossNow || !swrThen || !swrNow) continue
    if (lossNow.value - lossThen.value < LOSS_STEP_DB || swrThen.value - swrNow.value < SWR_STEP) continue
    const months = Math.max(1, Math.round(daysBetween(lossThen.on, lossNow.on) / 30.44))
    return (
      `In ${counted(months, 'month')} the loss on ${loss.band} grew from ${quantityText(lossThen.value, 'dB', 2)} to ` +
      `${quantityText(lossNow.value, 'dB', 2)} while the SWR at the radio fell from ${numberText(swrThen.value, 2)} to ` +
      `${numberText(swrNow.value, 2)}: the line swallows the reflection. Look for water.`
    )
  }
  return null
}

function endsOf({ points }: TrendSeries): [TrendPoint | undefined, TrendPoint | undefined] {
  const counted = points.filter(({ replaced }) => replaced === null)
  return [counted[0], counted.at(-1)]
}
