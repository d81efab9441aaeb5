import { describe, expect, it } from 'vitest'
import type { Evidence, KitState } from '#shared/engine/readiness/types.ts'
import { bandOf, lowering, periodAt, textsOf } from './support/answers.ts'
import { efficiency, feedlineLoss, heatTest, radioCheck, sweep } from './support/evidence.ts'
import { at } from './support/instants.ts'
import { retested, withoutTests, withTests } from './support/kits.ts'
import { HF, RELAY, SOON, VHF } from './support/sample-kits.ts'

/** What a failed test of the transmit chain does (design, section 4.3), with the value at its limit beside the one just over it. */

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
