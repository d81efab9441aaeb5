import type { PlainDate } from '#shared/engine/plain-date.ts'

/** The scenario's days that several stories share: sections 7 and 8. */

export const RECORD_BEGINS_ON: PlainDate = '2025-09-01'

/** Work parties, all Saturdays. */
export const PARTY = {
  sep25: '2025-09-13',
  oct25: '2025-10-11',
  jan: '2026-01-24',
  feb: '2026-02-21',
  mar: '2026-03-14',
  apr: '2026-04-18',
  jun: '2026-06-13',
  jul: '2026-07-11',
  aug: '2026-08-22',
  /** The annual count of P1 and P3. */
  sep: '2026-09-12',
  oct17: '2026-10-17',
  oct24: '2026-10-24',
} as const satisfies Record<string, PlainDate>
