import type { KitState } from '#shared/engine/readiness/types.ts'
import { sweep } from '../evidence.ts'
import { inspection } from '../more-evidence.ts'
import { retested, withItem, withKit, withoutItem, withTests } from '../kits.ts'
import { anItem } from '../kits.ts'
import { K_04, K_05, K_08 } from './hot-batch.ts'
import { digitalKit, digitalKitBeforeTransformerTests, hfKit, transformerTests } from './stations.ts'
import { AGM_26, LITHIUM_50 } from './things.ts'

export { K_04, K_05, K_08 }

export const K_01 = hfKit('01', { transformer: 'XFM-01', batteries: ['BAT-001', 'BAT-002'] })
export const K_02 = hfKit('02', { transformer: 'XFM-02', batteries: ['BAT-003', 'BAT-004'] })

/** Its own lead melted; it uses the 15 A lead of K-11. */
export const K_03 = withItem(
  hfKit('03', { transformer: 'XFM-03', batteries: ['BAT-005', 'BAT-006'] }),
  'DCL-03',
  {
    id: 'DCL-11',
    designation: 'DCL-11',
    facts: { ratedA: 15 },
  },
)

export const K_06 = hfKit('06', {
  transformer: 'XFM-04',
  batteries: ['BAT-011', 'BAT-012'],
  pack: AGM_26,
  percent: [74, 68],
})

/** Story S3: the wire stretched in the ice, sweep by sweep; SWR on 40 m by day. */
const STRETCHED = {
  '2025-10-11': 1.3,
  '2026-01-24': 2.1,
  '2026-04-18': 2.4,
  '2026-07-11': 2.7,
  '2026-10-17': 3,
}
const others = { '20 m': 1.5, '15 m': 1.7, '10 m': 1.8 }
export const ANT_07_SWEEPS = Object.entries(STRETCHED).map(([on, swr]) =>
  sweep('ANT-07', { '40 m': swr, ...others }, on),
)
export const K_07 = retested(
  hfKit('07', { transformer: 'XFM-05', batteries: ['BAT-013', 'BAT-014'], pack: AGM_26, percent: [79, 77] }),
  ...ANT_07_SWEEPS,
)

export const K_16 = digitalKit(
  '16',
  { transformer: 'XFM-06', batteries: ['BAT-024', 'BAT-025'], pack: LITHIUM_50 },
  '2026-10-24',
)

/** Its computer was last booted in March. */
export const K_17 = digitalKit(
  '17',
  { transformer: 'XFM-12', batch: 'C', batteries: ['BAT-026', 'BAT-027'], pack: LITHIUM_50 },
  '2026-03-14',
)

const droppedKit = digitalKitBeforeTransformerTests(
  '18',
  { transformer: 'XFM-10', batteries: ['BAT-028', 'BAT-029'], pack: LITHIUM_50 },
  '2026-10-24',
)
const damaged = withKit(droppedKit, { availability: 'out-of-service', availabilityReason: 'damaged' })

/** Dropped at the load-out of 22 August; the crack was seen on 12 September. */
export const K_18: KitState = withItem(
  withTests(
    damaged,
    ...transformerTests('XFM-10', 'C', '2026-03-14'),
    inspection('XFM-10', '2026-09-12', 'cracked, rattles'),
  ),
  'XFM-10',
  { condition: 'unserviceable', conditionReason: 'cracked, rattles' },
)

/** XFM-13 of batch C in the place of the cracked one. The lid was opened, so the seal no longer matches. */
export const K_18_SWAPPED: KitState = withKit(
  withTests(
    {
      ...withoutItem(damaged, 'XFM-10'),
      items: [
        ...withoutItem(damaged, 'XFM-10').items,
        anItem({ id: 'XFM-13', category: 'transformer', positionId: 'transformer' }),
      ],
    },
    ...transformerTests('XFM-13', 'C', '2026-02-21'),
  ),
  { sealMatches: false },
)
