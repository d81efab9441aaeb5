import { describe, expect, it } from 'vitest'
import { bandOf, lowering, periodAt, textsOf, verdictAt } from './support/answers.ts'
import { capacity, efficiency, heatTest, radioCheck, sweep } from './support/evidence.ts'
import { at } from './support/instants.ts'
import { retested, withoutTests, withTests } from './support/kits.ts'
import { calibration } from './support/more-evidence.ts'
import { demoPolicy } from './support/policy.ts'
import { HF, SOON, TESTED_ON, VHF } from './support/sample-kits.ts'

/**
 * The real conflicts in which a passing test lowers a verdict: the newest measurement says less than the one before,
 * or a calibration says that an instrument had not been right. All others are excluded by the properties.
 */

const NOW = at(SOON)

describe('a newer pass that measured less', () => {
  it('shortens the hours below the promise', () => {
    const small = { ...HF, promise: { ...HF.promise, hours: 15 } }
    const weaker = withTests(
      small,
      capacity('BAT-901', 81, '2026-06-10'),
      capacity('BAT-902', 81, '2026-06-10'),
    )
    expect(verdictAt(small, NOW)).toBe('proven')
    expect(verdictAt(weaker, NOW)).toBe('proven-with-limits')
  })

  it('lowers the watts at the antenna and keeps the verdict', () => {
    const less = withTests(
      HF,
      efficiency('XFM-90', { '40 m': 0.81, '20 m': 0.9, '15 m': 0.9, '10 m': 0.87 }, '2026-06-10'),
    )
    expect(bandOf(periodAt(less, NOW), '40 m').wattsAtAntenna).toBeCloseTo(100 * 10 ** -0.04 * 0.81, 6)
    expect(verdictAt(less, NOW)).toBe('proven')
  })
})

describe('a passing calibration', () => {
  const metered = {
    ...retested(
      VHF,
      radioCheck('RAD-92', { '2 m': 50, '70 cm': 50 }, { on: '2026-06-05', with: 'WTM-1' }, 50),
    ),
    instruments: [{ id: 'WTM-1', designation: 'WTM-1', category: 'wattmeter' as const }],
  }

  it('shows that an instrument without any had lapsed before the test', () => {
    expect(verdictAt(metered, NOW)).toBe('proven')
    expect(verdictAt(withTests(metered, calibration('WTM-1', '2024-01-10')), NOW)).toBe('not-proven')
  })

  it('brings a failure back that was in doubt', () => {
    const failed = retested(
      metered,
      sweep('ANT-92', { '2 m': 4, '70 cm': 4 }, { on: '2026-06-05', with: 'WTM-1' }),
    )
    const doubted = withTests(failed, calibration('WTM-1', '2024-01-10'))
    expect(verdictAt(doubted, NOW)).toBe('not-proven')
    expect(verdictAt(withTests(doubted, calibration('WTM-1', '2026-06-10')), NOW)).toBe('not-fit')
  })
})

describe('what looks like a conflict and is none', () => {
  it('a pass at less power beside one at full power', () => {
    const kit = withTests(HF, heatTest('XFM-90', '10 m', '2026-06-10', { powerW: 20 }))
    expect(bandOf(periodAt(kit, NOW), '10 m')).toMatchObject({ state: 'proven', watts: 100 })
  })

  it('a pass at less power on a band that needs no heat test', () => {
    const kit = withTests(HF, heatTest('XFM-90', '15 m', '2026-06-10', { powerW: 20 }))
    expect(bandOf(periodAt(kit, NOW), '15 m')).toMatchObject({ state: 'proven', watts: 100 })
  })

  it('a pass on such a band whose year is over', () => {
    const kit = withTests(HF, heatTest('XFM-90', '15 m', '2024-06-10'))
    expect(bandOf(periodAt(kit, NOW), '15 m').state).toBe('proven')
  })

  it('a pass recorded late, older than the newest', () => {
    const kit = withTests(HF, sweep('ANT-90', { '40 m': 1.2 }, { on: '2024-06-01', recorded: '2026-06-10' }))
    expect(periodAt(kit, NOW)).toEqual(periodAt(HF, NOW))
  })

  it('a pass on one band only', () => {
    const kit = withTests(
      HF,
      radioCheck('RAD-90', { '40 m': 100 }, '2026-06-10'),
      sweep('ANT-90', { '40 m': 1.2 }, '2026-06-10'),
    )
    expect(verdictAt(kit, NOW)).toBe('proven')
  })
})

describe('a heat test that is in doubt', () => {
  const meter = { id: 'IRT-1', designation: 'IRT-1', category: 'thermometer' as const }
  const lapsed = calibration('IRT-1', '2024-01-10')
  const onTen = (...tests: Parameters<typeof withTests>[1][]) => ({
    ...withTests(
      withoutTests(HF, ({ id }) => id.startsWith('XFM-90 heat-test 10 m')),
      lapsed,
      ...tests,
    ),
    instruments: [meter],
  })
  const stateOf = (kit: typeof HF) => bandOf(periodAt(kit, NOW), '10 m')
  const failure = (on: string, powerW = 50) => heatTest('XFM-90', '10 m', on, { powerW, stoppedAtMin: 8 })
  const doubted = (on: string, powerW = 50) => heatTest('XFM-90', '10 m', { on, with: 'IRT-1' }, { powerW })

  it('leaves the band not proven', () => {
    expect(stateOf(onTen(doubted('2026-06-05'))).state).toBe('not-proven')
    expect(textsOf(lowering(periodAt(onTen(doubted('2026-06-05')), NOW))).join()).toMatch(
      /10 m.*doubt.*IRT-1/,
    )
  })

  it('hides no failure that is sure, whichever came first', () => {
    expect(stateOf(onTen(failure('2026-06-02'), doubted('2026-06-05'))).state).toBe('out')
    expect(stateOf(onTen(doubted('2026-06-02'), failure('2026-06-05'))).state).toBe('out')
  })

  it('at less power than the failure leaves the band not proven instead of out', () => {
    expect(stateOf(onTen(failure('2026-06-02'), doubted('2026-06-05', 20))).state).toBe('not-proven')
  })

  it('that failed leaves what is older unproven', () => {
    const inDoubt = heatTest('XFM-90', '10 m', { on: '2026-06-05', with: 'IRT-1' }, { stoppedAtMin: 8 })
    expect(stateOf(onTen(heatTest('XFM-90', '10 m', '2026-06-02'), inDoubt)).state).toBe('not-proven')
    expect(stateOf(onTen(inDoubt, heatTest('XFM-90', '10 m', '2026-06-07'))).state).toBe('proven')
  })
})

describe('a rule that names no bands', () => {
  const policy = demoPolicy('heat-test', { applies: {} })
  const kit = { ...withoutTests(HF, ({ procedure }) => procedure === 'heat-test'), policies: [policy] }
  const states = (state: typeof HF, when = NOW) =>
    periodAt(state, when).capability.bands.map((one) => one.state)

  it('asks for one heat test of the transformer', () => {
    expect(states(kit)).toEqual(Array(4).fill('not-proven'))
    expect(verdictAt(kit, NOW)).toBe('not-proven')
  })

  it('lets efficiency speak for the bands without one of their own', () => {
    expect(states(withTests(kit, heatTest('XFM-90', '10 m', TESTED_ON)))).toEqual(Array(4).fill('proven'))
  })

  it('does not take a test at less power for it', () => {
    const low = withTests(kit, heatTest('XFM-90', '10 m', TESTED_ON, { powerW: 20 }))
    expect(states(low)).toEqual(['not-proven', 'not-proven', 'not-proven', 'limited'])
  })

  it('lapses for all bands with the last test', () => {
    const tested = withTests(kit, heatTest('XFM-90', '10 m', '2025-06-20'))
    expect(states(tested, at('2026-06-21') - 1)).toEqual(Array(4).fill('proven'))
    expect(states(tested, at('2026-06-21'))).toEqual(Array(4).fill('not-proven'))
  })
})
