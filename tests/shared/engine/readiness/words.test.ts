import { describe, expect, it } from 'vitest'
import { withArticle } from '#shared/engine/readiness/words.ts'

describe('a noun with its article', () => {
  it.each([
    ['heat test', 'a heat test'],
    ['antenna sweep', 'an antenna sweep'],
    ['on-air check', 'an on-air check'],
    ['inspection', 'an inspection'],
    ['radio', 'a radio'],
  ])('%s is "%s"', (noun, said) => expect(withArticle(noun)).toBe(said))
})
