import { hfKit, digitalKit, vhfKit } from './demo/stations.ts'
import { LITHIUM_30, LITHIUM_50 } from './demo/things.ts'
import { provenRelayKit, testBench } from './demo/support-kits.ts'
import { count } from './more-evidence.ts'
import { withTests } from './kits.ts'

/** Kits in which everything was tested on one day, so that a test can age or fail one thing at a time. */

export const TESTED_ON = '2026-06-01'
/** A fortnight later: everything is in date. */
export const SOON = '2026-06-15'

export const HF = hfKit('90', {
  transformer: 'XFM-90',
  batteries: ['BAT-901', 'BAT-902'],
  pack: LITHIUM_30,
  testedOn: TESTED_ON,
})

export const DIGITAL = digitalKit(
  '91',
  {
    transformer: 'XFM-91',
    batch: 'C',
    batteries: ['BAT-911', 'BAT-912'],
    pack: LITHIUM_50,
    testedOn: TESTED_ON,
  },
  TESTED_ON,
)

export const VHF = vhfKit('92', { battery: 'BAT-92', pack: LITHIUM_50, testedOn: TESTED_ON })

export const RELAY = provenRelayKit('93', ['BAT-931', 'BAT-932'])

const bench = testBench('94', { 'VNA-94': TESTED_ON, 'WTM-94': TESTED_ON })
export const BENCH = withTests(bench, count(bench, TESTED_ON))
