import type { PlainDate } from '#shared/engine/plain-date.ts'
import { later, onDay } from '../calendar.ts'
import { PARTY } from '../dates.ts'
import type { Step } from '../deeds.ts'
import type { PersonKey } from '../people.ts'

/** Calibrations of the instruments. Those of WTM-23 and DMM-23 lapsed in August and were not renewed. */

interface Round {
  readonly on: PlainDate
  readonly instruments: readonly string[]
  readonly by: PersonKey
  /** Entered from the certificate when the record began. */
  readonly enteredOn?: PlainDate
}

const ROUNDS: readonly Round[] = [
  {
    on: '2025-08-15',
    instruments: ['VNA-23', 'WTM-23', 'IRT-23', 'BTT-23', 'DMM-23'],
    by: 'josiah',
    enteredOn: '2025-09-06',
  },
  { on: '2025-11-15', instruments: ['VNA-24', 'WTM-24', 'IRT-24', 'BTT-24', 'DMM-24'], by: 'josiah' },
  { on: PARTY.mar, instruments: ['CLM-91'], by: 'greta' },
  { on: '2026-08-08', instruments: ['VNA-23', 'IRT-23', 'BTT-23'], by: 'josiah' },
]

export const CALIBRATION_STEPS: readonly Step[] = ROUNDS.flatMap(({ on, instruments, by, enteredOn }) =>
  instruments.map((instrument, turn): Step => {
    const performed = later(onDay(on, '10:00'), turn * 40)
    const at = enteredOn === undefined ? later(performed, 30) : later(onDay(enteredOn, '20:30'), turn)
    return {
      at,
      by,
      deed: {
        do: 'test',
        test: {
          procedure: 'calibration',
          subject: instrument,
          performed,
          method: 'Compared with the reference of the demonstration laboratory',
          inputs: {
            passed: true,
            certificate: `DEMO-${instrument}-${on.slice(2, 4)}`,
            laboratory: 'Demonstration laboratory',
          },
        },
      },
    }
  }),
)
