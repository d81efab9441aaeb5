import { describe, expect, it } from 'vitest'
import { wiresToCut, type Winding } from '#shared/engine/builds/winding-length.ts'
import { valueOf } from '../../../support/value-of.ts'

const WINDING: Winding = {
  construction: 'bifilar',
  primaryTurns: 2,
  secondaryTurns: 14,
  meanTurnMm: 66,
  tailMm: 100,
}

describe('wiresToCut', () => {
  it('gives each winding its turns and two tails', () => {
    expect(valueOf(wiresToCut(WINDING))).toEqual([
      { wire: 'primary', turns: 2, tails: 2, lengthMm: 2 * 66 + 2 * 100 },
      { wire: 'secondary', turns: 14, tails: 2, lengthMm: 14 * 66 + 2 * 100 },
    ])
  })

  it('cuts one wire for a tapped winding, with two tails more for the loop of the tap', () => {
    expect(valueOf(wiresToCut({ ...WINDING, construction: 'tapped' }))).toEqual([
      { wire: 'whole', turns: 14, tails: 4, lengthMm: 14 * 66 + 4 * 100 },
    ])
  })

  it('takes half turns and no tails', () => {
    const [primary] = valueOf(wiresToCut({ ...WINDING, primaryTurns: 0.5, tailMm: 0 }))
    expect(primary?.lengthMm).toBe(33)
  })

  it.each<[string, Partial<Winding>, string]>([
    ['no turns', { primaryTurns: 0 }, 'E_RANGE'],
    ['too many turns', { secondaryTurns: 1001 }, 'E_RANGE'],
    ['a turn of no length', { meanTurnMm: 0 }, 'E_RANGE'],
    ['a turn that is no number', { meanTurnMm: NaN }, 'E_NUMBER'],
    ['a negative tail', { tailMm: -1 }, 'E_RANGE'],
  ])('refuses %s', (_, fields, code) => {
    expect(wiresToCut({ ...WINDING, ...fields })).toMatchObject({ code })
  })
})
