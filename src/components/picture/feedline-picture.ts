import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import { numberText, quantityText } from '@/format/quantity.ts'
import { FINDING_WORDS } from '@/words.ts'
import { bandFigures, marginalNote, worstFirst, type BandPicture } from './band-picture.ts'
import { withUncertainty } from '@/format/figure-text.ts'

interface Reading {
  readonly band: Band
  readonly swrAtRadio?: number
}

/** The loss of a line on each band against its baseline and the rise that the rule takes. */
export function feedlinePicture(test: StoredTest): BandPicture | null {
  const figures = bandFigures(test, 'lossDb')
  if (figures.length === 0) return null
  const baseline = (test.results.baselineDb ?? {}) as Partial<Record<Band, number>>
  const readings = (test.results.readings ?? []) as readonly Reading[]
  const swrOf = (band: Band) => readings.find((one) => one.band === band)?.swrAtRadio
  const worst = figures.reduce((a, b) => (riseOf(b, baseline) > riseOf(a, baseline) ? b : a))
  const isBaseline = figures.every(({ band }) => baseline[band] === undefined)
  return {
    title: 'What the line takes',
    answer: isBaseline
      ? 'This is the baseline: later tests of this line are judged from these figures.'
      : worstFirst(
          figures,
          worst.band,
          `the line takes ${quantityText(worst.value, 'dB', 2)}, ${changeText(riseOf(worst, baseline))}`,
        ),
    more: [...flattered(test), ...marginalNote(figures)],
    unit: 'dB',
    columns: figures.map((one) => ({
      ...one,
      base: baseline[one.band] ?? null,
      label: quantityText(one.value, 'dB', 2),
      under: swrText(swrOf(one.band)),
    })),
    top: null,
    not: 'above',
    limitWord: isBaseline ? '' : 'limit: the baseline and the rise that is allowed',
    baseWord: isBaseline ? '' : 'baseline',
    fillWord: 'lost in the line',
    table: {
      columns: ['Band', 'Loss', 'Baseline', 'Limit', 'SWR at the radio', 'Finding'],
      rows: figures.map((one) => ({
        cells: [
          one.band,
          withUncertainty(one.value, one.uncertainty, 'dB', 2),
          optional(baseline[one.band], 'dB'),
          one.limit === null ? '' : `${quantityText(one.limit, 'dB', 2)} at most`,
          swrOf(one.band) === undefined ? '' : numberText(swrOf(one.band)!, 2, true),
          FINDING_WORDS[one.finding],
        ],
      })),
    },
  }
}

const riseOf = (one: { band: Band; value: number }, baseline: Partial<Record<Band, number>>) =>
  one.value - (baseline[one.band] ?? one.value)

const changeText = (riseDb: number) =>
  riseDb >= 0.005 ? `${quantityText(riseDb, 'dB', 2)} more than its baseline` : `no more than its baseline`

const swrText = (swr: number | undefined) => (swr === undefined ? '' : `SWR ${numberText(swr, 2, true)}`)

const optional = (value: number | undefined, unit: string) =>
  value === undefined ? '' : quantityText(value, unit, 2)

/** The engine's own warning that a better SWR hides a worse line. */
function flattered({ results }: StoredTest): string[] {
  const warnings = (results.warnings ?? []) as readonly { code?: string; message?: string }[]
  return warnings.flatMap(({ code, message }) => (code === 'W_SWR_FLATTERS' && message ? [message] : []))
}
