import { describe, expect, it } from 'vitest'
import type { KitState } from '#shared/engine/readiness/types.ts'
import type { Availability, Verdict } from '#shared/engine/vocabulary.ts'
import { lowering, periodAt, textsOf } from './support/answers.ts'
import * as hf from './support/demo/hf-kits.ts'
import * as other from './support/demo/other-kits.ts'

/** Table 6 of the demo scenario: what each kit must say at D0, and what its reasons must name. */

const P: Verdict = 'proven'
const L: Verdict = 'proven-with-limits'
const N: Verdict = 'not-proven'
const F: Verdict = 'not-fit'

/** Each cause is what one reason must say, its parts joined by +. */
type Row = [kit: KitState, availability: Availability, verdict: Verdict, ...causes: string[]]

const TABLE: Row[] = [
  [hf.K_01, 'available', P],
  [hf.K_02, 'available', P],
  [hf.K_03, 'available', L, 'DCL-11 + 15 A + 50 W'],
  [hf.K_04, 'available', L, '10 m + 20 W + XFM-07'],
  [hf.K_05, 'available', L, '10 m + 20 W + XFM-08'],
  [hf.K_06, 'available', L, 'BAT-011 + 74 %', 'BAT-012 + 68 %', 'no battery endurance'],
  [
    hf.K_07,
    'available',
    L,
    '40 m + ANT-07 + SWR 3',
    'BAT-013 + 79 %',
    'BAT-014 + 77 %',
    'no battery endurance',
  ],
  [hf.K_08, 'out-of-service', F, 'BAT-016 + one cell dead', 'CHG-08 + no output', 'XFM-09 + 10 m'],
  [other.K_09, 'available', P],
  [other.K_10, 'assigned', P],
  [other.K_11, 'out-of-service', F, 'DC lead', 'adapter pouch', 'seal'],
  [other.K_12, 'assigned', P],
  [other.K_13, 'out-of-service', N, 'RAD-13', 'ANT-13', 'FDL-13', 'BAT-021', 'K-13 + count'],
  [other.K_14, 'out-of-service', N, 'RAD-14', 'ANT-14', 'FDL-14', 'BAT-022', 'K-14 + count'],
  [other.K_15, 'out-of-service', F, 'ANT-15 + element broken', 'BAT-023 + 52 %'],
  [hf.K_16, 'available', P],
  [hf.K_17, 'available', L, 'CMP-17 + voice only'],
  [hf.K_18, 'out-of-service', F, 'XFM-10 + cracked'],
  [other.K_19, 'available', P],
  [other.K_20, 'available', L, 'FDL-20 + 3.1 dB'],
  [other.K_21, 'available', P],
  [other.K_22, 'available', L, 'BAT-040 + 76 %', 'BAT-041 + 72 %'],
  [other.K_23, 'available', N, 'WTM-23', 'DMM-23'],
  [other.K_24, 'out-of-service', F, 'VNA-24 + away'],
]

const says = (cause: string) => (text: string) =>
  cause.split(' + ').every((part) => text.toLowerCase().includes(part.toLowerCase()))

describe('kits of the demo at its reference day', () => {
  for (const [kit, availability, verdict, ...causes] of TABLE) {
    const name = kit.kit.designation
    it(`says ${name} is ${verdict}`, () => {
      const period = periodAt(kit)
      expect(`${period.verdict}: ${textsOf(lowering(period)).join(' | ')}`).toMatch(
        new RegExp(`^${verdict}: `),
      )
      expect(period.availability).toBe(availability)
    })

    it(causes.length ? `names every cause at ${name}` : `has nothing against ${name}`, () => {
      const said = textsOf(lowering(periodAt(kit)))
      if (causes.length === 0) expect(said).toEqual([])
      for (const cause of causes)
        expect(said.some(says(cause)), `${cause} in:\n${said.join('\n')}`).toBe(true)
    })
  }

  it('counts 8 proven, 8 with limits, 3 not proven and 5 not fit', () => {
    const tally = (wanted: Verdict) => TABLE.filter(([kit]) => periodAt(kit).verdict === wanted).length
    expect([P, L, N, F].map(tally)).toEqual([8, 8, 3, 5])
  })

  it('gives every reason that lowers a verdict an action', () => {
    const idle = TABLE.flatMap(([kit]) => lowering(periodAt(kit))).filter(({ action }) => action === null)
    expect(textsOf(idle)).toEqual([])
  })

  it('leaves no band of a proven kit limited', () => {
    const bands = TABLE.filter(([, , verdict]) => verdict === P).flatMap(
      ([kit]) => periodAt(kit).capability.bands,
    )
    expect(bands.map(({ state }) => state)).toEqual(bands.map(() => 'proven'))
    expect(bands).toHaveLength(17)
  })
})
