import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  checkCharacter,
  makeTag,
  MAX_SERIAL,
  nextTag,
  normaliseTag,
  TAG_CHARACTERS,
  verifyTag,
} from '#shared/engine/tag.ts'

const character = fc.constantFrom(...TAG_CHARACTERS)
/** Valid tags of 3 to 36 characters: bodies whose check character is in the alphabet. */
const anyTag = fc
  .array(character, { minLength: 2, maxLength: 35 })
  .map((body) => body.join('') + String(checkCharacter(body.join(''))))
  .filter((tag) => verifyTag(tag) === tag)

function swapped(tag: string, i: number, j: number): string {
  const characters = [...tag]
  ;[characters[i], characters[j]] = [characters[j] ?? '', characters[i] ?? '']
  return characters.join('')
}

describe('checkCharacter', () => {
  // Calculation sheet, section 13.
  it.each([
    ['KT4Z7', '6'],
    ['KT4Z8', '4'],
    ['KT2222', 'R'],
    ['XF3M9P', 'M'],
    ['BT7QRS', 'V'],
    ['HGW2CX', 'G'],
    ['RD8VTN', 'K'],
    ['ZZZZZZ', 'V'],
  ])('of %s is %s', (body, check) => {
    expect(checkCharacter(body)).toBe(check)
    expect(verifyTag(body + check)).toBe(body + check)
  })

  // Published: ICCBBA ISBT 128 donation number.
  it('of G123498654321 is H', () => expect(checkCharacter('G123498654321')).toBe('H'))

  it('agrees with the recurrence of ISO/IEC 7064', () => {
    const values = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ*'
    const bodies = fc.array(fc.constantFrom(...values.slice(0, 36)), { minLength: 1, maxLength: 35 })
    fc.assert(
      fc.property(bodies, (body) => {
        const p = body.reduce((sum, c) => (2 * (sum + values.indexOf(c))) % 37, 0)
        expect(checkCharacter(body.join(''))).toBe(values[(38 - p) % 37])
      }),
    )
  })

  it('refuses an empty or over-long body and other characters', () => {
    for (const body of ['', 'A'.repeat(36)])
      expect(checkCharacter(body)).toMatchObject({ code: 'TAG_LENGTH' })
    for (const body of ['a', 'A*', 'Ä', 'A B'])
      expect(checkCharacter(body)).toMatchObject({ code: 'TAG_ALPHABET' })
  })
})

describe('verifyTag', () => {
  it.each(['KT4Z67', 'KT4Z86', 'TK4Z76', 'KTZ476'])(
    'refuses %s without naming the right character',
    (tag) => {
      const answer = verifyTag(tag)
      expect(answer).toMatchObject({ code: 'TAG_CHECK', field: 'tag' })
      expect(JSON.stringify(answer)).not.toMatch(/\b[0-9A-Z]\b/)
    },
  )

  it('takes lower case, spaces and hyphens of any length', () => {
    for (const input of ['kt4z76', ' KT 4Z7-6 ', 'kt\u20134z76', 'KT\u00a04Z\u201176\n'])
      expect(verifyTag(input)).toBe('KT4Z76')
    expect(normaliseTag('kt-4z 76')).toBe('KT4Z76')
  })

  it.each(['KT4Z70', 'KT1Z76', 'KTIZ76', 'KTlZ76', 'KTOZ76'])('refuses %s rather than guess', (tag) => {
    expect(verifyTag(tag)).toMatchObject({
      code: 'TAG_ALPHABET',
      message: expect.stringContaining('tags never contain 0, 1, I, L or O') as string,
    })
  })

  it('refuses other characters, even those that become letters in upper case', () => {
    for (const tag of ['KT4Z2*', 'KT4Zß6', 'KT4ſ76', 'KT4Z7６'])
      expect(verifyTag(tag)).toMatchObject({ code: 'TAG_ALPHABET' })
  })

  it('refuses an empty, short or over-long tag', () => {
    for (const tag of ['', '  ', 'K', 'KT', 'K - T', 'K'.repeat(37)])
      expect(verifyTag(tag)).toMatchObject({ code: 'TAG_LENGTH' })
  })

  it('catches every single wrong character', () => {
    fc.assert(
      fc.property(anyTag, fc.nat(), (tag, position) => {
        const at = position % tag.length
        for (const wrong of TAG_CHARACTERS.replace(tag.charAt(at), ''))
          expect(verifyTag(tag.slice(0, at) + wrong + tag.slice(at + 1))).toMatchObject({ code: 'TAG_CHECK' })
      }),
    )
  })

  it('catches every swap of two different characters at any distance', () => {
    fc.assert(
      fc.property(anyTag, fc.nat(), (tag, position) => {
        const i = position % tag.length
        for (let j = 0; j < tag.length; j++) {
          if (tag[j] !== tag[i]) expect(verifyTag(swapped(tag, i, j))).toMatchObject({ code: 'TAG_CHECK' })
        }
      }),
    )
  })

  it('answers any input without throwing', () => {
    const anything = fc.anything({ withNullPrototype: true })
    fc.assert(
      fc.property(anything, anything, (a, b) => {
        void [verifyTag(a as string), checkCharacter(a as string), makeTag(a as string, b as number)]
        void nextTag(a as string, b as number)
      }),
    )
    fc.assert(fc.property(fc.string({ unit: 'binary' }), (text) => void verifyTag(text)))
  })
})

describe('makeTag', () => {
  // Serial 2857 in base 31 is 4Z7: the sheet's KT4Z76.
  it('writes the serial in the alphabet and appends the check', () => {
    expect(makeTag('KT', 2857)).toBe('KT4Z76')
    expect(makeTag('KT', 2858)).toBe('KT4Z84')
  })

  // Bodies to skip, calculation sheet section 13: check L, 1, *, O, I, 0.
  it.each(['5', 'F', 'G', 'M', 'P', 'Y'])('skips KT4Z2%s', (last) => {
    const serial = ((2 * 31 + 30) * 31 + 0) * 31 + TAG_CHARACTERS.indexOf(last)
    expect(checkCharacter(`KT4Z2${last}`)).toMatch(/^[01ILO*]$/)
    expect(makeTag('KT', serial)).toBeUndefined()
  })

  it('skips about 16 % of serials and repeats none', () => {
    const tags = new Set<unknown>()
    for (let serial = 0; serial < 40_000; serial++) tags.add(makeTag('XF', serial))
    tags.delete(undefined)
    expect(1 - tags.size / 40_000).toBeCloseTo(6 / 37, 2)
  })

  it('makes only tags that verify', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: MAX_SERIAL - 100 }), (serial) => {
        const next = nextTag('BT', serial) as { tag: string; serial: number }
        expect(verifyTag(next.tag)).toBe(next.tag)
        expect(next.serial - serial).toBeLessThan(10)
        expect(makeTag('BT', next.serial)).toBe(next.tag)
      }),
    )
  })

  it('refuses a prefix that is not two letters of the alphabet', () => {
    for (const prefix of ['', 'K', 'KTT', 'K4', 'IO', 'kt'])
      expect(makeTag(prefix, 1)).toMatchObject({ code: 'TAG_ALPHABET', field: 'prefix' })
  })

  it('refuses a serial outside its range', () => {
    for (const serial of [-1, 0.5, MAX_SERIAL + 1, Number.NaN])
      expect(nextTag('KT', serial)).toMatchObject({ code: 'E_RANGE', field: 'serial' })
  })
})
