import type { PlainDate } from '#shared/engine/plain-date.ts'
import { onDay } from '../calendar.ts'
import { PARTY } from '../dates.ts'
import type { Step } from '../deeds.ts'

/** Boots and updates of the three computers. That of K-17 was forgotten after March. */

const BOOTED: Readonly<Record<string, readonly PlainDate[]>> = {
  'CMP-16': [
    ...[PARTY.sep25, PARTY.oct25, '2025-11-15', '2025-12-13', PARTY.jan, PARTY.feb, PARTY.mar, PARTY.apr],
    ...['2026-05-16', PARTY.jun, PARTY.jul, PARTY.sep, PARTY.oct24],
  ],
  'CMP-17': [PARTY.sep25, PARTY.oct25, PARTY.jan, PARTY.mar],
  'CMP-18': [PARTY.oct25, '2025-12-13', PARTY.feb, PARTY.mar, PARTY.jun, PARTY.jul, PARTY.sep, PARTY.oct24],
}

const STARTS: Readonly<Record<string, string>> = { 'CMP-16': '10', 'CMP-17': '11', 'CMP-18': '12' }

export const BOOT_STEPS: readonly Step[] = Object.entries(BOOTED).flatMap(([computer, days]) =>
  days.map((on): Step => {
    const hour = STARTS[computer]
    return {
      at: onDay(on, `${hour}:55`),
      by: 'sunita',
      deed: {
        do: 'test',
        test: {
          procedure: 'boot-and-update',
          subject: computer,
          performed: onDay(on, `${hour}:05`),
          method: 'Started, updated, clock compared, message program opened',
          inputs: {
            boots: true,
            updatesDone: true,
            clockRight: true,
            softwareVersion: `DEMO ${on.slice(2, 7)}`,
          },
        },
      },
    }
  }),
)
