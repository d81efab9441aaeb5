import { later, onDay, type Local } from '../calendar.ts'
import { PARTY } from '../dates.ts'
import type { AskForCheck, Step } from '../deeds.ts'
import type { PersonKey } from '../people.ts'

/** The flood of August: four kits out at night, two of them broken when they came back. */

/** Who took what, and when the record learned of it: K-15 from a paper receipt, the day after. */
const TAKEN: readonly (readonly [kit: string, holder: PersonKey, at: Local, by: PersonKey])[] = [
  ['K-09', 'nadira', '2026-08-20 03:14', 'nadira'],
  ['K-05', 'lupe', '2026-08-20 03:20', 'lupe'],
  ['K-18', 'sunita', '2026-08-20 03:26', 'sunita'],
  ['K-15', 'marcus', '2026-08-21 10:40', 'june'],
]

const taken: Step[] = TAKEN.map(([kit, holder, at, by]) => ({
  at,
  by,
  deed: {
    do: 'set-availability',
    kit,
    availability: 'assigned',
    reason: by === 'june' ? 'Sable Creek flood, from the paper receipt' : 'Sable Creek flood',
    holder,
    expectedReturnOn: '2026-08-21',
  },
}))

/** Out of the flood plain as a reserve, and never brought home. */
const moved: Step[] = ['K-06', 'K-07', 'K-22'].map((kit, minute) => ({
  at: later('2026-08-20 05:30', minute * 3),
  by: 'hollis',
  deed: { do: 'change-kit', kit, changes: { place: 'P1' } },
}))

const BACK: Local = onDay(PARTY.aug, '13:00')
const RESTORED_ON = PARTY.sep

const BROUGHT_BACK: Readonly<Record<string, string>> = {
  'K-05': 'wet from the flood, drying',
  'K-09': 'back from the flood, being restored',
  'K-15': 'damaged',
  'K-18': 'damaged',
}

const returns: Step[] = Object.entries(BROUGHT_BACK).map(([kit, reason], minute) => ({
  at: later(BACK, minute),
  by: 'tobin',
  deed: { do: 'set-availability', kit, availability: 'out-of-service', reason },
}))

type Asked = Pick<AskForCheck, 'subject' | 'procedure' | 'cause' | 'reason'> & { doubtsEarlier?: boolean }

export const DROP = 'drop of XFM-10'

const ASKED: readonly Asked[] = [
  {
    subject: 'XFM-10',
    procedure: 'heat-test',
    cause: 'drop',
    reason: 'dropped at the load-out, rattles',
    doubtsEarlier: true,
  },
  ...['K-05', 'K-09', 'K-15', 'K-18'].map((subject): Asked => ({
    subject,
    procedure: 'count',
    cause: 'opening',
    reason: 'opened in the flood',
  })),
  ...['ANT-05', 'ANT-09', 'ANT-18'].map((subject): Asked => ({
    subject,
    procedure: 'antenna-sweep',
    cause: 'storm',
    reason: 'stood in the flood',
  })),
  { subject: 'FDL-05', procedure: 'feedline-loss', cause: 'storm', reason: 'lay in the water' },
]

const asked: Step[] = ASKED.map((check, minute) => ({
  at: later(BACK, 5 + minute),
  by: 'tobin',
  deed: {
    do: 'ask-for-check',
    name: check.cause === 'drop' ? DROP : `flood ${check.subject}`,
    ...check,
    dueOn: RESTORED_ON,
  },
}))

const after: Step[] = [
  {
    at: onDay(PARTY.aug, '16:40'),
    by: 'tobin',
    deed: { do: 'set-availability', kit: 'K-09', availability: 'available' },
  },
  {
    at: '2026-08-24 18:40',
    by: 'maren',
    deed: { do: 'set-availability', kit: 'K-05', availability: 'available' },
  },
  {
    at: onDay(PARTY.sep, '09:30'),
    by: 'tobin',
    deed: { do: 'take-back-check', name: DROP, reason: 'cracked: there is nothing left to test' },
  },
]

export const FLOOD: readonly Step[] = [...taken, ...moved, ...returns, ...asked, ...after]
