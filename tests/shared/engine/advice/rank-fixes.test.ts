import { describe, expect, it } from 'vitest'
import { rankFixes } from '#shared/engine/advice/rank-fixes.ts'
import type { AdviceKit, Plan } from '#shared/engine/advice/work.ts'
import { alone } from '#shared/engine/advice/world.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import { LITHIUM_50 } from '../readiness/support/demo/things.ts'
import { vhfKit } from '../readiness/support/demo/stations.ts'
import { efficiency } from '../readiness/support/evidence.ts'
import { D0 } from '../readiness/support/instants.ts'
import { itemIn, withItem, withKit, withTests } from '../readiness/support/kits.ts'
import { hfKit } from '../readiness/support/demo/stations.ts'

const kit = (number: string) => vhfKit(number, { battery: `BAT-${number}`, pack: LITHIUM_50 })
const broken = (state: KitState, positionId: string) =>
  withItem(state, itemIn(state, positionId).id, { condition: 'unserviceable' })
const rank = (states: readonly KitState[], spares: readonly KitState[] = [], due: string | null = null) =>
  rankFixes(
    states.map((state): AdviceKit => ({ state, expectedReturnOn: due })),
    spares,
    { at: D0, today: '2026-10-31' },
  )
const textsOf = (plans: readonly Plan[]) => plans.map(({ works }) => works.map(({ text }) => text))
const spareOf = (state: KitState, positionId: string) => alone({ state, item: itemIn(state, positionId) })

describe('what to do', () => {
  it('is nothing where every station is proven', async () => {
    expect(await rank([kit('61'), kit('62')])).toEqual([])
  })

  it('makes one whole kit of two halves where there is no spare', async () => {
    const plans = await rank([broken(kit('61'), 'radio'), broken(kit('62'), 'antenna')])
    expect(textsOf(plans)[0]).toEqual([expect.stringMatching(/^Swap (RAD|ANT)-6\d of K-6\d into K-6\d/)])
    expect(plans[0]).toMatchObject({ minutes: 15, deployable: 1, proven: 1 })
  })

  it('takes a spare before it takes another kit apart', async () => {
    const spare = spareOf(kit('70'), 'radio')
    const plans = await rank([broken(kit('61'), 'radio'), broken(kit('62'), 'antenna')], [spare])
    expect(textsOf(plans)).toContainEqual(['Swap RAD-70 into K-61 for RAD-61'])
  })

  it('gives one spare to one kit, and the other a part that is bought and tested', async () => {
    const spare = spareOf(kit('70'), 'radio')
    const plans = await rank([broken(kit('61'), 'radio'), broken(kit('62'), 'radio')], [spare])
    expect(plans.map(({ minutes }) => minutes)).toEqual([15, 135])
    expect(plans.every(({ proven }) => proven === 1)).toBe(true)
  })

  it('offers no spare that failed a test, though the kit does without that band', async () => {
    const hf = hfKit('71', { transformer: 'XFM-71', batteries: ['BAT-711', 'BAT-712'] })
    const failed = withTests(hf, efficiency('XFM-71', { '10 m': 0.7 }, '2026-10-01'))
    const wanting = hfKit('72', { transformer: 'XFM-72', batteries: ['BAT-721', 'BAT-722'] })
    const without10m = { ...wanting, promise: { ...wanting.promise, bands: ['40 m', '20 m'] as const } }
    const plans = await rank([broken(without10m, 'transformer')], [spareOf(failed, 'transformer')])
    expect(textsOf(plans).flat().join()).not.toContain('XFM-71')
  })

  it('calls a late loan back, and leaves one alone that is not late', async () => {
    const lent = withKit(kit('61'), { availability: 'assigned', availabilityReason: 'a class' })
    expect(textsOf(await rank([lent], [], '2026-10-30'))).toEqual([['Recall K-61 (a class)']])
    expect(await rank([lent], [], '2026-10-31')).toEqual([])
  })
})
