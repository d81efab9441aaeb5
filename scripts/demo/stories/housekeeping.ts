import { onDay, type Local } from '../calendar.ts'
import { DRY_CELLS, OLD_CELLS } from '../consumables.ts'
import { PARTY } from '../dates.ts'
import type { Step } from '../deeds.ts'
import type { PersonKey } from '../people.ts'

/** What a quartermaster's year is made of beside the stories. */

const note = (at: Local, person: PersonKey, notes: string): Step => ({
  at,
  by: 'ines',
  deed: { do: 'note-about', person, notes },
})

const contacts: Step[] = [
  note('2026-03-21 20:15', 'femi', 'Telephone undeliverable.'),
  note('2026-06-05 20:30', 'thandi', 'E-mail bounces.'),
  note('2026-07-20 19:00', 'marcus', 'Answers every call-out. Licence has expired.'),
  note(
    '2026-10-03 20:10',
    'walt',
    'Licence runs out soon: asked twice, no answer. Paid for two boxes of fuses.',
  ),
  note('2026-10-24 20:00', 'tobin', 'Quartermaster. Moves away; Maren Oldstrand takes over.'),
]

const stock = (
  at: Local,
  by: PersonKey,
  change: readonly [consumable: string, difference: string, reason: string, lot?: string],
): Step => {
  const [consumable, difference, reason, lot = ''] = change
  return { at, by, deed: { do: 'change-stock', consumable, lot, difference, reason } }
}

const shelf: Step[] = [
  stock(onDay(PARTY.jan, '17:20'), 'tobin', ['Fuses, 25 A', '-4', 'restocked six kits after the ice storm']),
  stock(onDay(PARTY.jan, '17:22'), 'tobin', ['Guy line, 3 mm', '-24.5', 'new guys for two masts']),
  stock(onDay(PARTY.jan, '17:24'), 'june', ['Log pads', '-6', 'restocked six kits after the ice storm']),
  stock(onDay(PARTY.mar, '18:10'), 'tobin', ['Electrical tape', '-3', 'new transformers strapped in']),
  stock(onDay(PARTY.mar, '18:12'), 'tobin', ['Coax plugs', '-4', 'new ends on two jumpers']),
  stock(onDay(PARTY.aug, '17:30'), 'maren', ['Log pads', '-4', 'restocked after the flood']),
  stock(onDay(PARTY.aug, '17:32'), 'maren', [DRY_CELLS, '-16', 'lamps of the flood', '2026']),
  stock(onDay(PARTY.aug, '17:34'), 'maren', ['Fuses, 15 A', '-2', 'two blown in the flood']),
  {
    at: onDay(PARTY.sep, '12:30'),
    by: 'june',
    deed: {
      do: 'note-lot',
      consumable: DRY_CELLS,
      lot: OLD_CELLS,
      condition: 'leaking: do not pack, to be recycled',
    },
  },
  stock('2026-10-03 18:40', 'june', ['Fuses, 10 A', '20', 'a box paid by Walt Burrowdale, to be refunded']),
  stock('2026-10-03 18:42', 'june', ['Fuses, 15 A', '20', 'a box paid by Walt Burrowdale, to be refunded']),
  stock(onDay(PARTY.oct24, '17:40'), 'maren', ['Pencils', '-24', 'packed for the exercise']),
]

const retired: Step[] = [
  {
    at: onDay(PARTY.jan, '17:40'),
    by: 'tobin',
    deed: { do: 'retire-item', item: 'RAD-93', reason: 'Power stage gone, no spare part to be had' },
  },
  {
    at: onDay(PARTY.jul, '10:40'),
    by: 'tobin',
    deed: { do: 'retire-item', item: 'BAT-046', reason: 'Case swollen, handed to recycling' },
  },
]

export const HOUSEKEEPING: readonly Step[] = [...contacts, ...shelf, ...retired]
