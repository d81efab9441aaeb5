import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import { numberText, quantityText } from '@/format/quantity.ts'
import { FINDING_WORDS } from '@/words.ts'
import { bandFigures, marginalNote, worstFirst, type BandPicture } from './band-picture.ts'
import { withUncertainty } from '@/format/figure-text.ts'

/** The power of a radio on each band against what its setting promises. */
export function radioPicture(test: StoredTest): BandPicture | null {
  const figures = bandFigures(test, 'watts')
  if (figures.length === 0) return null
  const settings = new Map(test.findings.map(({ band, powerW }) => [band, powerW]))
  const worst = figures.reduce((a, b) => (shareOf(b) < shareOf(a) ? b : a))
  return {
    title: 'What the radio puts out',
    answer: worstFirst(
      figures,
      worst.band,
      `${quantityText(worst.value, 'W', 1)} of ${quantityText(settings.get(worst.band) ?? 0, 'W', 0)}`,
    ),
    more: marginalNote(figures),
    unit: 'W',
    columns: figures.map((one) => ({
      ...one,
      base: settings.get(one.band) ?? null,
      label: quantityText(one.value, 'W', 0),
      under: `of ${numberText(settings.get(one.band) ?? 0, 0)} W`,
    })),
    top: null,
    not: 'below',
    limitWord: 'limit',
    baseWord: 'power setting',
    fillWord: 'measured',
    table: {
      columns: ['Band', 'Setting', 'Measured', 'Limit', 'Finding'],
      rows: figures.map((one) => ({
        cells: [
          one.band,
          quantityText(settings.get(one.band) ?? 0, 'W', 1),
          withUncertainty(one.value, one.uncertainty, 'W', 1),
          one.limit === null ? '' : `${quantityText(one.limit, 'W', 1)} at least`,
          FINDING_WORDS[one.finding],
        ],
      })),
    },
  }

  function shareOf({ band, value }: { band: (typeof figures)[number]['band']; value: number }): number {
    return value / (settings.get(band) ?? 1)
  }
}
