import type { Evidence, KitState, RaisedCheck } from '#shared/engine/readiness/types.ts'
import { efficiency, heatTest } from '../evidence.ts'
import { at } from '../instants.ts'
import { withTests } from '../kits.ts'
import { hfKitBeforeTransformerTests } from './stations.ts'
import { AGM_26, BATCH_EFFICIENCY } from './things.ts'

/** Story S1 of the scenario: batch B passed on 40 m, then ran hot on 10 m. */

const ACCEPTED = { '40 m': 0.92, '20 m': 0.88, '15 m': 0.83 }

/** Accepted in February on 40 m, packed in March; nobody tried 10 m. */
const accepted = (id: string): Evidence[] => [
  heatTest(id, '40 m', '2026-02-21'),
  heatTest(id, '20 m', '2026-03-14'),
  efficiency(id, ACCEPTED, '2026-03-14'),
]

/** 10 m at 50 W stopped at 85 °C, then 10 m at 20 W passed. */
const hotOnTen = (id: string, on: string, stoppedAtMin: number, recorded?: string): Evidence[] => [
  heatTest(id, '10 m', { on: `${on} 19:00`, recorded }, { stoppedAtMin }),
  heatTest(id, '10 m', { on: `${on} 20:20`, recorded }, { powerW: 20, peakC: 52 }),
  efficiency(id, BATCH_EFFICIENCY.B, { on: `${on} 20:40`, recorded }),
]

/** The night on which XFM-07 ran hot; its tests reached the record three hours later. */
export const RECALLED_AT = at('2026-06-13 23:40')

export const recallOf = (itemId: string): RaisedCheck => ({
  id: `recall ${itemId}`,
  subjectId: itemId,
  procedure: 'heat-test',
  band: '10 m',
  reason: 'XFM-07 of the same batch failed on 10 m',
  doubtsEarlier: true,
  raisedAt: RECALLED_AT,
  dueOn: '2026-08-01',
})

export const K_04: KitState = withTests(
  hfKitBeforeTransformerTests('04', { transformer: 'XFM-07', batteries: ['BAT-007', 'BAT-008'] }),
  ...accepted('XFM-07'),
  ...hotOnTen('XFM-07', '2026-06-13', 8.2, '2026-06-13 23:40'),
  ...hotOnTen('XFM-07', '2026-07-11', 8.6),
)

export const K_05: KitState = {
  ...withTests(
    hfKitBeforeTransformerTests('05', { transformer: 'XFM-08', batteries: ['BAT-009', 'BAT-010'] }),
    ...accepted('XFM-08'),
    ...hotOnTen('XFM-08', '2026-07-11', 9),
  ),
  raisedChecks: [recallOf('XFM-08')],
}

/** Locked away: XFM-09 was never tried on 10 m, one battery has a dead cell and the charger gives nothing. */
const lockedAway = hfKitBeforeTransformerTests('08', {
  transformer: 'XFM-09',
  batteries: ['BAT-015', 'BAT-016'],
  pack: AGM_26,
  percent: [70, 61],
  testedOn: '2026-03-14',
})
const broken: Readonly<Record<string, string>> = {
  'BAT-016': 'one cell dead, 10.4 V under 2 A',
  'CHG-08': 'no output',
}
export const K_08: KitState = {
  ...withTests(lockedAway, ...accepted('XFM-09')),
  kit: { ...lockedAway.kit, availability: 'out-of-service', availabilityReason: 'no access' },
  items: lockedAway.items.map((item) =>
    broken[item.id]
      ? { ...item, condition: 'unserviceable' as const, conditionReason: broken[item.id] ?? '' }
      : item,
  ),
  raisedChecks: [recallOf('XFM-09')],
}
