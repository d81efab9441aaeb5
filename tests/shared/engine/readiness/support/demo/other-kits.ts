import type { KitState } from '#shared/engine/readiness/types.ts'
import { feedlineLoss, radioCheck } from '../evidence.ts'
import { calibration, count, inspection } from '../more-evidence.ts'
import { withItem, withKit, withoutItem, withTests } from '../kits.ts'
import { AUTUMN, SPRING, vhfKit } from './stations.ts'
import { powerKit, provenRelayKit, relayKit, testBench } from './support-kits.ts'
import { AGM_100, AGM_35, LITHIUM_100, LITHIUM_50 } from './things.ts'

export const K_09 = vhfKit('09', { battery: 'BAT-017', pack: LITHIUM_50 })

const onIssue = (kit: KitState, reason: string) =>
  withKit(kit, { availability: 'assigned', availabilityReason: reason })
export const K_10 = onIssue(vhfKit('10', { battery: 'BAT-018', pack: LITHIUM_50 }), 'training, due 5 Nov')
export const K_12 = onIssue(vhfKit('12', { battery: 'BAT-020', pack: LITHIUM_50 }), 'due 22 Oct')

const outOfService = (kit: KitState, reason: string) =>
  withKit(kit, { availability: 'out-of-service', availabilityReason: reason })

/** Story S4: opened in June without a word; its lead and its adapters are gone. */
const raided = ['DCL-11', 'ADP-11'].reduce(
  withoutItem,
  vhfKit('11', { battery: 'BAT-019', pack: LITHIUM_50, testedOn: SPRING }),
)
export const K_11: KitState = {
  ...withKit(
    withTests(
      outOfService(raided, 'parts'),
      count(raided, AUTUMN, { 'DC lead': 0, 'adapter pouch': 0 }),
      radioCheck('RAD-11', { '2 m': 50, '70 cm': 50 }, { on: '2026-09-12 15:00', with: 'WTM-23' }, 50),
      calibration('WTM-23', '2025-08-15'),
    ),
    { sealMatches: false },
  ),
  instruments: [{ id: 'WTM-23', designation: 'WTM-23', category: 'wattmeter' }],
}

const LONG_AGO = '2025-09-13'
const locked = (number: string, battery: string, percent: number) =>
  outOfService(vhfKit(number, { battery, pack: AGM_35, percent, testedOn: LONG_AGO }), 'no access')
export const K_13 = locked('13', 'BAT-021', 82)
export const K_14 = locked('14', 'BAT-022', 86)

/** Lost its element in the flood, eight weeks after a sweep that passed. */
export const K_15 = withItem(
  withTests(
    outOfService(
      vhfKit('15', { battery: 'BAT-023', pack: AGM_35, percent: 52, testedOn: SPRING }),
      'damaged',
    ),
    inspection('ANT-15', '2026-08-22', 'element broken'),
  ),
  'ANT-15',
  { condition: 'unserviceable', conditionReason: 'element broken' },
)

export const K_19 = provenRelayKit('19', ['BAT-030', 'BAT-031'])

/** Water in the line: loss grows test by test. */
const WET = { '2025-10-11': 1.4, '2026-03-14': 1.5, '2026-06-13': 2.2, '2026-09-12': 3.1 }
export const K_20 = withTests(
  relayKit('20', ['BAT-032', 'BAT-033']),
  ...Object.entries(WET).map(([on, lossDb]) => feedlineLoss('FDL-20', { '2 m': lossDb }, on)),
)

export const K_21 = powerKit('21', LITHIUM_100, {
  'BAT-034': 98,
  'BAT-035': 98,
  'BAT-036': 98,
  'BAT-037': 98,
})
export const K_22 = powerKit('22', AGM_100, { 'BAT-038': 83, 'BAT-039': 81, 'BAT-040': 76, 'BAT-041': 72 })

const bench23 = testBench('23', { 'WTM-23': '2025-08-15', 'DMM-23': '2025-08-15' })
/** Away on the day of the annual count. */
export const K_23 = withTests(bench23, count(bench23, SPRING))

const bench24 = testBench('24')
export const K_24 = withItem(
  withTests(outOfService(bench24, 'repair, back 20 Nov'), count(bench24, AUTUMN)),
  'VNA-24',
  { condition: 'away', conditionReason: 'at repair since 2 Oct' },
)
