import { describe, expect, it } from 'vitest'
import { fixList } from '#shared/engine/readiness/fix-list.ts'
import type { KitState } from '#shared/engine/readiness/types.ts'
import { periodAt } from './support/answers.ts'
import { K_03, K_08, K_17, K_18, K_18_SWAPPED } from './support/demo/hf-kits.ts'
import { K_11, K_13 } from './support/demo/other-kits.ts'

const fixes = (kit: KitState) =>
  fixList(periodAt(kit)).map(({ action: { kind, text, minutes } }) => `${minutes} ${kind}: ${text}`)

describe('the fix list', () => {
  it('names one swap for the cracked transformer', () => {
    expect(fixes(K_18)).toEqual(['15 replace: Replace XFM-10'])
  })

  it('asks for a count after the swap', () => {
    expect(fixes(K_18_SWAPPED)).toEqual(['30 count: Count K-18'])
  })

  it('asks for an hour with the computer', () => {
    expect(fixes(K_17)).toEqual(['60 test: Boot and update of CMP-17'])
  })

  it('asks for a stronger lead', () => {
    expect(fixes(K_03)).toEqual(['120 buy: Fit a stronger part than DCL-11'])
  })

  it('puts the smallest action first and says each once', () => {
    const list = fixList(periodAt(K_08))
    const minutes = list.map(({ action }) => action.minutes ?? Infinity)
    expect(minutes).toEqual([...minutes].sort((a, b) => a - b))
    const texts = list.map(({ action }) => action.text)
    expect(new Set(texts).size).toBe(texts.length)
    expect(texts).toEqual(expect.arrayContaining(['Replace BAT-016', 'Replace CHG-08', 'Count K-08']))
  })

  it('puts what one count lifts on one line', () => {
    const [count] = fixList(periodAt(K_11)).filter(({ action }) => action.kind === 'count')
    expect(count?.reasons.join()).toMatch(/seal/)
    expect(fixes(K_11).filter((text) => text.includes('count:'))).toHaveLength(1)
  })

  it('names each test of a kit that was not tested for a year', () => {
    expect(fixes(K_13)).toEqual([
      '10 test: Capacity test of BAT-021',
      '15 test: Radio check of RAD-13',
      '15 test: Feedline loss test of FDL-13',
      '15 test: Antenna sweep of ANT-13 on 2 m',
      '15 test: Antenna sweep of ANT-13 on 70 cm',
      '30 count: Count K-13',
    ])
  })
})
