import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import { numberText, quantityText } from '@/format/quantity.ts'
import { FINDING_WORDS } from '@/words.ts'
import { bandFigures, marginalNote, worstFirst, type BandFigure, type BandPicture } from './band-picture.ts'
import { withUncertainty } from '@/format/figure-text.ts'

/** How much comes through a transformer on each band, against the least that the rule takes. */
export function efficiencyPicture(test: StoredTest): BandPicture | null {
  const figures = bandFigures(test, 'efficiency', 100)
  const [first] = figures
  if (!first) return null
  const limit = figures.find((one) => one.limit !== null)?.limit ?? null
  return {
    title: 'What comes through',
    answer: answerOf(figures, limit),
    more: [
      ...(figures.every(({ uncertainty }) => uncertainty === null) ? [NO_ACCURACY] : []),
      ...marginalNote(figures),
    ],
    unit: '%',
    columns: figures.map((one) => ({
      ...one,
      base: null,
      label: `${numberText(one.value, 0)}\u00a0%`,
      under: `${numberText(lossDb(one.value), 2, true)} dB`,
    })),
    top: 100,
    not: 'below',
    limitWord: limit === null ? '' : `limit: at least ${quantityText(limit, '%', 0)}`,
    baseWord: '',
    fillWord: 'comes through; the rest is lost',
    table: {
      columns: ['Band', 'Efficiency', 'Loss', 'Limit', 'Finding'],
      rows: figures.map((one) => ({
        cells: [
          one.band,
          withUncertainty(one.value, one.uncertainty, '%', 1),
          quantityText(lossDb(one.value), 'dB', 2),
          one.limit === null ? '' : `${quantityText(one.limit, '%', 0)} at least`,
          FINDING_WORDS[one.finding],
        ],
      })),
    },
  }
}

export const NO_ACCURACY = 'The accuracy of the instrument is not on record, so no uncertainty can be shown.'

function answerOf(figures: readonly BandFigure[], limit: number | null): string {
  const worst = figures.reduce((a, b) => (b.value < a.value ? b : a))
  const share = withUncertainty(worst.value, worst.uncertainty, '%', 0)
  const asked = limit === null ? '' : ` where at least ${quantityText(limit, '%', 0)} is asked`
  return worstFirst(figures, worst.band, `${share} comes through${asked}`)
}

/** dB of a share in per cent. */
const lossDb = (percent: number) => -10 * Math.log10(percent / 100) + 0
