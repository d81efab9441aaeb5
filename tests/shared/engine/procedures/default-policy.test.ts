import { describe, expect, it } from 'vitest'
import { v7 as uuidv7 } from 'uuid'
import { ruleBody } from '#shared/contracts/rules.ts'
import { DEFAULT_POLICY, NO_SOURCE } from '#shared/engine/policy/default-policy.ts'
import { limitsOf } from '#shared/engine/policy/limits.ts'
import { canBeTested, SUBJECTS } from '#shared/engine/procedures/subjects.ts'
import { heatReadingMinutes, METHOD_CARDS } from '#shared/engine/procedures/method-cards.ts'
import { PROCEDURES } from '#shared/engine/vocabulary.ts'

describe('the policy that a group begins with', () => {
  it('has rules that the contract takes', () => {
    for (const rule of DEFAULT_POLICY.rules) {
      expect(ruleBody.safeParse({ id: uuidv7(), ...rule }).error).toBeUndefined()
    }
  })

  it('asks for procedures that can be done to the category', () => {
    for (const { category, procedure } of DEFAULT_POLICY.rules) {
      expect(category === 'kit' ? SUBJECTS[procedure] === 'kit' : canBeTested(category, procedure)).toBe(true)
    }
  })

  it('names a standard or says that there is no source', () => {
    for (const { source } of DEFAULT_POLICY.rules) {
      expect(source === NO_SOURCE || /^(IEEE|ISO|IEC|NFPA|47 CFR)/.test(source)).toBe(true)
    }
  })

  it('gives limits to what no rule asks for', () => {
    expect(limitsOf('heat-test', undefined)).toMatchObject({ powerW: 50, minutes: 10, maxC: 85 })
    expect(limitsOf('antenna-sweep', { limits: { maxSwr: 2 } })).toEqual({ maxSwr: 2 })
  })
})

/** The analyzer's own signal is all that is sent. */
const isByAnalyzer = ({ steps }: { steps: readonly string[] }) =>
  /calibrate the analyzer/i.test(steps.join(' '))

describe('method cards', () => {
  it('are there for every procedure', () => {
    for (const procedure of PROCEDURES) expect(METHOD_CARDS[procedure].length).toBeGreaterThan(0)
  })

  it('warn before every transmission', () => {
    for (const procedure of ['heat-test', 'pair-loss', 'radio-check'] as const) {
      for (const card of METHOD_CARDS[procedure].filter((one) => !isByAnalyzer(one))) {
        expect(card.cautions.join(' ')).toContain('licensed control operator')
      }
    }
  })

  it('keep every transmitter away from an analyzer', () => {
    const cards = [...METHOD_CARDS['pair-loss'], ...METHOD_CARDS['open-short-load']].filter(isByAnalyzer)
    expect(cards).toHaveLength(2)
    for (const card of cards)
      expect(card.cautions.join(' ')).toContain('Nothing may transmit into an analyzer')
  })

  it('read a heat test at the minutes that fall inside it, and at its end', () => {
    expect(heatReadingMinutes(10)).toEqual([0, 1, 2, 3, 5, 8, 10])
    expect(heatReadingMinutes(6)).toEqual([0, 1, 2, 3, 5, 6])
    expect(heatReadingMinutes(20)).toEqual([0, 1, 2, 3, 5, 8, 10, 20])
  })
})
