import { describe, expect, it } from 'vitest'
import { numberText, quantityText, switchOf } from '@/format/quantity.ts'

const METRIC = { temperature: 'C', length: 'm' } as const
const CUSTOMARY = { temperature: 'F', length: 'ft' } as const

describe('numbers', () => {
  it.each([
    [12.14, 1, '12.1'],
    [12.04, 1, '12'],
    [100, 1, '100'],
    [100, 0, '100'],
    [0.25, 2, '0.25'],
    [-3.5, 1, '\u22123.5'],
    [-0.04, 1, '0'],
  ])('writes %d with at most %d decimals as %s', (value, digits, text) => {
    expect(numberText(value, digits)).toBe(text)
  })

  it('keeps trailing zeros where asked', () => {
    expect(numberText(2, 1, true)).toBe('2.0')
  })

  it('puts an unbreakable space before the unit', () => {
    expect(quantityText(85, 'W', 0)).toBe('85\u00a0W')
    expect(quantityText(79, '%', 0)).toBe('79\u00a0%')
  })
})

describe('units that a member chooses', () => {
  it('shows temperatures and takes them back without loss', () => {
    const change = switchOf('°C', CUSTOMARY)
    expect(change.unit).toBe('°F')
    expect(change.shown(85)).toBe(185)
    expect(change.stored(185)).toBe(85)
  })

  it('converts a rise without the offset of 32', () => {
    expect(switchOf('K', CUSTOMARY).shown(10)).toBe(18)
    expect(switchOf('K', METRIC).unit).toBe('K')
  })

  it('shows lengths in feet', () => {
    const change = switchOf('m', CUSTOMARY)
    expect(change.unit).toBe('ft')
    expect(change.shown(3.048)).toBeCloseTo(10, 9)
  })

  it('leaves every other unit alone', () => {
    expect(switchOf('W', CUSTOMARY)).toMatchObject({ unit: 'W' })
    expect(switchOf('W', CUSTOMARY).shown(85)).toBe(85)
  })
})
