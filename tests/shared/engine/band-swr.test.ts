import { describe, expect, it } from 'vitest'
import { bandSwr, type BandSwr } from '#shared/engine/band-swr.ts'
import { swrOfSweep } from '#shared/engine/reflection-sweep.ts'
import type { SwrSample } from '#shared/engine/swr-sweep.ts'
import { BASELINE, NEW_SWEEP } from '../../support/series-antenna.ts'
import { expectClose } from '../../support/sheet-close.ts'

const before = swrOfSweep(BASELINE) as SwrSample[]
const now = swrOfSweep(NEW_SWEEP) as SwrSample[]
const mhz = (low: number, high: number) => ({ lowHz: low * 1e6, highHz: high * 1e6 })

describe('bandSwr', () => {
  // Calculation sheet, section 7 (scikit-rf).
  it.each([
    ['baseline', before, 7.3, 1.6915, 7.3],
    ['new', now, 7.3, 2.12127, 7.3],
    ['baseline', before, 7.2, 1.44487, 7],
    ['new', now, 7.2, 1.62292, 7.2],
  ])('of the %s sweep in 7.0-%f MHz is at worst %f at %f MHz', (_, samples, highMhz, worst, atMhz) => {
    const band = bandSwr(samples, mhz(7, highMhz)) as BandSwr
    expect(band).toMatchObject({ coverage: 'full', figures: { worstAtHz: atMhz * 1e6 } })
    expectClose(band.figures?.worstSwr, worst)
  })

  it('interpolates the band edges', () => {
    const samples = [1, 2, 3, 4, 5].map((swr, i) => ({ frequencyHz: (7 + i / 10) * 1e6, swr }))
    expect(bandSwr(samples, mhz(7.05, 7.35))).toMatchObject({ coverage: 'full', samples: 3 })
    const { figures } = bandSwr(samples, mhz(7.05, 7.35)) as BandSwr
    expectClose(figures?.lowestSwr, 1.5)
    expectClose(figures?.worstSwr, 4.5)
  })

  it('says how much of the band the sweep spans', () => {
    const samples = [7.0, 7.1, 7.2, 7.3].map((f) => ({ frequencyHz: f * 1e6, swr: 2 }))
    expect(bandSwr(samples, mhz(7, 7.3))).toMatchObject({ coverage: 'full', samples: 4 })
    expect(bandSwr(samples, mhz(6.9, 7.1))).toMatchObject({ coverage: 'partial', samples: 2 })
    expect(bandSwr(samples, mhz(6.9, 7.05))).toMatchObject({ coverage: 'partial', samples: 1, figures: null })
    expect(bandSwr(samples, mhz(3.5, 4))).toEqual({ coverage: 'none', samples: 0, figures: null })
    expect(bandSwr(samples, mhz(7.12, 7.18))).toEqual({ coverage: 'full', samples: 0, figures: null })
  })

  it('refuses reversed edges and a bad sweep', () => {
    expect(bandSwr(before, mhz(7.3, 7))).toMatchObject({ code: 'E_RANGE', field: 'edges' })
    expect(bandSwr([], mhz(7, 7.3))).toMatchObject({ code: 'E_TOO_FEW' })
  })
})
