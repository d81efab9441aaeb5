import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { choosePlans, worthOf, type Choice } from '#shared/engine/advice/choose-plans.ts'
import { RUNS, SLOW } from '../readiness/support/runs.ts'

const plan: fc.Arbitrary<Choice> = fc.record({
  kitId: fc.constantFrom('K-1', 'K-2', 'K-3', 'K-4'),
  uses: fc.subarray(['XFM-1', 'XFM-2', 'BAT-1', 'BAT-2', 'kit:K-1', 'kit:K-3']),
  minutes: fc.constantFrom(10, 15, 30, 60, 120),
  deployable: fc.integer({ min: 0, max: 2 }),
  proven: fc.integer({ min: 0, max: 2 }),
  returned: fc.integer({ min: 0, max: 1 }),
})

const tokens = ({ kitId, uses }: Choice) => new Set([`kit:${kitId}`, ...uses])
const areApart = (plans: readonly Choice[]) => {
  const all = plans.flatMap((one) => [...tokens(one)])
  return new Set(all).size === all.length
}
const total = (plans: readonly Choice[]) => plans.reduce((sum, one) => sum + worthOf(one), 0)

/** Every subset looked at. */
function bestByForce(plans: readonly Choice[]): number {
  let best = 0
  for (let subset = 0; subset < 2 ** plans.length; subset += 1) {
    const chosen = plans.filter((_, place) => subset & (1 << place))
    if (areApart(chosen)) best = Math.max(best, total(chosen))
  }
  return best
}

describe('plans chosen together', SLOW, () => {
  const plans = fc.array(plan, { maxLength: 9 })

  it('use no kit and no item twice', () => {
    fc.assert(
      fc.property(plans, (all) => {
        expect(areApart(choosePlans(all))).toBe(true)
      }),
      RUNS,
    )
  })

  it('yield as much as the best of all their combinations', () => {
    fc.assert(
      fc.property(plans, (all) => {
        expect(total(choosePlans(all))).toBe(bestByForce(all))
      }),
      RUNS,
    )
  })

  it('give the one good spare to the kit that cannot go without it', () => {
    const common = { uses: ['XFM-1'], minutes: 15, proven: 1, returned: 0 }
    const limited = { ...common, kitId: 'K-1', deployable: 0 }
    const unfit = { ...common, kitId: 'K-2', deployable: 1 }
    expect(choosePlans([limited, unfit])).toEqual([unfit])
  })
})
