import { describe, expect, it } from 'vitest'
import { compareBuilds } from '#shared/engine/build-comparison.ts'
import type { Band } from '#shared/engine/vocabulary.ts'
import { comparisonSentences } from '@/format/comparison.ts'
import { valueOf } from '../../support/value-of.ts'

const BANDS = ['80 m', '40 m', '20 m', '10 m'] as const

// Common practice, no source: three 100 W class builds measured as pairs, loss per device on 80, 40, 20, 10 m; two
// minutes of full carrier at about 95 W took the first by 39 F and the third by 15 F.
const BUILDS = [
  { name: '49:1 on a 61 mm core', losses: [1.4, 1.2, 1.2, 1.75], riseK: (115 - 76) / 1.8 },
  { name: '64:1 on a 61 mm core', losses: [0.65, 0.65, 1, 6], riseK: null },
  { name: '49:1 on a compact core', losses: [0.5, 1, 0.7, 1.1], riseK: (91 - 76) / 1.8 },
]

function comparison() {
  const compared = valueOf(
    compareBuilds(
      BUILDS.map(({ name, losses, riseK }) => ({
        name,
        units: [{ label: name, lossDb: Object.fromEntries(losses.map((loss, at) => [BANDS[at], loss])) }],
        ...(riseK !== null && { heat: { riseK, powerW: 95, minutes: 2 } }),
      })),
      3,
    ),
  )
  return {
    builds: compared.builds.map((build) => ({
      sheet: { id: build.name, name: build.name },
      rank: build.rank,
      units: build.units,
      bands: [],
      meanLossDb: build.meanLossDb,
      meanWithoutWorstDb: build.meanWithoutWorstDb,
      worstBand: build.worstBand as Band,
      unusableBands: build.unusableBands as Band[],
      kPerW: null,
      materialsCost: null,
      currency: '',
    })),
    bands: [...BANDS],
    unusableAboveDb: 3,
    heat: { verdict: compared.heat.verdict, run: { band: '20 m' as const, minutes: 2, powerW: 95 } },
    notes: [],
    leftOut: [],
  }
}

const plain = (sentences: string[]) => sentences.map((sentence) => sentence.replaceAll('\u00a0', ' '))

describe('what a comparison says', () => {
  it('names the first, what is unusable with both means, and whether heat agrees', () => {
    expect(plain(comparisonSentences(comparison()))).toEqual([
      'First overall: 49:1 on a compact core, 0.825 dB lost on the mean of the bands.',
      '64:1 on a 61 mm core is unusable on 10 m: more than 3 dB is lost there. Its mean is 2.075 dB, and 0.767 dB without 10 m.',
      'By the rise after 2 min at 95 W on 20 m, the build that loses less also warms less, which is what one should see. It says nothing about the end temperature.',
    ])
  })

  it('lists several bands as one says them', () => {
    const given = comparison()
    const builds = given.builds.map((build) =>
      build.unusableBands.length > 0
        ? { ...build, unusableBands: ['20 m', '15 m', '10 m'] satisfies Band[] }
        : build,
    )
    expect(comparisonSentences({ ...given, builds }).join()).toContain('unusable on 20 m, 15 m and 10 m:')
  })

  it('says that heat is not compared, and what was left out', () => {
    const given = { ...comparison(), heat: { verdict: 'not-compared' as const, run: null } }
    const sentences = comparisonSentences({
      ...given,
      notes: ['Not every build was measured on 15 m: the ranking leaves that out.'],
      leftOut: [{ id: 'x', name: 'Never built' }],
    })
    expect(sentences.slice(2)).toEqual([
      'Heat is not compared: the builds have no run of the same band, power and time.',
      'Not every build was measured on 15 m: the ranking leaves that out.',
      'Never built has no measured unit to compare.',
    ])
  })
})
