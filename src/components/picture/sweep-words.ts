import type { ChartTable } from '@/components/chart/chart-table.ts'
import { dayText } from '@/format/day.ts'
import { numberText, quantityText } from '@/format/quantity.ts'
import { FINDING_WORDS } from '@/words.ts'
import { worstFirst } from './band-picture.ts'
import { withUncertainty } from '@/format/figure-text.ts'
import type { SweepPanel, SweepPicture } from './sweep-picture.ts'

export const swrText = (swr: number) => (swr === Infinity ? 'beyond all measure' : numberText(swr, 2))
const mhz = (frequencyMHz: number) => quantityText(frequencyMHz, 'MHz', 3)

/** Moves smaller than this lie in the reading. Our choice. */
const RESONANCE_STEP_KHZ = 10

export function sweepAnswer({ panels, limit }: SweepPicture): string {
  const figures = panels.map((panel) => panel.worst)
  const [first] = figures
  if (!first) return 'No working point was read.'
  const worst = figures.reduce((a, b) => (b.value > a.value ? b : a), first)
  const asked = limit === null ? '' : ` where at most ${swrText(limit)} is allowed`
  const where = worst.frequencyMHz === null ? '' : ` at ${mhz(worst.frequencyMHz)}`
  return worstFirst(figures, worst.band, `SWR ${judgedText(worst)}${where}${asked}`)
}

/** The judged SWR of a band with its uncertainty; a total reflection is no number. */
function judgedText({ value, uncertainty }: SweepPanel['worst']): string {
  return value === Infinity ? swrText(value) : withUncertainty(value, uncertainty, '', 2)
}

/** How far it has wandered since the baseline: the resonances, or the SWR where no resonance was noted. */
export function sweepDrift(picture: SweepPicture): string[] {
  const { panels, baselineOn } = picture
  if (baselineOn === null) return ['No earlier sweep is on record to compare it with.']
  const since = `Since the baseline of ${dayText(baselineOn)}`
  const moved = panels.flatMap(movedText)
  if (moved.length > 0) return [`${since} ${moved.join('; ')}.`]
  const change = largestChange(panels)
  return change === null ? [] : [`${since} the SWR has changed by ${change} at most.`]
}

function largestChange(panels: readonly SweepPanel[]): string | null {
  const changes = panels.flatMap(({ points, before }) =>
    points.flatMap(({ frequencyMHz, swr }) => {
      const was = before.points.find((one) => one.frequencyMHz === frequencyMHz)
      return was ? [Math.abs(swr - was.swr)] : []
    }),
  )
  const most = Math.max(...changes)
  // To or from a total reflection is no change in figures; the answer says what it is now.
  return Number.isFinite(most) ? numberText(most, 2) : null
}

function movedText({ band, resonanceMHz, before }: SweepPanel): string[] {
  if (resonanceMHz === null || before.resonanceMHz === null) return []
  const khz = (resonanceMHz - before.resonanceMHz) * 1000
  if (Math.abs(khz) < RESONANCE_STEP_KHZ) return []
  const way = khz < 0 ? 'down' : 'up'
  return [
    `the resonance on ${band} went ${way} by ${quantityText(Math.abs(khz), 'kHz', 0)}, from ${mhz(before.resonanceMHz)} to ${mhz(resonanceMHz)}`,
  ]
}

export function sweepTable({ panels, limit, baselineOn }: SweepPicture): ChartTable {
  const first = baselineOn === null ? [] : [`Baseline, ${dayText(baselineOn)}`]
  return {
    columns: ['Band', 'Frequency', 'SWR', 'Limit', 'Finding', ...first],
    rows: panels.flatMap((panel) => [
      ...panel.points.map((point) => ({
        cells: [
          panel.band,
          mhz(point.frequencyMHz),
          point.frequencyMHz === panel.worst.frequencyMHz ? judgedText(panel.worst) : swrText(point.swr),
          limit === null ? '' : `${swrText(limit)} at most`,
          point.frequencyMHz === panel.worst.frequencyMHz ? FINDING_WORDS[panel.worst.finding] : '',
          ...first.map(() => earlierText(panel, point.frequencyMHz)),
        ],
      })),
      ...resonanceRow(panel, first.length > 0),
    ]),
  }
}

function earlierText({ before }: SweepPanel, frequencyMHz: number): string {
  const same = before.points.find((one) => one.frequencyMHz === frequencyMHz)
  return same ? swrText(same.swr) : ''
}

function resonanceRow({ band, resonanceMHz, before }: SweepPanel, compared: boolean) {
  if (resonanceMHz === null) return []
  const first = compared ? [before.resonanceMHz === null ? '' : mhz(before.resonanceMHz)] : []
  return [{ cells: [band, mhz(resonanceMHz), 'lowest here', '', '', ...first] }]
}
