import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  celsiusFromFahrenheit,
  fahrenheitDifferenceFromKelvin,
  fahrenheitFromCelsius,
  feetFromMetres,
  kelvinFromFahrenheitDifference,
  metresFromFeet,
} from '#shared/engine/units.ts'

const temperature = fc.double({ min: -1000, max: 10_000, noNaN: true })

describe('units', () => {
  it.each([
    [-40, -40],
    [32, 0],
    [212, 100],
    [98.6, 37],
  ])('reads %f deg F as %f deg C', (f, c) => {
    expect(celsiusFromFahrenheit(f)).toBeCloseTo(c, 12)
    expect(fahrenheitFromCelsius(c)).toBeCloseTo(f, 12)
  })

  it('converts a difference without the offset', () => {
    expect(kelvinFromFahrenheitDifference(9)).toBe(5)
    expect(fahrenheitDifferenceFromKelvin(5)).toBe(9)
  })

  // Calculation sheet, section 7: 468 ft is 142.646 m.
  it('reads 468 ft as 142.646 m', () => {
    expect(metresFromFeet(468)).toBeCloseTo(142.646, 3)
    expect(feetFromMetres(0.3048)).toBe(1)
  })

  it('comes back to where it started', () => {
    fc.assert(
      fc.property(temperature, (value) => {
        expect(celsiusFromFahrenheit(fahrenheitFromCelsius(value))).toBeCloseTo(value, 8)
        expect(kelvinFromFahrenheitDifference(fahrenheitDifferenceFromKelvin(value))).toBeCloseTo(value, 8)
        expect(metresFromFeet(feetFromMetres(value))).toBeCloseTo(value, 8)
      }),
    )
  })
})
