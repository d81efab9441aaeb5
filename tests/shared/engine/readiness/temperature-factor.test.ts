import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { usableEnergyWh } from '#shared/engine/battery-energy.ts'
import { temperatureFactor } from '#shared/engine/readiness/temperature-factor.ts'

describe('temperatureFactor', () => {
  // Calculation sheet, section 10 (IEEE 485 Table 1, from memory, verify).
  it.each([
    [-3.9, 1.52],
    [-1.1, 1.43],
    [1.7, 1.35],
    [4.4, 1.3],
    [7.2, 1.25],
    [10, 1.19],
    [12.8, 1.15],
    [15.6, 1.11],
    [18.3, 1.08],
    [21.1, 1.04],
    [25, 1],
    [40, 1],
  ])('divides lead-acid at %f C by %f', (atC, factor) => {
    expect(temperatureFactor('agm', atC)).toBeCloseTo(1 / factor, 6)
  })

  // Common practice, no source.
  it.each([
    [-20, 0.6],
    [-10, 0.8],
    [0, 0.9],
    [20, 1],
    [40, 1],
    [-15, 0.7],
    [10, 0.95],
  ])('of lithium iron phosphate at %f C is %f', (atC, factor) => {
    expect(temperatureFactor('lifepo4', atC)).toBeCloseTo(factor, 6)
  })

  it('interpolates lead-acid by the divisor and stops below -3.9 C', () => {
    expect(temperatureFactor('flooded', 11.4)).toBeCloseTo(1 / 1.17, 6)
    expect(temperatureFactor('gel', -4)).toMatchObject({ code: 'E_RANGE' })
    expect(temperatureFactor('lifepo4', -21)).toMatchObject({ code: 'E_RANGE' })
  })

  // Calculation sheet, section 10: 12 V, 35 Ah, fraction 0.85, depth 0.5 at 10 C is 150 Wh.
  it('carries over into usable energy', () => {
    const factor = temperatureFactor('agm', 10) as number
    expect(factor).toBeCloseTo(0.840336, 6)
    const battery = {
      nominalV: 12,
      ratedAh: 35,
      capacityFraction: 0.85,
      depth: 0.5,
      temperatureFactor: factor,
    }
    expect(usableEnergyWh(battery)).toBeCloseTo(150, 6)
  })

  it('answers any temperature without throwing or NaN', () => {
    fc.assert(
      fc.property(fc.anything(), (atC) => {
        for (const chemistry of ['agm', 'lifepo4'])
          expect(temperatureFactor(chemistry, atC as number)).not.toBeNaN()
      }),
    )
  })
})
