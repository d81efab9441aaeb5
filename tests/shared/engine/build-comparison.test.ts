import { describe, expect, it } from 'vitest'
import { compareBuilds, type Build } from '#shared/engine/build-comparison.ts'
import { kelvinFromFahrenheitDifference } from '#shared/engine/units.ts'
import { expectClose, expectNumbersReal } from '../../support/sheet-close.ts'
import { valueOf } from '../../support/value-of.ts'

const BANDS = ['80 m', '40 m', '20 m', '10 m'] as const

function build(name: string, ...units: number[][]): Build {
  return {
    name,
    units: units.map((losses, at) => ({
      label: `unit ${at + 1}`,
      lossDb: Object.fromEntries(losses.map((lossDb, band) => [BANDS[band] ?? '', lossDb])),
    })),
  }
}

/** Two minutes of full carrier. */
const heated = (riseF: number) => ({ riseK: kelvinFromFahrenheitDifference(riseF), powerW: 95, minutes: 2 })

// Common practice, no source: three 100 W class builds measured as pairs, loss per device on 80, 40, 20, 10
// m.
const LARGE_49 = { ...build('49:1 on 61 mm mix 43', [1.4, 1.2, 1.2, 1.75]), heat: heated(115 - 76) }
const LARGE_64 = build('64:1 on 61 mm mix 43', [0.65, 0.65, 1.0, 6])
const COMPACT_49 = { ...build('49:1 on a compact core', [0.5, 1.0, 0.7, 1.1]), heat: heated(91 - 76) }

describe('three builds of the trade', () => {
  const compared = valueOf(compareBuilds([LARGE_49, LARGE_64, COMPACT_49], 3))
  const of64 = compared.builds.find((each) => each.name === LARGE_64.name)

  it('names the 64:1 best on 40 m and unusable on 10 m', () => {
    expect(compared.bestPerBand.find((each) => each.band === '40 m')).toEqual({
      band: '40 m',
      builds: [LARGE_64.name],
      lossDb: 0.65,
    })
    expect(of64?.unusableBands).toEqual(['10 m'])
    expect(of64?.worstBand).toBe('10 m')
  })

  it('shows the mean with and without the worst band', () => {
    expectClose(of64?.meanLossDb, 2.075)
    expectClose(of64?.meanWithoutWorstDb, 0.766667)
    expect(of64?.meanWithoutWorstDb).toBeCloseTo(0.767, 3)
  })

  it('ranks the compact core first overall, and the one with a dead band last', () => {
    expect(compared.builds.map((each) => [each.rank, each.name])).toEqual([
      [1, COMPACT_49.name],
      [2, LARGE_49.name],
      [3, LARGE_64.name],
    ])
  })

  it('finds less heat where there is less loss, and claims no end temperature', () => {
    expectClose(LARGE_49.heat.riseK, 21.6667)
    expectClose(COMPACT_49.heat.riseK, 8.33333)
    expect(compared.heat).toMatchObject({ verdict: 'agrees' })
    expect(JSON.stringify(compared)).not.toMatch(/peakC|endC|steady|final/i)
  })

  it('says in which order the builds warm per watt', () => {
    const { heat } = compared
    if (heat.verdict === 'not-compared') throw new Error('compared')
    expect(heat.rises.map((rise) => rise.name)).toEqual([LARGE_49.name, COMPACT_49.name])
    expectClose(heat.rises[0]?.kPerW, 21.6667 / 95)
    expectClose(heat.rises[1]?.kPerW, 8.33333 / 95)
  })
})

describe('compareBuilds', () => {
  it('takes the median and the spread of the units on each band', () => {
    const many = build('A', [1, 1], [1.2, 1], [5, 1.4])
    const { builds } = valueOf(compareBuilds([many, build('B', [2, 2])], 3))
    expect(builds[0]?.perBand[0]).toMatchObject({
      band: '80 m',
      units: 3,
      medianLossDb: 1.2,
      lowestDb: 1,
      highestDb: 5,
      spreadDb: 4,
      isUnusable: false,
    })
  })

  it('calls a band unusable above the limit and not at it', () => {
    const unusable = (lossDb: number) =>
      valueOf(compareBuilds([build('A', [lossDb]), build('B', [1])], 3)).builds.find(
        (each) => each.name === 'A',
      )?.unusableBands
    expect(unusable(3)).toEqual([])
    expect(unusable(3.01)).toEqual(['80 m'])
  })

  it('shares a rank and a best band between equals', () => {
    const { builds, bestPerBand } = valueOf(
      compareBuilds([build('A', [1, 2]), build('B', [2, 1]), build('C', [9, 9])], 3),
    )
    expect(builds.map((each) => each.rank)).toEqual([1, 1, 3])
    expect(valueOf(compareBuilds([build('A', [1]), build('B', [1])], 3)).bestPerBand[0]?.builds).toEqual([
      'A',
      'B',
    ])
    expect(bestPerBand).toHaveLength(2)
  })

  it('ranks on the bands that every build was measured on, and says so', () => {
    const short = build('A', [1, 1])
    const long = build('B', [0.9, 0.9, 6, 6])
    const { builds, warnings, bands } = valueOf(compareBuilds([short, long], 3))
    expect(bands).toEqual(BANDS)
    expect(builds[0]).toMatchObject({ name: 'B', rank: 1, meanLossDb: 0.9, unusableBands: ['20 m', '10 m'] })
    expect(warnings).toEqual([
      {
        code: 'W_BANDS_DIFFER',
        message: 'Not every build was measured on 20 m, 10 m: the ranking leaves that out.',
      },
    ])
  })

  it('has no mean without the worst band when there is one band', () => {
    expect(
      valueOf(compareBuilds([build('A', [1]), build('B', [2])], 3)).builds[0]?.meanWithoutWorstDb,
    ).toBeNull()
  })

  it.each<[string, number | undefined, number, number, string]>([
    ['nothing from one run', undefined, 95, 2, 'not-compared'],
    ['nothing from runs of different length', 39, 95, 3, 'not-compared'],
    ['nothing from runs of different power', 39, 80, 2, 'not-compared'],
    ['a contradiction', 10, 95, 2, 'disagrees'],
  ])('concludes %s', (_, riseF, powerW, minutes, verdict) => {
    const heat = riseF === undefined ? undefined : { ...heated(riseF), powerW, minutes }
    const { heat: found } = valueOf(compareBuilds([{ ...LARGE_49, heat }, COMPACT_49], 3))
    expect(found.verdict).toBe(verdict)
  })

  it.each<[string, Build[], number, string]>([
    ['one build', [LARGE_49], 3, 'E_TOO_FEW'],
    ['a build without units', [LARGE_49, build('A')], 3, 'E_TOO_FEW'],
    ['two builds of one name', [LARGE_49, LARGE_49], 3, 'E_DUPLICATE'],
    [
      'builds without a common band',
      [build('A', [1]), { name: 'B', units: [{ label: '1', lossDb: { x: 1 } }] }],
      3,
      'E_NO_COMMON_BAND',
    ],
    ['a negative loss', [LARGE_49, build('A', [-1])], 3, 'E_RANGE'],
    ['a loss that is no number', [LARGE_49, build('A', [NaN])], 3, 'E_NUMBER'],
    ['a negative limit', [LARGE_49, LARGE_64], -1, 'E_RANGE'],
    ['a negative rise', [LARGE_49, { ...LARGE_64, heat: heated(-1) }], 3, 'E_RANGE'],
  ])('refuses %s', (_, builds, limit, code) => {
    expect(compareBuilds(builds, limit)).toMatchObject({ code })
  })

  it('answers with real numbers only', () => {
    expectNumbersReal(compareBuilds([LARGE_49, LARGE_64, COMPACT_49], 3))
  })
})
