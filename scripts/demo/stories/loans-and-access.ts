import { later, onDay, type Local } from '../calendar.ts'
import { PARTY } from '../dates.ts'
import type { Deed, Step } from '../deeds.ts'
import { ANALYSER_AWAY_ON } from '../records/instruments.ts'

/** Who has what, and what nobody can get at. */

type Availability = Omit<Extract<Deed, { do: 'set-availability' }>, 'do'>

const set = (at: Local, deed: Availability): Step => ({
  at,
  by: 'tobin',
  deed: { do: 'set-availability', ...deed },
})

const LOCKED_FROM: Local = '2026-09-01 08:10'

const locked: Step[] = [
  {
    at: '2026-09-01 08:00',
    by: 'hollis',
    deed: { do: 'change-place', place: 'P2', access: 'one key, one host; the host is abroad with the key' },
  },
  ...['K-08', 'K-13', 'K-14'].map((kit, minute) =>
    set(later(LOCKED_FROM, minute), {
      kit,
      availability: 'out-of-service',
      reason: 'no access: the only key is abroad',
      expectedReturnOn: '2026-11-01',
    }),
  ),
]

const loans: Step[] = [
  set('2026-09-05 10:00', {
    kit: 'K-23',
    availability: 'assigned',
    reason: 'at the bench of the test lead',
    holder: 'josiah',
    expectedReturnOn: '2026-09-14',
  }),
  set('2026-09-14 18:00', { kit: 'K-23', availability: 'available' }),
  set('2026-09-24 19:00', {
    kit: 'K-12',
    availability: 'assigned',
    reason: 'on loan to Piet Vandergrove',
    holder: 'piet',
    expectedReturnOn: '2026-10-22',
  }),
  { at: '2026-09-24 19:01', by: 'tobin', deed: { do: 'change-kit', kit: 'K-12', changes: { place: null } } },
  set(onDay(PARTY.oct17, '17:00'), {
    kit: 'K-10',
    availability: 'assigned',
    reason: 'training',
    holder: 'rafael',
    expectedReturnOn: '2026-11-05',
  }),
  {
    at: onDay(PARTY.oct17, '17:01'),
    by: 'tobin',
    deed: { do: 'change-kit', kit: 'K-10', changes: { place: null } },
  },
]

const repair: Step[] = [
  {
    at: onDay(ANALYSER_AWAY_ON, '17:30'),
    by: 'tobin',
    deed: { do: 'set-condition', item: 'VNA-24', condition: 'away', reason: 'at the maker for repair' },
  },
  set(onDay(ANALYSER_AWAY_ON, '17:32'), {
    kit: 'K-24',
    availability: 'out-of-service',
    reason: 'repair of VNA-24',
    expectedReturnOn: '2026-11-20',
  }),
]

const promised: Step = {
  at: onDay(PARTY.oct24, '17:10'),
  by: 'oona',
  deed: {
    do: 'change-kit',
    kit: 'K-19',
    changes: { notes: 'Promised for the county exercise: relay on Tolliver Ridge.' },
  },
}

export const LOANS_AND_ACCESS: readonly Step[] = [...locked, ...loans, ...repair, promised]
