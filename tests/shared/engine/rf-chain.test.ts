import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { matchedLoss } from '#shared/engine/feedline-loss.ts'
import { nearestInBand } from '#shared/engine/nearest-in-band.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { rfChain, type ChainLinks } from '#shared/engine/rf-chain.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { valueOf } from '../../support/value-of.ts'

// Calculation sheet, section 9 (numpy; 100 W, 15 m of RG-58): MHz, matched dB, SWR, line dB, W into the
// transformer, efficiency, W heating it, W into the antenna, total dB, S-units.
const ROWS = [
  [3.6, 0.416763, 1.4612, 0.444276, 90.276, 0.82461, 15.8335, 74.4425, 1.28179, 0.213632],
  [7.1, 0.586581, 1.2042, 0.595472, 87.1872, 0.825579, 15.2073, 71.9799, 1.42789, 0.237981],
  [14.2, 0.83219, 1.5583, 0.900782, 81.2684, 0.828957, 13.9004, 67.368, 1.71546, 0.28591],
  [21.2, 1.01927, 2.022, 1.22445, 75.432, 0.834357, 12.4948, 62.9372, 2.01093, 0.335154],
  [28.4, 1.18217, 2.5542, 1.59316, 69.2921, 0.841936, 10.9526, 58.3396, 2.34037, 0.390062],
] as const

const links: ChainLinks = { transmitterW: 100, lineMatchedDb: 1, swrAtLoad: 1.5, efficiency: 0.8 }

describe('rfChain', () => {
  it.each(ROWS)('at %d MHz is the row of the sheet', (...row) => {
    const [frequencyMhz, matchedDb, swrAtLoad, lineDb, intoW, efficiency, heatW, antennaW, totalDb, sUnits] =
      row
    const line = valueOf(matchedLoss({ cable: 'rg-58', frequencyMhz, lengthM: 15 }))
    expectClose(line.matchedDb, matchedDb)
    const chain = valueOf(
      rfChain({ transmitterW: 100, lineMatchedDb: line.matchedDb, swrAtLoad, efficiency }),
    )
    expectClose(chain.lineDb, lineDb)
    expectClose(chain.intoTransformerW, intoW)
    expectClose(chain.transformerHeatW, heatW)
    expectClose(chain.antennaW, antennaW)
    expectClose(chain.totalDb, totalDb)
    expectClose(chain.sUnits, sUnits)
    expectClose(chain.lineHeatW + chain.transformerHeatW + chain.antennaW, 100)
    expect(chain.eirpW).toBeNull()
  })

  it('loses nothing but the matched line without a transformer and at an SWR of 1', () => {
    const chain = valueOf(rfChain({ ...links, swrAtLoad: 1, efficiency: 1 }))
    expect(chain.lineDb).toBe(1)
    expect(chain.transformerHeatW).toBe(0)
    expectClose(chain.antennaW, 79.4328)
  })

  it('adds the connectors that a person enters and the gain of the antenna', () => {
    const plain = valueOf(rfChain(links))
    const chain = valueOf(rfChain({ ...links, connectorLossDb: 0.2, gainDbi: 3 }))
    expectClose(chain.totalDb, plain.totalDb + 0.2)
    expectClose(chain.eirpW, chain.antennaW * 1.995262)
  })

  it('names every missing link and gives no total', () => {
    expect(rfChain({ ...links, efficiency: null })).toEqual({
      code: 'E_MISSING',
      message: 'No total without the efficiency of the transformer.',
      field: 'efficiency',
    })
    expect(rfChain({ ...links, lineMatchedDb: null, swrAtLoad: null })).toMatchObject({
      message: 'No total without the loss of the line and the SWR.',
    })
  })

  it.each<[Partial<ChainLinks>, string, string]>([
    [{ transmitterW: 0 }, 'E_RANGE', 'transmitterW'],
    [{ efficiency: 0 }, 'E_RANGE', 'efficiency'],
    [{ efficiency: 1.01 }, 'E_RANGE', 'efficiency'],
    [{ swrAtLoad: 0.99 }, 'E_RANGE', 'swrAtLoad'],
    [{ swrAtLoad: Infinity }, 'E_NUMBER', 'swrAtLoad'],
    [{ gainDbi: 40.1 }, 'E_RANGE', 'gainDbi'],
    [{ gainDbi: -40.1 }, 'E_RANGE', 'gainDbi'],
    [{ connectorLossDb: -0.1 }, 'E_RANGE', 'connectorLossDb'],
  ])('refuses %j', (change, code, field) => {
    expect(rfChain({ ...links, ...change })).toMatchObject({ code, field })
  })

  it('gives real figures or a failure for any links, and never more power than went in', () => {
    const any = fc.oneof(fc.double(), fc.double({ min: 0, max: 100, noNaN: true }), fc.constant(null))
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 2000, noNaN: true }), any, any, any, (transmitterW, a, b, c) => {
        const chain = rfChain({ transmitterW, lineMatchedDb: a, swrAtLoad: b, efficiency: c })
        expectNumbersReal(chain)
        if (!isFailure(chain)) expect(chain.antennaW).toBeLessThanOrEqual(transmitterW)
      }),
    )
  })
})

describe('nearestInBand', () => {
  const band = { name: '40 m', lowHz: 7e6, highHz: 7.3e6 }
  const at = (frequencyHz: number) => ({ frequencyHz, result: { at: frequencyHz } })
  const bad = (frequencyHz: number) => ({ frequencyHz, result: { code: 'E_GAIN', message: 'x' } })

  it('takes the nearest usable point of the band, both edges included', () => {
    const points = [at(6.9e6), at(7e6), bad(7.1e6), at(7.3e6), at(7.31e6)]
    expect(nearestInBand(points, band, 7.12e6)).toEqual({ frequencyHz: 7e6, value: { at: 7e6 } })
    expect(nearestInBand(points, band, 7.2e6)).toMatchObject({ frequencyHz: 7.3e6 })
  })

  it('takes the lower of two that are equally near', () => {
    expect(nearestInBand([at(7.1e6), at(7.2e6)], band, 7.15e6)).toMatchObject({ frequencyHz: 7.1e6 })
  })

  it('takes nothing from another band', () => {
    expect(nearestInBand([at(6.99e6), bad(7.1e6), at(14e6)], band, 7.1e6)).toEqual({
      code: 'E_NO_TEST_FOR_BAND',
      message: 'No usable test point lies in 40 m.',
    })
  })
})
