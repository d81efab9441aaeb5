import { later, onDay, type Local } from '../calendar.ts'
import { PARTY } from '../dates.ts'
import type { Step } from '../deeds.ts'
import type { PersonKey } from '../people.ts'

/** The ice storm of January: six kits out for two days, K-07 back in order only on the ninth day after. */

const OUT: Readonly<Record<string, PersonKey>> = {
  'K-01': 'josiah',
  'K-02': 'marcus',
  'K-06': 'everett',
  'K-07': 'nadira',
  'K-09': 'oona',
  'K-19': 'gideon',
}
const KITS = Object.keys(OUT)
const ANTENNAS = ['ANT-01', 'ANT-02', 'ANT-06', 'ANT-07', 'ANT-09', 'ANT-19']
const BACK: Local = '2026-01-17 02:30'

const issues: Step[] = Object.entries(OUT).map(([kit, holder], minute) => ({
  at: later('2026-01-14 22:20', minute),
  by: 'tobin',
  deed: {
    do: 'set-availability',
    kit,
    availability: 'assigned',
    reason: 'January ice storm',
    holder,
    expectedReturnOn: '2026-01-17',
  },
}))

const returns: Step[] = KITS.map((kit, minute) => ({
  at: later(BACK, minute),
  by: 'tobin',
  deed: {
    do: 'set-availability',
    kit,
    availability: 'out-of-service',
    reason: 'back from the ice storm, being restored',
    expectedReturnOn: PARTY.jan,
  },
}))

const asked: Step[] = [
  ...KITS.map((kit, minute): Step => {
    const reason = 'opened in the ice storm'
    const deed = {
      do: 'ask-for-check',
      name: `ice ${kit}`,
      subject: kit,
      procedure: 'count',
      cause: 'opening',
    } as const
    return { at: later(BACK, 10 + minute), by: 'tobin', deed: { ...deed, reason, dueOn: PARTY.jan } }
  }),
  ...ANTENNAS.map((antenna, minute): Step => {
    const reason = 'stood in the ice storm'
    const deed = {
      do: 'ask-for-check',
      name: `ice ${antenna}`,
      subject: antenna,
      procedure: 'antenna-sweep',
    } as const
    return {
      at: later(BACK, 20 + minute),
      by: 'tobin',
      deed: { ...deed, cause: 'storm', reason, dueOn: '2026-01-31' },
    }
  }),
]

const restored: Step[] = KITS.map((kit, minute) => ({
  at: kit === 'K-07' ? '2026-01-26 19:30' : later(onDay(PARTY.jan, '16:30'), minute),
  by: 'tobin',
  deed: { do: 'set-availability', kit, availability: 'available' },
}))

export const ICE_STORM: readonly Step[] = [...issues, ...returns, ...asked, ...restored]
