import { describe, expect, it } from 'vitest'
import { holdsText, horizonSpan, lastDayOf, monthMarks, segmentsOf } from '@/format/horizon.ts'

const SPAN = { fromMs: Date.parse('2026-11-01T00:00:00Z'), toMs: Date.parse('2026-11-11T00:00:00Z') }

describe('the horizon bar', () => {
  it('shows the stretches as shares of the span', () => {
    const segments = segmentsOf(
      [
        { until: '2026-11-03T00:00:00Z', verdict: 'proven', cause: 'x' },
        { until: '2026-11-06T00:00:00Z', verdict: 'proven-with-limits', cause: 'y' },
        { until: null, verdict: 'not-proven', cause: '' },
      ],
      SPAN,
    )
    expect(segments.map(({ verdict, width }) => [verdict, Math.round(width)])).toEqual([
      ['proven', 20],
      ['proven-with-limits', 30],
      ['not-proven', 50],
    ])
  })

  it('leaves out what lies before or beyond the span', () => {
    const segments = segmentsOf(
      [
        { until: '2026-10-01T00:00:00Z', verdict: 'proven', cause: '' },
        { until: '2027-10-01T00:00:00Z', verdict: 'not-fit', cause: '' },
        { until: null, verdict: 'proven', cause: '' },
      ],
      SPAN,
    )
    expect(segments).toEqual([{ verdict: 'not-fit', width: 100 }])
  })

  it('spans twelve months and marks the first of each', () => {
    const marks = monthMarks(horizonSpan('2026-10-31T18:00:00Z'), 'UTC')
    expect(marks).toHaveLength(12)
    expect(marks[0]).toMatchObject({ label: 'Nov', startsYear: false })
    expect(marks.find(({ startsYear }) => startsYear)?.label).toBe('Jan')
    expect(marks.every(({ at }) => at > 0 && at < 100)).toBe(true)
  })

  it('says the last day on which a verdict stands', () => {
    expect(lastDayOf('2026-11-25T07:00:00Z', 'Etc/GMT+7')).toBe('2026-11-24')
    expect(holdsText('2026-11-25T07:00:00Z', 'Etc/GMT+7')).toBe('holds until 24 Nov 2026')
    expect(holdsText(null, 'UTC')).toBe('no end in sight')
  })
})
