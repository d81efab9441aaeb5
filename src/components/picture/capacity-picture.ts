import type { StoredTest } from '#shared/contracts/test-shapes.ts'
import type { FindingWord } from '#shared/engine/vocabulary.ts'
import type { ChartTable } from '@/components/chart/chart-table.ts'
import { quantityText } from '@/format/quantity.ts'
import { FINDING_WORDS } from '@/words.ts'
import { MARGINAL_MEANS } from './band-picture.ts'
import { NO_ACCURACY } from './efficiency-picture.ts'
import { withUncertainty } from '@/format/figure-text.ts'
import { figureLimit } from './finding-limit.ts'
import type { UnitText } from './heat-words.ts'

/** A battery's charge against its rating; shares in per cent. */
export interface CapacityPicture {
  readonly percent: number
  readonly uncertainty: number | null
  readonly finding: FindingWord
  readonly limit: number | null
  readonly ratedAh: number
  /** At 25 deg C, which is judged. */
  readonly referredAh: number
  /** As it was read, and at what temperature. */
  readonly measuredAh: number
  readonly measuredPercent: number
  readonly temperatureC: number
  readonly isReferred: boolean
}

interface Results {
  readonly measuredAh: number
  readonly referredAh: number
  readonly fraction: number
  readonly measuredFraction: number
}

export function capacityPicture(test: StoredTest): CapacityPicture | null {
  const finding = test.findings.find(({ measure }) => measure === 'capacityFraction')
  if (!finding || finding.value === null) return null
  const results = test.results as unknown as Results
  const limits = test.judgedBy.rule?.limits ?? null
  const limit = figureLimit(finding, { procedure: test.procedure, limits })
  return {
    percent: finding.value * 100,
    uncertainty: finding.uncertainty === null ? null : finding.uncertainty * 100,
    finding: finding.finding,
    limit: limit && limit.value * 100,
    ratedAh: results.referredAh / results.fraction,
    referredAh: results.referredAh,
    measuredAh: results.measuredAh,
    measuredPercent: results.measuredFraction * 100,
    temperatureC: (test.inputs as { temperatureC: number }).temperatureC,
    isReferred: Math.abs(results.referredAh - results.measuredAh) > 1e-9,
  }
}

const ah = (value: number) => quantityText(value, 'Ah', 1)

export function capacityAnswer({
  percent,
  uncertainty,
  limit,
  referredAh,
  ratedAh,
}: CapacityPicture): string {
  const asked = limit === null ? '' : `; at least ${quantityText(limit, '%', 0)} is asked`
  return `${withUncertainty(percent, uncertainty, '%', 1)} of its rating: ${ah(referredAh)} of ${ah(ratedAh)} at 25\u00a0°C${asked}.`
}

export function capacityNotes(picture: CapacityPicture, text: UnitText): string[] {
  const { measuredAh, temperatureC, isReferred, uncertainty, finding } = picture
  return [
    ...(isReferred
      ? [
          `Read as ${ah(measuredAh)} at ${text(temperatureC, '°C', 0)}; a cold battery gives less, so the figure is referred to 25\u00a0°C.`,
        ]
      : []),
    ...(finding === 'marginal' ? [MARGINAL_MEANS] : []),
    ...(uncertainty === null ? [NO_ACCURACY] : []),
  ]
}

export function capacityTable(picture: CapacityPicture, text: UnitText): ChartTable {
  const {
    percent,
    uncertainty,
    limit,
    referredAh,
    measuredAh,
    measuredPercent,
    temperatureC,
    ratedAh,
    finding,
  } = picture
  const rated = ['Rating', ah(ratedAh), quantityText(100, '%', 0), '']
  const read = [
    `Read at ${text(temperatureC, '°C', 1)}`,
    ah(measuredAh),
    quantityText(measuredPercent, '%', 1),
    '',
  ]
  const judged = [
    'At 25 °C',
    ah(referredAh),
    withUncertainty(percent, uncertainty, '%', 1),
    FINDING_WORDS[finding],
  ]
  const least =
    limit === null ? [] : [['Limit', ah((ratedAh * limit) / 100), quantityText(limit, '%', 0), '']]
  return {
    columns: ['What', 'Capacity', 'Of the rating', 'Finding'],
    rows: [rated, read, judged, ...least].map((cells) => ({ cells })),
  }
}
