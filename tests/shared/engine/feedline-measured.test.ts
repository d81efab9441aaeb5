import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { efficiencyInBand } from '#shared/engine/efficiency-by-band.ts'
import {
  lineLossFromNullDb,
  lineLossFromReflection,
  lineLossSweep,
} from '#shared/engine/feedline-measured.ts'
import type { Failure } from '#shared/engine/outcome.ts'
import { readTouchstone } from '#shared/engine/touchstone/read-touchstone.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { valueOf } from '../../support/value-of.ts'

const file = (text: string) => valueOf(readTouchstone(text))

describe('lineLossFromReflection', () => {
  // Half the return loss: a line of L dB sends back 10^(-2L/20). Textbook.
  it.each([0.5, 1.17316, 3, 10])('finds a line of %d dB, far end open or shorted', (lossDb) => {
    const size = 10 ** (-lossDb / 10)
    expectClose(valueOf(lineLossFromReflection({ re: size, im: 0 })).lossDb, lossDb)
    expectClose(valueOf(lineLossFromReflection({ re: 0, im: -size })).lossDb, lossDb)
  })

  it('gives the share that arrives and the uncertainties', () => {
    const line = valueOf(lineLossFromReflection({ re: 0.5, im: 0 }, 0.01))
    expectClose(line.lossDb, 3.0103)
    expectClose(line.efficiency, 0.5)
    // 10/ln 10 * 0.01/0.5
    expectClose(line.uLossDb, 0.0868589)
    expectClose(line.uEfficiency, (0.5 * 0.01) / 0.5)
  })

  it('takes a reflection a little above 1 as no loss, and flags it', () => {
    expect(lineLossFromReflection({ re: 1.01, im: 0 })).toMatchObject({
      lossDb: 0,
      efficiency: 1,
      warnings: [{ code: 'W_CLAMPED' }],
    })
  })

  it.each([
    ['a reflection above 1.05', { re: 1.06, im: 0 }, 0.01, 'E_ACTIVE'],
    ['a far end that returns nothing', { re: 0.0009, im: 0 }, 0.01, 'E_NO_SIGNAL'],
    ['a reading that is no number', { re: NaN, im: 0 }, 0.01, 'E_NUMBER'],
    ['an impossible reading error', { re: 0.5, im: 0 }, 0.6, 'E_RANGE'],
  ])('refuses %s', (_, gamma, error, code) => {
    expect(lineLossFromReflection(gamma, error)).toMatchObject({ code })
  })

  it('gives real figures or a failure for any reading', () => {
    fc.assert(
      fc.property(fc.double(), fc.double(), fc.double(), (re, im, error) => {
        expectNumbersReal(lineLossFromReflection({ re, im }, error))
      }),
    )
  })
})

describe('lineLossSweep', () => {
  it('reads a one-port file with the far end open or shorted', () => {
    const points = valueOf(lineLossSweep(file('# MHz S DB R 50\n7 -2 30\n14 -3 -90\n28 -70 0')))
    expect(points.map((point) => point.frequencyHz)).toEqual([7e6, 14e6, 28e6])
    expectClose(valueOf(points[0]?.result ?? noPoint).lossDb, 1)
    expectClose(valueOf(points[1]?.result ?? noPoint).lossDb, 1.5)
    expect(points[2]?.result).toMatchObject({ code: 'E_NO_SIGNAL' })
    expectClose(
      valueOf(efficiencyInBand(points, { name: '20 m', lowHz: 14e6, highHz: 14.35e6 })).worst.lossDb,
      1.5,
    )
  })

  it('brings a file of another reference to 50 ohm first', () => {
    // 100 ohm: 1/3 against 50 ohm, 1/7 against 75 ohm.
    const [point] = valueOf(lineLossSweep(file(`# MHz S RI R 75\n7 ${1 / 7} 0`)))
    expectClose(valueOf(point?.result ?? noPoint).lossDb, 9.54243 / 2)
  })

  it('reads the whole line from a two-port file, with heat apart from reflection', () => {
    const [point] = valueOf(lineLossSweep(file('# MHz S DB R 50\n7 -20 0 -1.5 0 -1.5 0 -20 0')))
    // -10 log(10^-0.15 / (1 - 0.01))
    expectClose(valueOf(point?.result ?? noPoint).lossDb, 1.5 + 10 * Math.log10(0.99))
  })

  it('passes on what a two-port file gets refused for', () => {
    expect(lineLossSweep(file('# MHz S DB R 75\n7 -20 0 -1 0 -1 0 -20 0'))).toMatchObject({
      code: 'E_REFERENCE',
    })
    expect(lineLossSweep(file('# MHz S DB R 50\n7 -20 0'), -1)).toMatchObject({ code: 'E_RANGE' })
    const [point] = valueOf(lineLossSweep(file('# MHz S RI R 50\n7 0.5 0 1 0 1 0 0.5 0')))
    expect(point?.result).toMatchObject({ code: 'E_GAIN' })
  })
})

const noPoint: Failure = { code: '', message: 'no such point' }

describe('lineLossFromNullDb', () => {
  // Field practice, section 4.6: 8.69 Zmin/Z0; exact is 8.686 atanh(Zmin/Z0).
  it.each([1, 5, 10, 15])('of %d ohm is within 4 % of the exact figure', (ohm) => {
    const lossDb = valueOf(lineLossFromNullDb(ohm))
    expectClose(lossDb, (8.69 * ohm) / 50)
    expectClose(lossDb, 8.68589 * Math.atanh(ohm / 50), 0.04)
  })

  it.each([
    [-1, 50, 'E_RANGE'],
    [15.1, 50, 'E_RANGE'],
    [1, 0, 'E_RANGE'],
    [NaN, 50, 'E_NUMBER'],
  ])('refuses %d ohm on %d ohm', (ohm, z0, code) => {
    expect(lineLossFromNullDb(ohm, z0)).toMatchObject({ code })
  })
})
