import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { answerNeed } from '#shared/contracts/board-need.ts'
import { BANDS, MODES } from '#shared/engine/vocabulary.ts'
import { isAsked, needQuery, needText, readNeed, writeNeed } from '@/format/need.ts'

const PLACE = '0199b0de-0000-7000-8000-000000000001'
const NOTHING = { bands: [], mode: null, watts: null, hours: null, mains: false, at: null }

describe('a need in the address', () => {
  it('reads like what is asked for', () => {
    const need = { ...NOTHING, bands: ['40 m'], mode: 'voice', watts: 60, hours: 12 } as const
    expect(writeNeed(need)).toBe('40m,voice,60W,12h')
    expect(writeNeed({ ...need, bands: ['2 m', '70 cm'], mains: true, at: PLACE })).toBe(
      `2m,70cm,voice,60W,12h,mains,at:${PLACE}`,
    )
  })

  it('comes back as it was written', () => {
    const some = <T>(of: fc.Arbitrary<T>) => fc.option(of, { nil: null })
    const tenths = (max: number) => some(fc.integer({ min: 1, max: max * 10 }).map((n) => n / 10))
    const anyNeed = fc.record({
      bands: fc.subarray([...BANDS]),
      mode: some(fc.constantFrom(...MODES)),
      watts: tenths(5000),
      hours: tenths(1000),
      mains: fc.boolean(),
      at: some(fc.constant(PLACE)),
    })
    fc.assert(
      fc.property(anyNeed, (need) => {
        expect(readNeed(writeNeed(need))).toEqual(need)
      }),
    )
  })

  it('drops what nobody could have asked for', () => {
    expect(readNeed('41m,shouting,9999999W,0h,at:home,<b>')).toEqual(NOTHING)
    expect(readNeed('')).toEqual(NOTHING)
  })

  it('goes to the endpoint in its own words', () => {
    const query = needQuery(readNeed('80m,40m,digital,2.5W,4h,mains'), '2026-06-01T00:00:00Z')
    expect(
      answerNeed.query.parse(Object.fromEntries(Object.entries(query).map(([k, v]) => [k, String(v)]))),
    ).toEqual({
      asOf: '2026-06-01T00:00:00Z',
      bands: ['80 m', '40 m'],
      mode: 'digital',
      watts: 2.5,
      hours: 4,
      mains: true,
    })
  })

  it('asks for nothing by mains alone', () => {
    expect(isAsked(readNeed('mains'))).toBe(false)
    expect(isAsked(readNeed('60W'))).toBe(true)
    expect(needQuery(readNeed(''), null)).toEqual({})
  })
})

describe('a need on paper', () => {
  it('is one line', () => {
    expect(needText(readNeed('80m,40m,voice,60W,12h'), undefined)).toBe(
      '80 m and 40 m, voice, 60 W at the antenna, 12 h on own batteries',
    )
    expect(needText(readNeed(`12h,mains,at:${PLACE}`), 'Ridge hall')).toBe(
      '12 h with mains or a vehicle, at Ridge hall',
    )
  })
})
