import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Complex } from '#shared/engine/complex.ts'
import { efficiencyInBand } from '#shared/engine/efficiency-by-band.ts'
import { isFailure } from '#shared/engine/outcome.ts'
import { recogniseTerminations } from '#shared/engine/recognise-terminations.ts'
import { renormaliseGamma } from '#shared/engine/renormalise.ts'
import { threeTerminationSweep, type TerminationFiles } from '#shared/engine/three-termination-sweep.ts'
import { readTouchstone } from '#shared/engine/touchstone/read-touchstone.ts'
import type { TouchstoneFile } from '#shared/engine/touchstone/touchstone-file.ts'
import { expectClose } from '../../support/sheet-close.ts'
import { THREE_TERMINATIONS } from '../../support/transformer-sheet.ts'
import { valueOf } from '../../support/value-of.ts'

type Name = 'open' | 'short' | 'load'

/** One trace of the sheet's transformer as a file referred to `ohm`. */
function traceFile(name: Name, { ohm = 50, shiftHz = 0 } = {}): TouchstoneFile {
  const rows = THREE_TERMINATIONS.map(({ mhz, readings }) => {
    const gamma: Complex = valueOf(renormaliseGamma(readings[name], 50, ohm))
    return `${mhz * 1e6 + shiftHz} ${gamma.re} ${gamma.im}`
  })
  return valueOf(readTouchstone(`# Hz S RI R ${ohm}\n${rows.join('\n')}`))
}

const sheetFiles = (ohm = 50): TerminationFiles => ({
  open: traceFile('open', { ohm }),
  short: traceFile('short', { ohm }),
  load: traceFile('load', { ohm }),
})
const setup = { loadOhm: 2450 }
const codesOf = (warnings: readonly { code: string }[]): string[] => warnings.map((warning) => warning.code)

describe('threeTerminationSweep', () => {
  it('gives the efficiency of the sheet at every point', () => {
    const sweep = valueOf(threeTerminationSweep(sheetFiles(), setup))
    expect(sweep.warnings).toEqual([])
    sweep.points.forEach((point, at) => {
      expectClose(valueOf(point.result).efficiency, THREE_TERMINATIONS[at]?.efficiency ?? NaN)
    })
  })

  it('gives the same figures whatever the files are referred to', () => {
    fc.assert(
      fc.property(fc.double({ min: 5, max: 1000, noNaN: true }), (ohm) => {
        const sweep = valueOf(threeTerminationSweep(sheetFiles(ohm), setup))
        sweep.points.forEach((point, at) => {
          const { efficiency, gMax, s22 } = valueOf(point.result)
          const wanted = THREE_TERMINATIONS[at]
          expectClose(efficiency, wanted?.efficiency ?? NaN)
          expectClose(gMax, wanted?.gMax ?? NaN)
          expectClose(s22.re, wanted?.s22.re ?? NaN)
        })
      }),
      { numRuns: 30 },
    )
  })

  it('notices swapped open and short, which leave efficiency and Gmax as they were', () => {
    const { open, short, load } = sheetFiles()
    const right = valueOf(threeTerminationSweep({ open, short, load }, setup))
    const swapped = valueOf(threeTerminationSweep({ open: short, short: open, load }, setup))
    expect(codesOf(swapped.warnings)).toEqual(['W_SWAPPED'])
    swapped.points.forEach((point, at) => {
      const found = valueOf(point.result)
      const wanted = valueOf(right.points[at]?.result ?? { code: '', message: 'missing' })
      expectClose(found.efficiency, wanted.efficiency)
      expectClose(found.gMax, wanted.gMax ?? NaN)
      expectClose(found.s22.re, -wanted.s22.re)
      expectClose(found.p.im, -wanted.p.im)
    })
  })

  it('takes frequencies that agree to 1 Hz and no less', () => {
    const { open, short } = sheetFiles()
    const nearly = { open, short, load: traceFile('load', { shiftHz: 0.9 }) }
    expect(isFailure(threeTerminationSweep(nearly, setup))).toBe(false)
    const apart = { open, short, load: traceFile('load', { shiftHz: 1.1 }) }
    expect(threeTerminationSweep(apart, setup)).toMatchObject({ code: 'E_GRID' })
    const shorter = { open, short, load: valueOf(readTouchstone('# Hz S RI R 50\n3600000 0 0')) }
    expect(threeTerminationSweep(shorter, setup)).toMatchObject({ code: 'E_GRID' })
  })

  it.each<[string, Partial<TerminationFiles>, object, object]>([
    [
      'files of different references',
      { load: traceFile('load', { ohm: 75 }) },
      setup,
      { code: 'E_REFERENCE' },
    ],
    [
      'a two-port file',
      { open: valueOf(readTouchstone('# MHz S RI R 50\n7 0 0 1 0 1 0 0 0')) },
      setup,
      { code: 'TS_PORTS' },
    ],
    ['a load of 0 ohm', {}, { loadOhm: 0 }, { code: 'E_RANGE', field: 'loadOhm' }],
    [
      'a negative reading error',
      {},
      { ...setup, readingError: -0.01 },
      { code: 'E_RANGE', field: 'readingError' },
    ],
    ['a negative stray', {}, { ...setup, openStrayPf: -1 }, { code: 'E_RANGE', field: 'openStrayPf' }],
  ])('refuses %s', (_, change, settings, wanted) => {
    expect(threeTerminationSweep({ ...sheetFiles(), ...change }, settings as typeof setup)).toMatchObject(
      wanted,
    )
  })
})

describe('efficiencyInBand', () => {
  const { points } = valueOf(threeTerminationSweep(sheetFiles(), setup))

  it('judges the worst point of the band', () => {
    const all = valueOf(efficiencyInBand(points, { name: 'HF', lowHz: 1e6, highHz: 30e6 }))
    expect(all).toMatchObject({ band: 'HF', points: 5, refusedPoints: 0, firstRefusal: undefined })
    expect(all.worst.frequencyHz).toBe(3.6e6)
    expectClose(all.worst.efficiency, 0.8246102)
    expectClose(all.worst.uEfficiency, 0.00857051)
    expectClose(all.medianEfficiency, 0.82895732)
  })

  it('takes both edges of the band', () => {
    expect(efficiencyInBand(points, { name: '40 m', lowHz: 7.1e6, highHz: 14.2e6 })).toMatchObject({
      points: 2,
    })
  })

  it('fails where no point lies', () => {
    const outcome = efficiencyInBand(points, { name: '60 m', lowHz: 5.2e6, highHz: 5.5e6 })
    expect(outcome).toMatchObject({ code: 'E_NO_TEST_FOR_BAND' })
  })

  it('counts refused points, and passes the refusal on when there is no other', () => {
    const refused = { frequencyHz: 7.05e6, result: { code: 'E_NOT_PHYSICAL', message: 'x' } }
    const band = { name: '40 m', lowHz: 7e6, highHz: 7.3e6 }
    expect(efficiencyInBand([refused, ...points], band)).toMatchObject({
      points: 1,
      refusedPoints: 1,
      firstRefusal: { code: 'E_NOT_PHYSICAL' },
    })
    expect(efficiencyInBand([refused], band)).toMatchObject({ code: 'E_NOT_PHYSICAL' })
  })
})

describe('recogniseTerminations', () => {
  const named = (names: [string, string, string], order: [Name, Name, Name] = ['open', 'short', 'load']) =>
    names.map((fileName, at) => ({ fileName, file: traceFile(order[at] ?? 'open') }))

  it.each<[string, string, string]>([
    ['xfm-07-open.s1p', 'xfm-07-short.s1p', 'xfm-07-load.s1p'],
    ['OPEN.S1P', 'SHORT.S1P', 'LOAD.S1P'],
    ['unit7Open.s1p', 'unit7Short.s1p', 'unit7Load.s1p'],
    ['7_o.s1p', '7_s.s1p', '7_l.s1p'],
  ])('goes by the names %s, %s, %s', (...names) => {
    expect(recogniseTerminations(named(names))).toEqual({
      assignment: { open: 0, short: 1, load: 2 },
      by: 'names',
      warnings: [],
    })
  })

  const orders: [Name, Name, Name][] = [
    ['open', 'short', 'load'],
    ['open', 'load', 'short'],
    ['short', 'open', 'load'],
    ['short', 'load', 'open'],
    ['load', 'open', 'short'],
    ['load', 'short', 'open'],
  ]

  it.each(orders)('goes by the traces when the names say nothing: %s, %s, %s', (...order) => {
    expect(recogniseTerminations(named(['1.s1p', '2.s1p', '3.s1p'], order))).toEqual({
      assignment: { open: order.indexOf('open'), short: order.indexOf('short'), load: order.indexOf('load') },
      by: 'traces',
      warnings: [],
    })
  })

  it('notices names that the traces contradict and says which file is which', () => {
    const files = named(['open.s1p', 'short.s1p', 'load.s1p'], ['short', 'open', 'load'])
    expect(recogniseTerminations(files)).toEqual({
      assignment: { open: 0, short: 1, load: 2 },
      by: 'names',
      suggestion: { open: 1, short: 0, load: 2 },
      warnings: [
        {
          code: 'W_SWAPPED',
          message: 'By their traces short.s1p is the open, open.s1p the short, load.s1p the load.',
        },
      ],
    })
  })

  it('ignores a name that speaks of two terminations, and words inside words', () => {
    const found = valueOf(recogniseTerminations(named(['open-short.s1p', 'shortwave.s1p', 'reopened.s1p'])))
    expect(found.by).toBe('traces')
  })

  it('admits that it cannot tell when no trace stands out as the load', () => {
    const flat = (re: number) => valueOf(readTouchstone(`# MHz S RI R 50\n7 ${re} 0`))
    const files = [0.98, -0.99, 0.97].map((re, at) => ({ fileName: `${at}.s1p`, file: flat(re) }))
    expect(codesOf(valueOf(recogniseTerminations(files)).warnings)).toEqual(['W_UNSURE'])
  })

  it('refuses anything but three different measurements', () => {
    const [open, short, load] = named(['a.s1p', 'b.s1p', 'c.s1p'])
    if (!open || !short || !load) throw new Error('three files')
    expect(recogniseTerminations([open, short])).toMatchObject({ code: 'E_COUNT' })
    expect(recogniseTerminations([open, short, load, load])).toMatchObject({ code: 'E_COUNT' })
    expect(recogniseTerminations([open, short, open])).toMatchObject({ code: 'E_SAME_TRACE' })
    const other = { fileName: 'd.s1p', file: valueOf(readTouchstone('# MHz S RI R 50\n7 0 0')) }
    expect(recogniseTerminations([open, short, other])).toMatchObject({ code: 'E_GRID' })
  })
})

describe('renormaliseGamma', () => {
  it('is the way through the impedance', () => {
    // 100 ohm: 1/3 against 50 ohm, 1/7 against 75 ohm.
    expectClose(valueOf(renormaliseGamma({ re: 1 / 3, im: 0 }, 50, 75)).re, 1 / 7)
    expect(renormaliseGamma({ re: 1, im: 0 }, 50, 75)).toEqual({ re: 1, im: 0 })
    expect(renormaliseGamma({ re: -1, im: 0 }, 50, 75)).toEqual({ re: -1, im: 0 })
  })

  it('comes back to where it began', () => {
    const part = fc.double({ min: -0.7, max: 0.7, noNaN: true })
    const ohm = fc.double({ min: 1, max: 5000, noNaN: true })
    fc.assert(
      fc.property(part, part, ohm, ohm, (re, im, from, to) => {
        const back = valueOf(renormaliseGamma(valueOf(renormaliseGamma({ re, im }, from, to)), to, from))
        expectClose(back.re, re)
        expectClose(back.im, im)
      }),
    )
  })

  it('refuses the active reflection that has no counterpart', () => {
    // g = (5000 - 50)/5050, so 1 + g Gamma is 0 at -5050/4950.
    expect(renormaliseGamma({ re: -5050 / 4950, im: 0 }, 5000, 50)).toMatchObject({ code: 'E_ACTIVE' })
  })
})
