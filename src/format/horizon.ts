import { addMonths, type PlainDate } from '#shared/engine/plain-date.ts'
import type { Verdict } from '#shared/engine/vocabulary.ts'
import { dayText, monthName, wallClock } from './day.ts'

/** `verdict` holds until `until`, when `cause` changes it; the last stretch has neither. */
export interface Stretch {
  readonly until: string | null
  readonly verdict: Verdict
  readonly cause: string
}

/** The span of time that a horizon bar shows, epoch ms. */
export interface Span {
  readonly fromMs: number
  readonly toMs: number
}

export interface Segment {
  readonly verdict: Verdict
  /** Share of the span, percent. */
  readonly width: number
}

export const HORIZON_MONTHS = 12

export function horizonSpan(asOf: string, months = HORIZON_MONTHS): Span {
  const fromMs = Date.parse(asOf)
  const last = addMonths(new Date(fromMs).toISOString().slice(0, 10), months)
  return { fromMs, toMs: Date.parse(`${last}T00:00:00Z`) }
}

/** The stretches as shares of the span; what lies outside it is left out. */
export function segmentsOf(stretches: readonly Stretch[], { fromMs, toMs }: Span): Segment[] {
  let startMs = fromMs
  return stretches.flatMap(({ until, verdict }) => {
    const endMs = until === null ? toMs : Math.min(Date.parse(until), toMs)
    const width = ((endMs - startMs) / (toMs - fromMs)) * 100
    if (!(width > 0)) return []
    startMs = endMs
    return [{ verdict, width }]
  })
}

export interface MonthMark {
  readonly label: string
  /** Distance from the start of the span, percent. */
  readonly at: number
  readonly startsYear: boolean
}

/** The first of every month within the span. */
export function monthMarks({ fromMs, toMs }: Span, zone: string): MonthMark[] {
  const first = wallClock(fromMs, zone).day
  const marks: MonthMark[] = []
  for (let count = 1; ; count += 1) {
    const day = addMonths(`${first.slice(0, 7)}-01`, count)
    const atMs = Date.parse(`${day}T00:00:00Z`)
    if (atMs >= toMs) return marks
    const month = Number(day.slice(5, 7))
    marks.push({
      label: monthName(month),
      at: ((atMs - fromMs) / (toMs - fromMs)) * 100,
      startsYear: month === 1,
    })
  }
}

/** The last day on which the verdict still stands; a change at local midnight belongs to the day before. */
export function lastDayOf(until: string, zone: string): PlainDate {
  return wallClock(Date.parse(until) - 1, zone).day
}

/** `holds until 24 Nov 2026`, or what stands in its place. */
export function holdsText(holdsUntil: string | null, zone: string): string {
  return holdsUntil === null ? 'no end in sight' : `holds until ${dayText(lastDayOf(holdsUntil, zone))}`
}
