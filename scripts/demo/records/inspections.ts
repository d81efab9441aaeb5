import type { Local } from '../calendar.ts'
import { later } from '../calendar.ts'
import type { Step } from '../deeds.ts'
import type { PersonKey } from '../people.ts'

/** What people looked at, and what they found. */

interface Look {
  readonly item: string
  readonly at: Local
  readonly by: PersonKey
  readonly found: string
  readonly serviceable?: boolean
  /** Who saw it, where somebody else wrote it down. */
  readonly operator?: PersonKey
  readonly method?: string
  readonly notes?: string
}

const LOOKS: readonly Look[] = [
  {
    item: 'ANT-07',
    at: '2026-01-15 05:10',
    by: 'ines',
    operator: 'nadira',
    serviceable: true,
    found: 'Wire iced, 3 cm sag at the far end, still on the air',
    method: 'Read over the air by the operator, taken down by net control',
    notes: 'QX0ICA relayed; the shift was handed over by voice.',
  },
  { item: 'RAD-93', at: '2025-10-11 16:40', by: 'tobin', found: 'No output on 70 cm, power stage gone' },
  {
    item: 'MST-06',
    at: '2026-01-24 11:20',
    by: 'june',
    serviceable: true,
    found: 'Peg set missing, replaced from the shelf',
  },
  {
    item: 'ADP-01',
    at: '2026-01-24 11:40',
    by: 'june',
    serviceable: true,
    found: 'Two adapters missing, replaced',
  },
  {
    item: 'BAT-011',
    at: '2026-01-24 12:10',
    by: 'greta',
    serviceable: true,
    found: 'Lasted 3 h 40 in the storm; the old sheet said 8 h',
    operator: 'everett',
    method: 'From the paper log of the storm',
  },
  { item: 'DCL-03', at: '2026-06-06 15:30', by: 'everett', found: 'Fuse holder melted' },
  { item: 'BAT-016', at: '2026-06-30 18:20', by: 'greta', found: 'one cell dead, 10.4 V under 2 A' },
  { item: 'CHG-08', at: '2026-06-30 18:35', by: 'greta', found: 'no output' },
  { item: 'BAT-046', at: '2026-07-11 10:15', by: 'greta', found: 'Case swollen in the heat of the trailer' },
  { item: 'ANT-15', at: '2026-08-22 13:20', by: 'carl', found: 'element broken' },
  {
    item: 'FDL-05',
    at: '2026-08-22 13:40',
    by: 'walt',
    serviceable: true,
    found: 'Wet outside, connectors dry',
  },
  { item: 'RAD-05', at: '2026-08-22 13:50', by: 'walt', serviceable: true, found: 'Damp case, dry inside' },
  {
    item: 'XFM-10',
    at: '2026-09-12 09:20',
    by: 'josiah',
    found: 'cracked, rattles; SWR on 20 m jumps from 1.2 to 4.1',
  },
]

export const INSPECTION_STEPS: readonly Step[] = LOOKS.map(
  ({
    item,
    at,
    by,
    found,
    serviceable = false,
    operator,
    method = 'Looked at, shaken, measured',
    notes,
  }): Step => ({
    at: later(at, 4),
    by,
    deed: {
      do: 'test',
      test: {
        procedure: 'inspection',
        subject: item,
        performed: at,
        method,
        inputs: { serviceable, found },
        ...(operator !== undefined && { operator }),
        ...(notes !== undefined && { notes }),
      },
    },
  }),
)
