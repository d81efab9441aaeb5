import { describe, expect, it } from 'vitest'
import {
  expandedUncertainty,
  relativeUncertainty,
  standardUncertainty,
} from '#shared/engine/procedures/accuracy.ts'

describe('the uncertainty of a reading', () => {
  it('is not known without an instrument or without a figure for its accuracy', () => {
    expect(standardUncertainty(null, 50)).toBeNull()
    expect(standardUncertainty({}, 50)).toBeNull()
    expect(standardUncertainty({ resolution: 0.1 }, 50)).toBeNull()
    expect(expandedUncertainty({ accuracyPercentOfFullScale: 5 }, 50)).toBeNull()
  })

  it('takes a limit as rectangular', () => {
    expect(standardUncertainty({ accuracyPercentOfReading: 5 }, 100)).toBeCloseTo(5 / Math.sqrt(3), 10)
    expect(standardUncertainty({ accuracyAbsolute: 2 }, 100)).toBeCloseTo(2 / Math.sqrt(3), 10)
    expect(standardUncertainty({ accuracyPercentOfFullScale: 5, fullScale: 200 }, 20)).toBeCloseTo(
      10 / Math.sqrt(3),
      10,
    )
  })

  it('adds its parts as squares, half a step of the display among them', () => {
    const accuracy = { accuracyPercentOfReading: 3, accuracyAbsolute: 4, resolution: 24 }
    expect(standardUncertainty(accuracy, 100)).toBeCloseTo(13 / Math.sqrt(3), 10)
  })

  it('expands by two', () => {
    expect(expandedUncertainty({ accuracyAbsolute: 3 }, 10)).toBeCloseTo(6 / Math.sqrt(3), 10)
  })

  it('grows relative to a small reading of a large scale', () => {
    const accuracy = { accuracyPercentOfFullScale: 5, fullScale: 200 }
    expect(relativeUncertainty(accuracy, 20)).toBeCloseTo(0.5 / Math.sqrt(3), 10)
    expect(relativeUncertainty(accuracy, 0)).toBeNull()
  })
})
