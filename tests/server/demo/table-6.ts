import type { Availability, Verdict } from '#shared/engine/vocabulary.ts'

/** Table 6 of the demo scenario: what each kit is at D0, and what the record must say of it, parts joined by +. */
export interface TableRow {
  readonly availability: Availability
  readonly verdict: Verdict
  readonly causes: readonly string[]
}

const AVAILABILITIES = { A: 'available', As: 'assigned', OOS: 'out-of-service' } as const
const VERDICTS = { P: 'proven', L: 'proven-with-limits', N: 'not-proven', F: 'not-fit' } as const

const row = (
  availability: keyof typeof AVAILABILITIES,
  verdict: keyof typeof VERDICTS,
  ...causes: string[]
): TableRow => ({ availability: AVAILABILITIES[availability], verdict: VERDICTS[verdict], causes })

const NOTHING_TESTED = ['radio check', 'antenna sweep', 'feedline loss test', 'capacity test', 'count']

export const TABLE_6: Readonly<Record<string, TableRow>> = {
  'K-01': row('A', 'P'),
  'K-02': row('A', 'P'),
  'K-03': row('A', 'L', '50 W + DCL-11 + 15 A'),
  'K-04': row('A', 'L', '10 m + 20 W at most + XFM-07 + 12 W at the antenna'),
  'K-05': row('A', 'L', '10 m + 20 W at most + XFM-08 + 12 W at the antenna'),
  'K-06': row('A', 'L', 'BAT-011 + 74 %', 'BAT-012 + 68 %', 'mains or a vehicle'),
  'K-07': row('A', 'L', '40 m out + ANT-07', 'BAT-013 + 79 %', 'BAT-014 + 77 %', 'mains or a vehicle'),
  'K-08': row('OOS', 'F', 'BAT-016 + cell dead', 'CHG-08 + no output', 'XFM-09 + 10 m'),
  'K-09': row('A', 'P'),
  'K-10': row('As', 'P'),
  'K-11': row('OOS', 'F', 'DC lead is empty', 'ADP-11 + missing', 'seal of K-11'),
  'K-12': row('As', 'P'),
  'K-13': row('OOS', 'N', ...NOTHING_TESTED.map((test) => `${test} + 13 Sep 2025`)),
  'K-14': row('OOS', 'N', ...NOTHING_TESTED.map((test) => `${test} + 13 Sep 2025`)),
  'K-15': row('OOS', 'F', 'ANT-15 + element broken', 'BAT-023 + 52 %'),
  'K-16': row('A', 'P'),
  'K-17': row('A', 'L', 'voice only + CMP-17 + 14 Mar 2026'),
  'K-18': row('OOS', 'F', 'XFM-10 + cracked'),
  'K-19': row('A', 'P'),
  'K-20': row('A', 'L', 'FDL-20 + 24 W at the antenna'),
  'K-21': row('A', 'P'),
  'K-22': row('A', 'L', 'BAT-040 + 76 %', 'BAT-041 + 72 %'),
  'K-23': row('A', 'N', 'WTM-23 + 15 Aug 2025', 'DMM-23 + 15 Aug 2025'),
  'K-24': row('OOS', 'F', 'VNA-24 + away'),
}
