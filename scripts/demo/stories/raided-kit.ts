import { onDay } from '../calendar.ts'
import { PARTY } from '../dates.ts'
import type { Step } from '../deeds.ts'

/**
 * Story S4: on 20 June somebody opened K-11, and nothing was recorded. What the count of September found is the first
 * that the record knows of it; the counts themselves stand among the others.
 */
export const RAIDED_KIT: readonly Step[] = [
  {
    at: onDay(PARTY.sep, '10:20'),
    by: 'tobin',
    deed: {
      do: 'change-kit',
      kit: 'K-11',
      changes: {
        sealNumber: '0433',
        sealMatches: false,
        notes:
          'Seal 0433 was broken and nobody knows by whom. Stays open until the lead and the pouch are back.',
      },
    },
  },
  {
    at: onDay(PARTY.sep, '10:25'),
    by: 'tobin',
    deed: {
      do: 'set-availability',
      kit: 'K-11',
      availability: 'out-of-service',
      reason: 'parts: its DC lead is in K-03, its adapter pouch is missing',
    },
  },
  {
    at: onDay(PARTY.sep, '11:18'),
    by: 'tobin',
    deed: { do: 'shelve', item: 'DCL-03', place: 'P1', reason: 'Fuse holder melted' },
  },
  {
    at: onDay(PARTY.sep, '11:20'),
    by: 'tobin',
    deed: {
      do: 'pack',
      item: 'DCL-11',
      kit: 'K-03',
      position: 'DC lead',
      reason: 'Found in K-03 with a pencil note: "borrowed from 11 T."',
    },
  },
  {
    at: '2026-10-10 12:30',
    by: 'tobin',
    deed: {
      do: 'set-condition',
      item: 'ADP-11',
      condition: 'missing',
      reason: 'found by a stranger, lies in the fairground office, not fetched yet',
    },
  },
]
