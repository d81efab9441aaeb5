import { describe, expect, it } from 'vitest'
import { keepAwayText } from '@/format/keep-away.ts'
import { quantityText, switchOf, type Units } from '@/format/quantity.ts'

function unitsOf(length: Units['length']) {
  const change = switchOf('m', { temperature: 'C', length })
  return {
    shown: change.shown,
    stored: change.stored,
    text: (value: number, _unit: string, digits = 1) =>
      quantityText(change.shown(value), change.unit, digits).replace('\u00a0', ' '),
  }
}

const METRES = unitsOf('m')

describe('a distance to keep', () => {
  it.each([
    [1.04, '1.1 m'],
    [1, '1 m'],
    [0.3, '0.3 m'],
    [2.31, '2.4 m'],
  ])('of %d m is never rounded down', (distanceM, said) => {
    expect(keepAwayText({ distanceM, covered: true }, METRES)).toBe(said)
  })

  it('is rounded up in the unit that it is shown in', () => {
    // 1 ft is 0.3048 m exactly (international yard and pound agreement, 1959): 1.04 m are 3.412 ft.
    expect(keepAwayText({ distanceM: 1.04, covered: true }, unitsOf('ft'))).toBe('3.5 ft')
  })

  it('is not said nearer than the method reaches', () => {
    expect(keepAwayText({ distanceM: 0.04, covered: false }, METRES)).toBe('0.2 m or less')
    expect(keepAwayText({ distanceM: 0.04, covered: false }, unitsOf('ft'))).toBe('0.7 ft or less')
  })
})
