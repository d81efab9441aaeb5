import { describe, expect, it } from 'vitest'
import { impedanceRatio } from '#shared/engine/turns.ts'

describe('impedanceRatio', () => {
  // Calculation sheet, section 5 (numpy): N1, N2, ratio, secondary ohm for 50 ohm.
  it.each([
    [2, 14, 49, 2450],
    [3, 24, 64, 3200],
    [1, 8, 64, 3200],
    [2, 15, 56.25, 2812.5],
  ])('of %d:%d turns is the one of the sheet', (primary, secondary, ratio, ohm) => {
    expect(impedanceRatio(primary, secondary)).toEqual({ impedanceRatio: ratio, secondaryOhm: ohm })
  })

  it.each([0, -2, 2.5, 1001])('refuses %d turns', (turns) => {
    expect(impedanceRatio(turns, 14)).toMatchObject({ code: 'E_TURNS', field: 'primaryTurns' })
    expect(impedanceRatio(2, turns)).toMatchObject({ code: 'E_TURNS', field: 'secondaryTurns' })
  })

  it('tells how to count', () => {
    const message = 'primaryTurns is 2.5: count each pass through the core as one turn, 1 to 1000.'
    expect(impedanceRatio(2.5, 14)).toMatchObject({ message })
  })

  it.each([
    [NaN, 'E_NUMBER'],
    [0, 'E_RANGE'],
    [-50, 'E_RANGE'],
  ])('refuses a primary of %d ohm', (ohm, code) => {
    expect(impedanceRatio(2, 14, ohm)).toMatchObject({ code })
  })
})
