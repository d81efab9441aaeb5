import { describe, expect, it } from 'vitest'
import { kitTimeline } from '#shared/engine/readiness/timeline.ts'
import type { Evidence, KitState } from '#shared/engine/readiness/types.ts'
import { bandOf, lowering, periodAt, textsOf, verdictAt } from './support/answers.ts'
import { capacity, efficiency, feedlineLoss, heatTest, radioCheck, sweep } from './support/evidence.ts'
import { at } from './support/instants.ts'
import { retested, withoutTests, withTests } from './support/kits.ts'
import { boot, count, inspection } from './support/more-evidence.ts'
import { DIGITAL, HF, RELAY, SOON, VHF } from './support/sample-kits.ts'

/** What a failed test does (design, section 4.3), with the value at its limit beside the one just over it. */

const WHEN = at(SOON)
const TODAY = '2026-06-10'
const now = (kit: KitState) => periodAt(kit, WHEN)
const said = (kit: KitState) => textsOf(lowering(now(kit))).join('\n')

describe('a heat test', () => {
  const onTen = (...tests: Evidence[]) =>
    withTests(
      withoutTests(HF, ({ id }) => id.startsWith('XFM-90 heat-test 10 m')),
      ...tests,
    )
  const run = (day: number, powerW: number, stoppedAtMin?: number) =>
    heatTest('XFM-90', '10 m', `2026-06-0${day}`, { powerW, stoppedAtMin })

  const CASES: [name: string, tests: Evidence[], state: string, watts: number | null][] = [
    ['passes at the power of the rule: the promise stands', [run(1, 50)], 'proven', 100],
    ['fails, and 20 W passed: 20 W', [run(1, 50, 8), run(2, 20)], 'limited', 20],
    ['passed at 20 W before it failed at 50 W: 20 W', [run(1, 20), run(2, 50, 8)], 'limited', 20],
    [
      'passed at 20 and at 30 W and fails at 50 W: 30 W',
      [run(1, 20), run(2, 30), run(3, 50, 8)],
      'limited',
      30,
    ],
    [
      'passed at 30 W, then fails at 30 W: 20 W',
      [run(1, 20), run(2, 30), run(3, 50, 8), run(4, 30, 9)],
      'limited',
      20,
    ],
    ['fails at every power tried: the band is out', [run(1, 20, 9), run(2, 50, 8)], 'out', null],
    ['fails and no power passed: the band is out', [run(1, 50, 8)], 'out', null],
    ['passed at 50 W before it failed at 50 W: the band is out', [run(1, 50), run(2, 50, 8)], 'out', null],
    ['fails and passes when repeated at the same power', [run(1, 50, 8), run(2, 50)], 'proven', 100],
    ['passes at 20 W only: 20 W', [run(1, 20)], 'limited', 20],
  ]
  for (const [name, tests, state, watts] of CASES)
    it(`${name}`, () => {
      const band = bandOf(now(onTen(...tests)), '10 m')
      expect(band.state).toBe(state)
      if (watts !== null) expect(band.watts).toBe(watts)
      else expect(band.wattsAtAntenna ?? 0).toBe(0)
    })

  it('names the transformer, the band and what happened', () => {
    expect(said(onTen(run(1, 50, 8.2), run(2, 20)))).toMatch(/10 m.*20 W/)
    expect(said(onTen(run(1, 50, 8.2)))).toMatch(/XFM-90.*reached 85 °C after 8.2 min/)
  })

  it('is missing: the band is not proven', () => {
    expect(bandOf(now(onTen()), '10 m').state).toBe('not-proven')
    expect(said(onTen())).toMatch(/XFM-90.*no heat test on 10 m/)
  })

  it('is not asked for on a band outside the rule: efficiency speaks for 15 m', () => {
    expect(bandOf(now(HF), '15 m')).toMatchObject({ state: 'proven', watts: 100 })
  })
})

describe('an efficiency', () => {
  const at40 = (value: number) =>
    retested(HF, efficiency('XFM-90', { '40 m': value, '20 m': 0.9, '15 m': 0.9, '10 m': 0.9 }, TODAY))

  it('of exactly 80 % is good', () => {
    expect(bandOf(now(at40(0.8)), '40 m').state).toBe('proven')
    expect(now(at40(0.8)).verdict).toBe('proven')
  })

  it('below 80 % keeps the band and says its watts', () => {
    const band = bandOf(now(at40(0.799)), '40 m')
    expect(band).toMatchObject({ state: 'limited', watts: 100 })
    expect(band.wattsAtAntenna).toBeCloseTo(100 * 10 ** -0.04 * 0.799, 6)
    expect(now(at40(0.799)).verdict).toBe('proven-with-limits')
    expect(said(at40(0.799))).toMatch(/40 m.*73 W|73 W.*40 m/)
  })
})

describe('an antenna sweep', () => {
  const at40 = (swr: number) =>
    retested(HF, sweep('ANT-90', { '40 m': swr, '20 m': 1.5, '15 m': 1.5, '10 m': 1.5 }, TODAY))

  it('of exactly SWR 2.5 is good', () => expect(now(at40(2.5)).verdict).toBe('proven'))

  it('above SWR 2.5 takes the band out and leaves the others', () => {
    const period = now(at40(2.51))
    expect(period.verdict).toBe('proven-with-limits')
    expect(period.capability.bands.map(({ state }) => state)).toEqual(['out', 'proven', 'proven', 'proven'])
    expect(said(at40(2.51))).toMatch(/ANT-90.*2\.51|2\.51.*ANT-90/)
  })

  it('that fails on every band leaves nothing to go with', () => {
    const kit = retested(HF, sweep('ANT-90', { '40 m': 3, '20 m': 3, '15 m': 3, '10 m': 3 }, TODAY))
    expect(now(kit).verdict).toBe('not-fit')
  })
})

describe('a feedline', () => {
  const losing = (lossDb: number) => retested(RELAY, feedlineLoss('FDL-93', { '2 m': lossDb }, TODAY))
  const autumn = (kit: KitState) => periodAt(kit, at('2026-10-01'))

  it('at its limit is good', () => expect(autumn(losing(2.2)).verdict).toBe('proven'))

  it('over its limit limits the watts to what was measured', () => {
    const period = autumn(losing(2.21))
    expect(period.verdict).toBe('proven-with-limits')
    expect(bandOf(period, '2 m').wattsAtAntenna).toBeCloseTo(50 * 10 ** -0.221, 6)
    expect(textsOf(lowering(period)).join()).toMatch(/FDL-93.*30 W|30 W.*FDL-93/)
  })
})

describe('a radio', () => {
  const giving = (watts: number) =>
    retested(VHF, radioCheck('RAD-92', { '2 m': watts, '70 cm': 50 }, TODAY, 50))

  it('with exactly 80 % of its rating is good', () => expect(now(giving(40)).verdict).toBe('proven'))

  it('below 80 % of its rating gives what was measured', () => {
    const period = now(giving(39))
    expect(period.verdict).toBe('proven-with-limits')
    expect(bandOf(period, '2 m')).toMatchObject({ state: 'limited', watts: 39 })
    expect(bandOf(period, '70 cm')).toMatchObject({ state: 'proven', watts: 50 })
  })
})

describe('a battery', () => {
  const holding = (a: number, b: number) =>
    retested(HF, capacity('BAT-901', a, TODAY), capacity('BAT-902', b, TODAY))

  it('with exactly 80 % counts', () => {
    const { capability } = now(holding(80, 80))
    expect(capability.usableAh).toBeCloseTo(60 * 0.8 * 0.9, 6)
  })

  it('below 80 % counts for no hours', () => {
    const period = now(holding(79.9, 100))
    expect(period.capability.usableAh).toBeCloseTo(30 * 0.9, 6)
    expect(period.capability.hours).toBeCloseTo(27 / 3.06, 6)
    expect(period.verdict).toBe('proven-with-limits')
  })

  it('leaves the kit to mains or a vehicle when none counts', () => {
    const period = now(holding(79.9, 60))
    expect(period.capability.hours).toBeNull()
    expect(period.verdict).toBe('proven-with-limits')
    expect(said(holding(79.9, 60))).toContain('no battery endurance')
  })

  it('that gives exactly the promised hours is no limit, a little less is', () => {
    const hoursOf = (percent: number) => (60 * (percent / 100) * 0.9) / 3.06
    const promising = (hours: number) => ({ ...holding(90, 90), promise: { ...HF.promise, hours } })
    expect(now(promising(hoursOf(90))).verdict).toBe('proven')
    expect(now(promising(hoursOf(90) + 0.01)).verdict).toBe('proven-with-limits')
    expect(said(promising(16))).toMatch(/15\.8 h.*16 h/)
  })
})

describe('a computer', () => {
  const booted = (on: string) => retested(DIGITAL, boot('CMP-91', on))

  it('booted exactly three months ago still carries digital', () => {
    const kit = booted('2026-03-15')
    expect(periodAt(kit, at('2026-06-16') - 1).capability.modes).toEqual(['digital', 'voice'])
    expect(periodAt(kit, at('2026-06-16')).capability.modes).toEqual(['voice'])
  })

  it('loses digital at a boundary of the timeline', () => {
    const starts = kitTimeline(booted('2026-05-20'), WHEN).map(({ from }) => from)
    expect(starts).toContain(at('2026-06-21'))
    expect(starts).toContain(at('2026-08-21'))
  })

  it('booted too long ago leaves voice as a limit', () => {
    expect(now(booted('2026-03-10')).verdict).toBe('proven-with-limits')
    expect(said(booted('2026-03-10'))).toMatch(/voice only/i)
  })

  it('that does not boot leaves voice only', () => {
    const kit = retested(DIGITAL, boot('CMP-91', TODAY, false))
    expect(now(kit).capability.modes).toEqual(['voice'])
    expect(now(kit).verdict).toBe('proven-with-limits')
  })
})

describe('an inspection', () => {
  it('that says unserviceable makes a vital item so', () => {
    const kit = withTests(HF, inspection('ANT-90', TODAY, 'element broken'))
    expect(now(kit).verdict).toBe('not-fit')
    expect(said(kit)).toMatch(/ANT-90.*element broken/)
  })

  it('that passes later puts the item right', () => {
    const kit = withTests(
      HF,
      inspection('ANT-90', TODAY, 'element broken'),
      inspection('ANT-90', '2026-06-12'),
    )
    expect(now(kit).verdict).toBe('proven')
  })

  it('of a supporting item is a limit', () => {
    const kit = withTests(HF, inspection('MST-90', TODAY, 'bent'))
    expect(now(kit).verdict).toBe('proven-with-limits')
  })
})

describe('a count', () => {
  it('that misses a vital part is not fit', () => {
    const kit = withTests(HF, count(HF, TODAY, { jumper: 0 }))
    expect(verdictAt(kit, WHEN)).toBe('not-fit')
    expect(said(kit)).toContain('jumper')
  })

  it('that misses a supporting part is a limit', () => {
    const kit = withTests(HF, count(HF, TODAY, { mast: 0 }))
    expect(verdictAt(kit, WHEN)).toBe('proven-with-limits')
    expect(said(kit)).toContain('mast')
  })

  it('that finds it again lifts the reason', () => {
    const kit = withTests(HF, count(HF, TODAY, { jumper: 0 }), count(HF, '2026-06-12'))
    expect(verdictAt(kit, WHEN)).toBe('proven')
  })
})

describe('a marginal finding', () => {
  it('counts as a pass', () => {
    const marginal = HF.evidence.map((test) => ({
      ...test,
      finding: 'marginal' as const,
      findings: test.findings.map((finding) => ({ ...finding, finding: 'marginal' as const })),
    }))
    const period = now({ ...HF, evidence: marginal })
    expect(period.verdict).toBe('proven')
    expect(period.capability).toEqual(now(HF).capability)
  })
})
