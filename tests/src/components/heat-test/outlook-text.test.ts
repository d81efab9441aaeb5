import { describe, expect, it } from 'vitest'
import { projectHeat } from '#shared/engine/heat-projection.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { outlookText } from '@/components/heat-test/outlook-text.ts'

const text = (value: number, unit: string, digits = 1) => `${value.toFixed(digits)} ${unit}`

function outlook(temperatures: readonly number[], stepS: number, limitC = 85, ambientC = 21.5) {
  const readings = temperatures.map((temperatureC, n) => ({ atS: n * stepS, temperatureC }))
  const projection = projectHeat({ readings, ambientC }, limitC)
  if (isFailure(projection)) throw new Error(projection.message)
  return outlookText(projection, limitC, text)
}

/** Sets A and D of the calculation sheet, section 6. */
const A = [21.7, 31.8, 39.9, 46.7, 52.7, 57.8, 61.7, 64.8, 67.3, 69.8, 71.5, 72.5, 73.5, 74.7, 75.5, 76.5]
const D = [23.0, 24.1, 25.4, 26.2, 27.6, 28.4, 29.7]

describe('where a heat test is heading', () => {
  it('is not said of a log that is too short: no end, only the earliest moment of the limit', () => {
    const { headline, lines, why } = outlook(D, 10, 85, 23)
    expect(headline).toBe('This log is too short to say where the temperature ends.')
    expect(lines.join(' ')).toMatch(/at the earliest, if at all/)
    expect(lines.join(' ')).not.toMatch(/Heading for/)
    expect(why).toMatch(/straight line fits/)
  })

  it('is said with its interval once the readings carry it', () => {
    const { headline, lines } = outlook(A, 60)
    expect(headline).toBe('Heading for 79 °C if keyed on at this power.')
    expect(lines[0]).toMatch(/lies in 79 °C to 80 °C/)
    expect(lines[1]).toBe('These readings do not lead to 85 °C at this power.')
  })

  it('names the time to a limit that is met, its earliest and its latest moment', () => {
    expect(outlook(A.slice(0, 12), 60, 75).lines[1]).toMatch(
      /^It meets 75 °C in about .* at the earliest, .* at the latest\.$/,
    )
  })

  it('says so before there is anything to say, and at the limit', () => {
    expect(outlook([22], 60).headline).toMatch(/Two readings/)
    expect(outlook([22, 22, 22], 60, 85, 22).headline).toMatch(/not warmed/)
    expect(outlook([22, 60, 86], 60).headline).toMatch(/release the key/)
  })
})
